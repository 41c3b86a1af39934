'use client';
import Link from 'next/link';
import { useId, type ReactNode } from 'react';
import { conventionHref } from '@/app/_ui/claim/convention-words';
import { confidenceWords, inUse, topicWords } from '@/app/_ui/claim/guess-words';
import { Button } from '@/app/_ui/primitives/button';
import { classes } from '@/app/_ui/primitives/classes';
import { Disclosure } from '@/app/_ui/primitives/disclosure';
import { Tag } from '@/app/_ui/primitives/tag';
import { guessState, type GuessState } from '@/lib/pipeline/guesses/guess-state';
import type { SheetChange, SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';

/** What a guess may be answered with, and whether it was. */
export interface GuessDesk {
  readonly guesses: readonly SheetGuess[];
  readonly answerTo: (guess: SheetGuess) => string | null;
  readonly onTake: (guess: SheetGuess) => void;
  /** Several at once: what nobody declared and the data bear out. */
  readonly onTakeAll: (guesses: readonly SheetGuess[]) => void;
  /** The authors' word; an empty one asks again. */
  readonly onAnswer: (guess: SheetGuess, words: string) => void;
  readonly busy: boolean;
}

const written = ({ field, value }: SheetChange): string => {
  const word = field.split('/').at(-1) ?? '';
  return value === null ? `${word} taken out` : `${word} ${Array.isArray(value) ? value.join(' ') : typeof value === 'object' ? Object.keys(value).join(' ') : value}`;
};

/** Guesses about one waveform or curve, on its own card: first what is asked, then what was settled. */
export function GuessList({ part, name, desk }: { readonly part: SheetGuess['part']; readonly name: string; readonly desk: GuessDesk }) {
  const heading = useId();
  const of = desk.guesses.filter((guess) => guess.part === part && guess.name === name).map((guess) => ({ guess, state: guessState(guess, desk.answerTo(guess) !== null) }));
  if (of.length === 0) return null;
  const asked = of.filter(({ state }) => state === 'unanswered' || state === 'contradicted');
  const alike = asked.flatMap(({ guess, state }) => (state === 'unanswered' && guess.agrees && guess.changes !== null && guess.changes.length > 0 ? [guess] : []));
  const settled = of.filter(({ state }) => !asked.some((one) => one.state === state));
  return (
    <section aria-labelledby={heading} className="grid gap-2 border-t border-hair pt-3">
      <h3 id={heading} className="text-small font-semibold">What the data say of {name}</h3>
      {asked.length > 0 && <ul className="grid gap-0">{asked.map(({ guess, state }) => <Asked key={`${guess.field} ${guess.about}`} guess={guess} state={state} desk={desk} />)}</ul>}
      {alike.length > 1 && <div><Button size="low" onClick={() => desk.onTakeAll(alike)}>Confirm the {alike.length} of {name} that the data bear out</Button></div>}
      {settled.length > 0 && (
        <Disclosure summary={`${settled.length} settled: ${settled.map(({ guess }) => topicWords[guess.about].toLowerCase()).join(', ')}`}>
          <ul className="grid gap-3">{settled.map(({ guess, state }) => <Settled key={`${guess.field} ${guess.about}`} guess={guess} state={state} desk={desk} />)}</ul>
        </Disclosure>
      )}
    </section>
  );
}

interface OneProps {
  readonly guess: SheetGuess;
  readonly state: GuessState;
  readonly desk: GuessDesk;
}

function Asked({ guess, state, desk }: OneProps) {
  const { about, agrees, changes, name } = guess;
  const declared = state === 'contradicted';
  const steps = changes ?? [];
  const can = steps.length > 0;
  const of = `${topicWords[about].toLowerCase()} of ${name}`;
  return (
    <li className={classes('edge border-t border-hair py-3 pl-3 text-ui first:border-t-0', agrees ? 'edge-note' : declared ? 'edge-ask' : 'edge-look')}>
      <Said guess={guess}><Tag>{declared ? 'declared' : 'assumed'}</Tag></Said>
      <p className="mt-1">{can ? `${declared ? 'Taking it' : 'Confirming it'} writes: ${steps.map(written).join(', ')}.` : 'No word of a sheet says this: mend the file, or leave it and it stays as it is.'}</p>
      <div className="mt-2 flex flex-wrap gap-2">
        {can && <Button size="low" aria-label={`${declared ? 'Take what the data say' : 'Confirm'}: ${of}`} onClick={() => desk.onTake(guess)}>{declared ? 'Take what the data say' : 'Confirm'}</Button>}
        <Button size="low" busy={desk.busy ? 'Keeping it' : null} aria-label={`${declared ? 'Keep what I declared' : 'Not so'}: ${of}`} onClick={() => desk.onAnswer(guess, declared ? 'It stays as declared.' : 'Not so.')}>{declared ? 'Keep what I declared' : 'Not so'}</Button>
      </div>
    </li>
  );
}

const settledWords: Partial<Record<GuessState, string>> = { confirmed: 'declared, and the data agree', 'set-aside': 'set aside; it stays assumed', kept: 'kept as declared' };

function Settled({ guess, state, desk }: OneProps) {
  return (
    <li className="text-ui">
      <Said guess={guess}><Tag>{settledWords[state]}</Tag></Said>
      {state !== 'confirmed' && <Button size="low" tone="quiet" className="-ml-2" aria-label={`Ask again: ${topicWords[guess.about].toLowerCase()} of ${guess.name}`} onClick={() => desk.onAnswer(guess, '')}>Ask again</Button>}
    </li>
  );
}

/** In use, said by the data, why, and how surely. */
function Said({ guess, children }: { readonly guess: SheetGuess; readonly children: ReactNode }) {
  const { about, agrees, proposed, reason, confidence, convention } = guess;
  return (
    <>
      <p className="flex flex-wrap items-center gap-x-2 gap-y-1"><b>{topicWords[about]}</b> {children}</p>
      <p className="[overflow-wrap:anywhere]">In use: {inUse(guess)}. The data {agrees ? 'agree' : `say: ${proposed}`}.</p>
      <p className="text-ink-2 [overflow-wrap:anywhere]">{reason}</p>
      <p>Confidence: {confidenceWords(confidence)}, a judgement.</p>
      {convention && <p className="text-small text-ink-2"><Link href={conventionHref(convention.id)} className="inline-flex min-h-8 items-center gap-1.5"><span className="font-code text-code">{convention.id}</span> {convention.title}</Link> {convention.sentence}</p>}
    </>
  );
}
