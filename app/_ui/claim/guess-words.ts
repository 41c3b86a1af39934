import type { GuessTopic } from '@/lib/engine/guesses/guess';
import type { GuessState } from '@/lib/pipeline/guesses/guess-state';
import type { SheetGuess } from '@/lib/pipeline/guesses/sheet-guess';

export const topicWords: Readonly<Record<GuessTopic, string>> = {
  rotation: 'Sense of rotation',
  'time-unit': 'Unit of time',
  variable: 'Variable',
  normalisation: 'Size of the amplitude',
  'negative-m': 'Modes with m < 0',
  'mass-ratio': 'Mass ratio',
  labels: 'Order of the bodies',
  spin: 'Size of a spin',
  'total-mass': 'Meaning of the total mass',
  'noise-column': 'Meaning of the noise column',
  sided: 'One- or two-sided',
  'curve-frequency': 'Frequency of the curve',
  'curve-version': 'Version of the curve',
};

export const stateWords: Readonly<Record<GuessState, string>> = {
  unanswered: 'assumed, not confirmed',
  confirmed: 'declared, and the data agree',
  contradicted: 'declared, and the data contradict it',
  'set-aside': 'assumed; the authors set the guess aside',
  kept: 'declared and kept by the authors against the data',
};

/** A judgement in words, with its number; the number is no computed probability. */
export function confidenceWords(confidence: number): string {
  const word = confidence >= 0.9 ? 'almost sure' : confidence >= 0.75 ? 'likely' : confidence > 0.5 ? 'more likely than not' : 'as likely as not';
  return `${word}, ${confidence.toFixed(2)}`;
}

export const inUse = ({ value }: Pick<SheetGuess, 'value'>): string => (value === null ? 'not given' : String(value).replace(/^-/, '−'));

/** One guess with what the authors answered to it. */
export interface AnsweredGuess {
  readonly guess: SheetGuess;
  readonly state: GuessState;
  readonly answer: string | null;
}
