import { z } from 'zod';
import { CANDIDATE_ANSWERS } from '@/db/schema/candidate-answers';

/** What the authors say to a candidate: the latest word, with the run it was given on. */
export interface CandidateAnswerView {
  readonly runId: string;
  /** Revision whose run offered the candidate. */
  readonly revision: number;
  readonly claim: string;
  readonly candidate: string;
  /** Which reading of the class; null where the answer is about all. */
  readonly reading: number | null;
  readonly clause: string;
  readonly answer: (typeof CANDIDATE_ANSWERS)[number];
  readonly note: string;
  readonly answeredAt: string;
}

export const candidateAnswerSchema = z
  .object({
    runId: z.string(),
    revision: z.int(),
    claim: z.string(),
    candidate: z.string(),
    reading: z.int().nullable(),
    clause: z.string(),
    answer: z.enum(CANDIDATE_ANSWERS),
    note: z.string(),
    answeredAt: z.string(),
  })
  .meta({ id: 'CandidateAnswer', description: 'The authors’ word on a reading under which a claim would agree. It changes no number.' });

/** The latest of the answers to each candidate; a candidate of a later run that is the same reading keeps its answer in sight. */
export function latestAnswers<T extends { readonly claim: string; readonly candidate: string; readonly runId: string }>(answers: readonly T[]): T[] {
  return [...new Map(answers.map((answer) => [`${answer.runId}|${answer.claim}|${answer.candidate}`, answer])).values()];
}

export const answerToCandidate = (answers: readonly CandidateAnswerView[], runId: string | null, claim: string, candidate: string): CandidateAnswerView | null =>
  answers.findLast((answer) => answer.runId === runId && answer.claim === claim && answer.candidate === candidate) ?? null;
