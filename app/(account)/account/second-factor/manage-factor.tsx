'use client';
import { useState, type FormEvent } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Notice } from '@/app/_ui/primitives/notice';
import { askAuth } from '../../auth-requests';
import { RecoveryCodes, codesIn } from './recovery-codes';
import { loadAnew } from '../../load-anew';

interface ManageProps {
  readonly hasPassword: boolean;
  /** An editor or administrator: without it they only read. */
  readonly required: boolean;
}

export function ManageFactor({ hasPassword, required }: ManageProps) {
  const [codes, setCodes] = useState<readonly string[] | null>(null);
  if (codes) return <RecoveryCodes codes={codes} next="/account" />;
  return (
    <div className="grid gap-4">
      <Notice kind="done" word="On">Signing in asks for a code of your authenticator.</Notice>
      <Disclosure summary="Make new recovery codes">
        <Proven path="two-factor/generate-backup-codes" hasPassword={hasPassword} button="Make ten new ones" busy="Making them" then={(value) => setCodes(codesIn(value))}>
          <p className="text-ui">The codes you have stop working.</p>
        </Proven>
      </Disclosure>
      <Disclosure summary="Switch it off">
        <Proven path="two-factor/disable" hasPassword={hasPassword} button="Switch the second factor off" busy="Switching it off" then={() => loadAnew('/account/second-factor')}>
          <p className="text-ui">{required ? 'Your account edits or administers: outside the demonstration it can only read until a second factor is set up again.' : 'From then on a password or ORCID alone signs you in.'}</p>
        </Proven>
      </Disclosure>
    </div>
  );
}

interface ProvenProps {
  readonly path: 'two-factor/generate-backup-codes' | 'two-factor/disable';
  readonly hasPassword: boolean;
  readonly button: string;
  readonly busy: string;
  readonly then: (value: Readonly<Record<string, unknown>>) => void;
  readonly children: React.ReactNode;
}

function Proven({ path, hasPassword, button, busy, then, children }: ProvenProps) {
  const [trouble, setTrouble] = useState<string | null>(null);
  const [under, setUnder] = useState(false);
  const send = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (under) return;
    const fields = Object.fromEntries(new FormData(event.currentTarget));
    setUnder(true);
    setTrouble(null);
    const answer = await askAuth(path, fields);
    setUnder(false);
    if (answer.ok) then(answer.value);
    else setTrouble(answer.sentence);
  };
  return (
    <form method="post" onSubmit={(event) => void send(event)} className="grid gap-4">
      {children}
      {hasPassword && <TextField label="Your password" name="password" type="password" autoComplete="current-password" required maxLength={256} />}
      {trouble && <Notice kind="stop" word="Not yet" live="alert">{trouble}</Notice>}
      <Button type="submit" busy={under ? busy : null}>{button}</Button>
    </form>
  );
}
