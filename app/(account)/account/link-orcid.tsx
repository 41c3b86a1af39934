'use client';
import { useState } from 'react';
import { TextField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { OrcidButton } from '../orcid-button';

/** A new way in is worth the password of the old one. */
export function LinkOrcid({ hasPassword }: { readonly hasPassword: boolean }) {
  const [password, setPassword] = useState('');
  if (!hasPassword) return <OrcidButton path="link-social" body={{}}>Link ORCID</OrcidButton>;
  return (
    <Disclosure summary="Link ORCID" className="max-w-[420px]">
      <div className="grid gap-4">
        <TextField label="Your password" type="password" autoComplete="current-password" maxLength={256} value={password} onChange={(event) => setPassword(event.target.value)} hint="Then ORCID asks who you are. You can sign in by either afterwards." />
        <OrcidButton path="link-social" body={{ password }}>Go to ORCID</OrcidButton>
      </div>
    </Disclosure>
  );
}
