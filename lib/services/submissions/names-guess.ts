import { guessTopics } from '@/lib/engine/guesses/guess';
import { GUESS_CODE } from '@/lib/pipeline/guesses/guess-state';
import type { DraftSheet } from './submission-view';

/** Whether an answer is to something that can be guessed of this sheet: a topic, and a word of a waveform or curve that it has. */
export function namesGuess({ waveforms, noise }: Pick<DraftSheet, 'waveforms' | 'noise'>, { code, where }: { readonly code: string; readonly where: string }): boolean {
  const [empty, part, name] = where.split('/').map((step) => step.replaceAll('~1', '/').replaceAll('~0', '~'));
  const declared = part === 'waveforms' ? waveforms : part === 'noise' ? noise : {};
  return empty === '' && guessTopics.some((topic) => code === `${GUESS_CODE}${topic}`) && name !== undefined && Object.hasOwn(declared, name);
}
