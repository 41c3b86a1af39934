'use client';
import { useId, useState } from 'react';
import { Button } from '@/app/_ui/primitives/button';
import { TextareaField } from '@/app/_ui/primitives/control';
import type { Finding } from '@/lib/engine/contract/finding';
import { Trouble } from '../../act-parts';
import { useAct } from '../../use-act';
import { answerFinding } from '../actions';

interface AnswerFormProps {
  readonly id: string;
  readonly finding: Finding;
  readonly answer: string | null;
}

/** Why the data are right as they are; referees and readers see it under the finding. */
export function AnswerForm({ id, finding: { code, where, text }, answer }: AnswerFormProps) {
  const [open, setOpen] = useState(false);
  const [words, setWords] = useState(answer ?? '');
  const field = useId();
  const { busy, trouble, run } = useAct(answerFinding, () => setOpen(false));
  const send = (said: string) => void run({ id, finding: { code, where, text, answer: said } });
  if (!open) return <Button size="low" onClick={() => setOpen(true)}>{answer === null ? 'Keep, and say why' : 'Change the answer'}</Button>;
  return (
    <div className="grid w-full gap-2">
      <TextareaField id={field} label="Why it stands" hint="Referees and readers see this under the finding." maxLength={2000} value={words} onChange={(event) => setWords(event.target.value)} autoFocus />
      <div className="flex flex-wrap gap-2">
        <Button size="low" tone="main" busy={busy ? 'Keeping it' : null} aria-disabled={words.trim() === '' || undefined} onClick={() => { if (words.trim() !== '') send(words); }}>Give this answer</Button>
        {answer !== null && <Button size="low" onClick={() => { setWords(''); send(''); }}>Take it back</Button>}
        <Button size="low" tone="quiet" onClick={() => setOpen(false)}>Not now</Button>
      </div>
      <Trouble trouble={trouble} />
    </div>
  );
}
