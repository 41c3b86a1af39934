'use client';
import { useState } from 'react';
import type { MadeToken } from '@/lib/services/tokens/token-view';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Notice } from '@/app/_ui/primitives/notice';
import { formatInstant } from '@/app/views/dates';

/** The token itself, while this page is open and never again. */
export function MadeOnce({ made, another }: { readonly made: MadeToken; readonly another: () => void }) {
  const [copied, setCopied] = useState<'no' | 'yes' | 'refused'>('no');
  const copy = () => navigator.clipboard.writeText(made.token).then(() => setCopied('yes'), () => setCopied('refused'));
  return (
    <Notice kind="ask" word="Copy it now" live="status" actions={<Button onClick={another}>I have it; make another</Button>}>
      <p className="mb-2">This token is shown once. It expires {formatInstant(made.expiresAt)}. Keep it where other secrets are kept, and out of files that others read.</p>
      <div className="grid items-end gap-2 sm:grid-cols-[minmax(0,1fr)_auto]">
        <TextField label="Your token" value={made.token} readOnly spellCheck={false} autoComplete="off" className="font-code text-code" onFocus={(event) => event.currentTarget.select()} />
        <Button onClick={() => void copy()}>{copied === 'yes' ? 'Copied' : 'Copy'}</Button>
      </div>
      {copied === 'refused' && <p className="mt-1 text-small">The browser does not let this page copy. Select the field and copy it by keyboard.</p>}
    </Notice>
  );
}
