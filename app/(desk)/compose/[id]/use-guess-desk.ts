'use client';
import { topicWords } from '@/app/_ui/claim/guess-words';
import { say } from '@/app/_ui/primitives/toaster';
import { namedGuess } from '@/lib/pipeline/guesses/guess-state';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import { answerTo, type FindingAnswer } from '@/lib/services/submissions/finding-answers';
import { useAct } from '../../use-act';
import { answerFinding } from '../actions';
import type { GuessDesk } from './guess-list';
import { takeGuess } from './take-guess';
import type { ComposerForm } from './waveform-part';

interface DeskProps {
  readonly id: string;
  readonly form: ComposerForm;
  readonly guesses: readonly SheetGuess[];
  readonly answers: readonly FindingAnswer[];
  readonly saveNow: () => Promise<boolean>;
}

/** The author's answers to guesses: what is confirmed goes into the form, what is not so is kept beside the draft. */
export function useGuessDesk({ id, form, guesses, answers, saveNow }: DeskProps): { readonly desk: GuessDesk; readonly trouble: readonly string[] | null } {
  const { busy, trouble, run } = useAct(answerFinding);
  const onTakeAll = (taken: readonly SheetGuess[]) => {
    const undo = takeGuess(taken.flatMap(({ changes }) => changes ?? []), form);
    const what = taken.map(({ about }) => topicWords[about]).join(', ');
    say(`${what} of ${taken[0]?.name ?? ''}: declared as the data say.`, undo);
  };
  const onTake = (guess: SheetGuess) => onTakeAll([guess]);
  const onAnswer = async (guess: SheetGuess, words: string) => {
    // The server knows only names that were saved.
    if (await saveNow()) await run({ id, finding: { ...namedGuess(guess), answer: words } });
  };
  return { desk: { guesses, answerTo: (guess) => answerTo(answers, namedGuess(guess)), onTake, onTakeAll, onAnswer: (guess, words) => void onAnswer(guess, words), busy }, trouble };
}
