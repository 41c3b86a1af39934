'use client';
import { useState, type FormEvent } from 'react';
import { Trouble } from '@/app/(desk)/act-parts';
import { useAct } from '@/app/(desk)/use-act';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import type { OwnAccount } from '@/lib/services/accounts/get-own-account';
import { saveProfile } from './actions';

export function ProfileForm({ account }: { readonly account: Pick<OwnAccount, 'name' | 'affiliation' | 'typedOrcid' | 'orcid'> }) {
  const [saved, setSaved] = useState(false);
  const saving = useAct(saveProfile, () => setSaved(true));
  const send = (event: FormEvent<HTMLFormElement>): void => {
    event.preventDefault();
    setSaved(false);
    const form = new FormData(event.currentTarget);
    const text = (name: string): string => String(form.get(name) ?? '');
    void saving.run({ name: text('name'), affiliation: text('affiliation'), orcid: account.orcid ? (account.typedOrcid ?? '') : text('orcid') });
  };
  return (
    <form method="post" onSubmit={send} onChange={() => setSaved(false)} className="grid max-w-[420px] gap-4">
      <TextField label="Name" name="name" autoComplete="name" required maxLength={120} defaultValue={account.name} hint="As it should stand on a record. Records that are signed keep the name they have." />
      <TextField label="Affiliation" name="affiliation" autoComplete="organization" maxLength={200} defaultValue={account.affiliation ?? ''} />
      {!account.orcid && <TextField label="ORCID iD, typed in" name="orcid" autoComplete="off" spellCheck={false} maxLength={60} defaultValue={account.typedOrcid ?? ''} hint="Shown as “typed in, not authenticated”. Sign in with ORCID below to have it authenticated." />}
      <Trouble trouble={saving.trouble} />
      <div className="flex flex-wrap items-center gap-3">
        <Button type="submit" busy={saving.busy ? 'Saving' : null}>Save</Button>
        <span role="status" className="text-ui text-ink-2">{saved ? 'Saved.' : ''}</span>
      </div>
    </form>
  );
}
