'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Notice } from '@/app/_ui/primitives/notice';
import { askAuth } from '../auth-requests';
import { loadAnew } from '../load-anew';

export function SignOutButton() {
  const [problem, setProblem] = useState<string | null>(null);
  const [busy, setBusy] = useState(false);
  const leave = async () => {
    setBusy(true);
    const answer = await askAuth('sign-out', {});
    if (answer.ok) {
      // A whole page load: what was fetched for a member must not linger.
      loadAnew('/');
    } else {
      setProblem(answer.sentence);
      setBusy(false);
    }
  };
  return (
    <div className="grid gap-3 justify-items-start">
      <Button onClick={() => void leave()} busy={busy ? 'Signing out' : null}>Sign out</Button>
      {problem && <Notice kind="stop" word="Not yet" live="alert">{problem}</Notice>}
    </div>
  );
}
