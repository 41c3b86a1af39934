import type { VerdictWord } from '@/lib/pipeline/result';

/** One word for all claims of a submission together. */
export type SubmissionWord = 'all agree' | 'some agree' | 'none agrees' | 'unsettled';

/** Unsettled only when nothing is decided either way; an agreeing claim is never hidden behind an unsettled one. */
export function submissionWord(verdicts: readonly VerdictWord[]): SubmissionWord {
  const agreeing = verdicts.filter((v) => v === 'agrees').length;
  if (agreeing > 0) return agreeing === verdicts.length ? 'all agree' : 'some agree';
  return verdicts.some((v) => v === 'differs') ? 'none agrees' : 'unsettled';
}
