'use client';
import { useId, useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { SelectField, TextareaField } from '@/app/_ui/primitives/control';
import type { Candidate } from '@/lib/explain/candidate';
import { Trouble } from '../act-parts';
import { useAct } from '../use-act';
import { answerCandidate } from './actions';

interface AnswerCandidateProps {
  readonly submissionId: string;
  readonly runId: string;
  readonly claimId: string;
  readonly candidate: Candidate;
  /** An answer stands already, and this is a change of it. */
  readonly again: boolean;
}

type Answer = 'confirmed' | 'not-so' | 'cannot-tell';

/** *Confirmed*, *not so* or *cannot tell*; only what is confirmed may become a change of settings. */
export function AnswerCandidate({ submissionId, runId, claimId, candidate, again }: AnswerCandidateProps) {
  const several = candidate.readings.length > 1;
  const [open, setOpen] = useState(!again);
  const [reading, setReading] = useState('');
  const [note, setNote] = useState('');
  const hint = useId();
  const { busy, trouble, run } = useAct(answerCandidate, () => setOpen(false));
  const say = (answer: Answer) =>
    void run({ id: submissionId, answer: { runId, claim: claimId, candidate: candidate.id, answer, note, reading: answer === 'confirmed' ? (several ? (reading === '' ? null : Number(reading)) : 0) : null } });
  if (!open) return <div><Button size="low" onClick={() => setOpen(true)}>Change the answer</Button></div>;
  return (
    <div className="grid gap-2" role="group" aria-label="Your answer to this candidate">
      <p id={hint} className="text-small text-ink-2">Only you know what was done. The answer is seen by referees and editor; it changes no number.</p>
      {several && (
        <SelectField label="Which of them" value={reading} onChange={(e) => setReading(e.target.value)}>
          <option value="">choose before you confirm</option>
          {candidate.readings.map(({ clause }, i) => <option key={clause} value={i}>{clause}</option>)}
        </SelectField>
      )}
      <TextareaField label="In your words" hint="Optional." rows={2} maxLength={2000} value={note} onChange={(e) => setNote(e.target.value)} />
      <div className="flex flex-wrap gap-2" aria-describedby={hint}>
        <Button size="low" tone="main" busy={busy ? 'Keeping it' : null} onClick={() => say('confirmed')}>Confirmed</Button>
        <Button size="low" aria-disabled={busy || undefined} onClick={() => say('not-so')}>Not so</Button>
        <Button size="low" aria-disabled={busy || undefined} onClick={() => say('cannot-tell')}>Cannot tell</Button>
        {again && <Button size="low" tone="quiet" onClick={() => setOpen(false)}>Not now</Button>}
      </div>
      <Trouble trouble={trouble} />
    </div>
  );
}
