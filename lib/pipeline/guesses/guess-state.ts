import type { SheetGuess } from './sheet-guess';

/**
 * How a guess stands with the authors: *unanswered* leaves the word assumed; *confirmed* is a declaration that the data
 * bear out; *contradicted* is one that they do not; the other two were answered and are not asked again.
 */
export type GuessState = 'unanswered' | 'confirmed' | 'contradicted' | 'set-aside' | 'kept';

export const guessState = ({ standing, agrees }: Pick<SheetGuess, 'standing' | 'agrees'>, isAnswered: boolean): GuessState => {
  if (standing === 'declared') return agrees ? 'confirmed' : isAnswered ? 'kept' : 'contradicted';
  return isAnswered ? 'set-aside' : 'unanswered';
};

/** Answers to guesses stand beside those to findings, under a code of their own. */
export const GUESS_CODE = 'guess/';

/** What an answer is given to: as long as the data say the same of the same word, it is not asked again. */
export const namedGuess = ({ about, field, proposed }: Pick<SheetGuess, 'about' | 'field' | 'proposed'>): { readonly code: string; readonly where: string; readonly text: string } => ({ code: `${GUESS_CODE}${about}`, where: field, text: proposed });
