import { z } from 'zod';
import type { Transaction } from '@/db/client';
import { findRun, type RunRow } from '@/db/reads/runs/run';
import { CANDIDATE_ANSWERS } from '@/db/schema/candidate-answers';
import { recordCandidateAnswer } from '@/db/writes/candidates/record-answer';
import type { Candidate, Reading } from '@/lib/explain/candidate';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';

export const namedCandidate = z.strictObject({
  runId: z.uuid({ version: 'v4' }),
  claim: z.string().min(1).max(64),
  candidate: z.string().min(1).max(400),
  /** Place in the candidate's list of readings, from 0. */
  reading: z.int().min(0).max(99).nullable().default(null),
});
export type NamedCandidate = z.output<typeof namedCandidate>;

export const candidateAnswerInput = namedCandidate.extend({
  answer: z.enum(CANDIDATE_ANSWERS),
  note: z.string().max(2000, 'at most 2,000 characters').default('').transform((note) => note.trim()),
});
export type CandidateAnswerInput = z.output<typeof candidateAnswerInput>;

export interface FoundCandidate {
  readonly run: RunRow;
  readonly candidate: Candidate;
  /** Null where the class has several and none was named. */
  readonly reading: Reading | null;
}

/** The candidate in the run that offered it, or why there is none. */
export async function findCandidate(tx: Transaction, submissionId: string, { runId, claim, candidate: id, reading }: NamedCandidate): Promise<Outcome<FoundCandidate>> {
  const run = await findRun(tx, runId);
  if (!run || run.submissionId !== submissionId || run.kind === 'variation') return { ok: false, error: NOT_FOUND };
  const candidate = run.result?.claims.find((one) => one.id === claim)?.candidates?.find((one) => one.id === id);
  if (!candidate) return fail('invalid', `This run offers no such candidate for ${claim}. Look at its result again.`);
  const named = reading ?? (candidate.readings.length === 1 ? 0 : null);
  const found = named === null ? null : (candidate.readings[named] ?? null);
  if (named !== null && found === null) return fail('invalid', `The candidate has ${candidate.readings.length} readings, counted from 0; ${named} is none of them.`);
  return ok({ run, candidate, reading: found });
}

/** *Confirmed*, *not so* or *cannot tell*. Of a class whose members give the same number, *confirmed* names which. */
export function answerCandidate(actor: Actor, submissionId: string, input: CandidateAnswerInput): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.answer-candidate', submissionId }, async ({ tx, grant, note }) => {
    const found = await findCandidate(tx, submissionId, input);
    if (!found.ok) return found;
    const { run, candidate, reading } = found.value;
    if (input.answer === 'confirmed' && reading === null) return fail('invalid', `${candidate.readings.length} readings give the same numbers. Say which of them it was, or answer that you cannot tell.`);
    await recordCandidateAnswer(tx, grant, {
      revisionId: run.revisionId, runId: run.id, claimId: input.claim, candidateId: candidate.id,
      reading: reading === null ? null : candidate.readings.indexOf(reading),
      clause: reading?.clause ?? candidate.readings.map(({ clause }) => clause).join('; or '),
      answer: input.answer, note: input.note,
    });
    note({ claim: input.claim, candidate: candidate.id, answer: input.answer });
    return ok(null);
  });
}
