import { guessTopics } from '@/lib/engine/guesses/guess';
import { GUESS_CODE } from '@/lib/pipeline/guesses/guess-state';
import type { DraftSheet } from './submission-view';

/** What is proposed is a few words, and its place no longer: both stand in an index row of 2,704 bytes. */
const MOST_LETTERS = 300;
/** A bank of templates may well be asked of one by one. */
export const MOST_GUESS_ANSWERS = 2000;

/** Whether an answer is to something that can be guessed of this sheet: a topic, and a word of a waveform or curve that it has. */
export function namesGuess({ waveforms, noise }: Pick<DraftSheet, 'waveforms' | 'noise'>, { code, where, text }: { readonly code: string; readonly where: string; readonly text: string }): boolean {
  const [empty, part, name] = where.split('/').map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));
  const declared = part === 'waveforms' ? waveforms : part === 'noise' ? noise : {};
  if (where.length > MOST_LETTERS || text.length > MOST_LETTERS) return false;
  return empty === '' && guessTopics.some((topic) => code === `${GUESS_CODE}${topic}`) && name !== undefined && Object.hasOwn(declared, name);
}
