'use client';
import { useState, type FormEvent, type ReactNode } from 'react';
import { Button } from '../_ui/primitives/button';
import { Notice } from '../_ui/primitives/notice';
import { askAuth, type AuthPath } from './auth-requests';
import { loadAnew } from './load-anew';

interface AuthFormProps {
  readonly path: AuthPath;
  readonly button: string;
  readonly busy: string;
  /** Sent besides the fields. */
  readonly extra?: Readonly<Record<string, string | boolean>>;
  /** Where to go afterwards; without it `done` is shown in the form's place. */
  readonly next?: string;
  readonly done?: ReactNode;
  readonly children: ReactNode;
}

/** method="post" although a script sends it: were the script missing, no password may land in an address. */
export function AuthForm({ path, button, busy, extra, next, done, children }: AuthFormProps) {
  const [problem, setProblem] = useState<string | null>(null);
  const [state, setState] = useState<'idle' | 'busy' | 'done'>('idle');
  const send = async (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    if (state === 'busy') return;
    const fields = Object.fromEntries(new FormData(event.currentTarget));
    setState('busy');
    setProblem(null);
    const answer = await askAuth(path, { ...fields, ...extra });
    if (!answer.ok) {
      setProblem(answer.sentence);
      setState('idle');
    } else if (answer.value['twoFactorRedirect']) {
      loadAnew(`/sign-in/second-factor?next=${encodeURIComponent(next ?? '/')}`);
    } else if (next) {
      // A whole page load: what was fetched ahead was fetched for a visitor.
      loadAnew(next);
    } else setState('done');
  };
  if (state === 'done') return <div role="status">{done}</div>;
  return (
    <form method="post" onSubmit={(event) => void send(event)} className="grid gap-4">
      {children}
      {problem && <Notice kind="stop" word="Not yet" live="alert">{problem}</Notice>}
      <Button type="submit" tone="main" busy={state === 'busy' ? busy : null} className="w-full">{button}</Button>
    </form>
  );
}
