import { STATE_WORDS, type SubmissionState } from '@/lib/policy/submission-state';

/**
 * The parlour: what people do with a measurement. Rounds, threads, reports and decisions live
 * here as plain data and pure rules; a clock, a random pick and every fact are arguments. Opinion
 * never reaches the numbers: this room reads results and changes none.
 */

/** Only a review has rounds, so only there is one printed. */
export const formatState = (state: SubmissionState, round: number): string =>
  state === 'in-review' ? `${STATE_WORDS[state]} (round ${round})` : STATE_WORDS[state];
