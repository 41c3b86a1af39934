'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Trouble } from '../act-parts';
import { remind } from '../review/actions';
import { useAct } from '../use-act';

/** A letter to everybody who owes an answer or a report. What came of it stays in sight. */
export function RemindButton({ submissionId, title }: { readonly submissionId: string; readonly title: string }) {
  const [reminded, setReminded] = useState<number | null>(null);
  const { busy, trouble, run } = useAct(remind, (done) => setReminded(done.reminded));
  return (
    <span className="inline-grid gap-1">
      <Button size="low" busy={busy ? 'Reminding' : null} onClick={() => void run({ id: submissionId })}>Remind<span className="sr-only">: {title}</span></Button>
      <span role="status" className="text-small text-ink-2">{reminded !== null && `${reminded} ${reminded === 1 ? 'letter' : 'letters'}, at most one a day each`}</span>
      <Trouble trouble={trouble} />
    </span>
  );
}
