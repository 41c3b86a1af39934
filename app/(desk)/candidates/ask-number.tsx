'use client';
import { Button } from '@/app/_ui/primitives/button';
import type { ExtraNumber } from '@/lib/explain/candidate';
import { Trouble } from '../act-parts';
import { openThread } from '../review/actions';
import { useAct } from '../use-act';

interface AskNumberProps {
  readonly submissionId: string;
  readonly claimId: string;
  readonly extra: ExtraNumber;
  /** A thread of the claim asks for it already. */
  readonly asked: boolean;
}

/** One click asks the authors for the number, in a thread of the claim. */
export function AskNumber({ submissionId, claimId, extra, asked }: AskNumberProps) {
  const { busy, trouble, run } = useAct(openThread);
  if (asked) return <p role="status" className="text-ui">Asked: the thread stands at the end of this claim.</p>;
  const ask = () => void run({ id: submissionId, thread: { kind: 'question', visibility: 'authors', anchor: { claim: claimId, at: null }, body: extra.sentence } });
  return (
    <div className="grid gap-2">
      <div><Button size="low" busy={busy ? 'Asking' : null} onClick={ask}>Ask the authors for this number</Button></div>
      <Trouble trouble={trouble} />
    </div>
  );
}
