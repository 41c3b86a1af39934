import type { AnsweredGuess } from '@/app/_ui/claim/guess-words';
import { guessState, namedGuess } from '@/lib/pipeline/guesses/guess-state';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';
import { answerTo, type FindingAnswer } from '@/lib/services/submissions/finding-answers';

/** Guesses of a result with the authors' answers; results of earlier versions have none. */
export const answeredGuesses = (guesses: readonly SheetGuess[] | undefined, answers: readonly FindingAnswer[]): readonly AnsweredGuess[] =>
  (guesses ?? []).map((guess) => {
    const answer = answerTo(answers, namedGuess(guess));
    return { guess, answer, state: guessState(guess, answer !== null) };
  });
