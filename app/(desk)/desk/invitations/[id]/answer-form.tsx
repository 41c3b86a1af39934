'use client';
import { useRouter } from 'next/navigation';
import type { Route } from 'next';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Checkbox } from '@/app/_ui/primitives/control';
import { Trouble } from '../../../act-parts';
import { answerInvitation } from '../../../review/actions';
import { useAct } from '../../../use-act';

/** Accepting opens the package, so the statement about conflicts comes first. */
export function AnswerForm({ id }: { readonly id: string }) {
  const router = useRouter();
  const [noConflict, setNoConflict] = useState(false);
  const [accepting, setAccepting] = useState(true);
  const { busy, trouble, run } = useAct(answerInvitation, ({ submissionId }) => router.push((accepting ? `/review/${submissionId}` : '/desk') as Route));
  const answer = (accept: boolean) => {
    setAccepting(accept);
    void run({ id, answer: { accept, noConflict: accept && noConflict } });
  };
  return (
    <div className="grid gap-4 rounded border border-hair-2 bg-sheet px-5 py-4">
      <Checkbox label="I have no conflict of interest with the authors or with this claim." checked={noConflict} onChange={(e) => setNoConflict(e.target.checked)} />
      <p className="max-w-measure text-ui text-ink-2">A conflict is: joint work in the last three years, the same department or code team, supervision at any time, or a competing claim of your own. If in doubt, decline; nobody asks why.</p>
      <div className="flex flex-wrap gap-2">
        <Button tone="main" busy={busy && accepting ? 'Accepting' : null} onClick={() => answer(true)}>Accept</Button>
        <Button busy={busy && !accepting ? 'Declining' : null} onClick={() => answer(false)}>Decline</Button>
      </div>
      <Trouble trouble={trouble} />
    </div>
  );
}
