'use client';
import { useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { Trouble } from '../act-parts';
import { useAct } from '../use-act';
import { stopRun } from './actions';

interface StopRunProps {
  /** Of the submission. */
  readonly id: string;
  readonly runId: string;
  /** What is stopped, as the button says it: "check", "variation". */
  readonly what: string;
}

/** Ends one's own run. The worker hears of it within a second; until then the button says that it was asked. */
export function StopRun({ id, runId, what }: StopRunProps) {
  const [asked, setAsked] = useState(false);
  const stopping = useAct(stopRun, () => setAsked(true));
  return (
    <div className="grid justify-items-start gap-1">
      <Button size="low" busy={stopping.busy || asked ? 'Stopping' : null} onClick={() => void stopping.run({ id, runId })}>Stop the {what}</Button>
      <Trouble trouble={stopping.trouble} />
    </div>
  );
}
