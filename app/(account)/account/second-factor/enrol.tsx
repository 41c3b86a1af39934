'use client';
import { useState, type FormEvent } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextField } from '@/app/_ui/primitives/control';
import { Notice } from '@/app/_ui/primitives/notice';
import { askAuth, type AuthAnswer } from '../../auth-requests';
import { RecoveryCodes, codesIn } from './recovery-codes';
import { SecretSquare } from './secret-square';

type Step = { readonly at: 'start' } | { readonly at: 'code' | 'done'; readonly uri: string; readonly codes: readonly string[] };

interface EnrolProps {
  readonly hasPassword: boolean;
  /** Where the reader was going when the second factor came in between. */
  readonly next: string;
}

/** Three steps on one page: prove it is you, show the secret and take the first code, keep the recovery codes. */
export function Enrol({ hasPassword, next }: EnrolProps) {
  const [step, setStep] = useState<Step>({ at: 'start' });
  const [trouble, setTrouble] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);

  const ask = (path: 'two-factor/enable' | 'two-factor/verify-totp', then: (answer: Extract<AuthAnswer, { ok: true }>) => void) => async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (busy) return;
    const fields = Object.fromEntries(new FormData(event.currentTarget));
    setBusy(true);
    setTrouble(null);
    const answer = await askAuth(path, fields);
    setBusy(false);
    if (answer.ok) then(answer);
    else setTrouble(answer.sentence);
  };
  const begin = ask('two-factor/enable', ({ value }) => setStep({ at: 'code', uri: String(value['totpURI'] ?? ''), codes: codesIn(value) }));
  const prove = ask('two-factor/verify-totp', () => setStep((now) => (now.at === 'start' ? now : { ...now, at: 'done' })));
  const said = trouble && <Notice kind="stop" word="Not yet" live="alert">{trouble}</Notice>;

  if (step.at === 'done') return <RecoveryCodes codes={step.codes} next={next} />;
  if (step.at === 'code')
    return (
      <form key="code" method="post" onSubmit={(event) => void prove(event)} className="grid gap-4">
        <SecretSquare uri={step.uri} />
        <TextField label="The code it shows now" name="code" inputMode="numeric" autoComplete="one-time-code" pattern="\d{6}" maxLength={6} required autoFocus />
        {said}
        <Button type="submit" tone="main" busy={busy ? 'Looking at the code' : null} className="w-full">Switch it on</Button>
      </form>
    );
  return (
    <form key="start" method="post" onSubmit={(event) => void begin(event)} className="grid gap-4">
      {hasPassword ? <TextField label="Your password" name="password" type="password" autoComplete="current-password" required maxLength={256} /> : <p className="text-ui">Your account has no password, so this asks for a sign-in with ORCID within the last ten minutes.</p>}
      {said}
      <Button type="submit" tone="main" busy={busy ? 'Making a secret' : null} className="w-full">Set it up</Button>
    </form>
  );
}
