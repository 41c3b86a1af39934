'use client';
import { useState } from 'react';
import { Button } from '../_ui/primitives/button';
import { Notice } from '../_ui/primitives/notice';
import { askAuth } from './auth-requests';

interface OrcidButtonProps {
  readonly path: 'sign-in/social' | 'link-social';
  readonly body: Readonly<Record<string, string>>;
  readonly children: string;
}

/** Leads to ORCID's own page and back; the password given there is never seen here. */
export function OrcidButton({ path, body, children }: OrcidButtonProps) {
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const leave = async () => {
    setBusy(true);
    setProblem(null);
    const answer = await askAuth(path, body);
    const url = answer.ok ? answer.value['url'] : null;
    if (typeof url === 'string' && /^https?:\/\//.test(url)) return window.location.assign(url);
    setProblem(answer.ok ? 'ORCID cannot be reached just now. Try again in a minute.' : answer.sentence);
    setBusy(false);
  };
  return (
    <div className="grid gap-3">
      <Button onClick={() => void leave()} busy={busy ? 'Going to ORCID' : null} className="w-full">{children}</Button>
      {problem && <Notice kind="stop" word="Not yet" live="alert">{problem}</Notice>}
    </div>
  );
}
