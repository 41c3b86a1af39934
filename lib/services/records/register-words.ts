import type { VerdictWord } from '@/lib/pipeline/result';

export const VERDICTS: readonly VerdictWord[] = ['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree'];

/** A filter of the register names a verdict as the result does, or nothing. */
export const isVerdict = (text: string): text is VerdictWord => (VERDICTS as readonly string[]).includes(text);
