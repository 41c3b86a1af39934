import type { Transaction } from '@/db/client';
import { candidateAnswers, type CandidateAnswer } from '@/db/schema/candidate-answers';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';

export interface NewCandidateAnswer {
  readonly revisionId: string;
  readonly runId: string;
  readonly claimId: string;
  readonly candidateId: string;
  readonly reading: number | null;
  readonly clause: string;
  readonly answer: CandidateAnswer;
  readonly note: string;
}

/** One more answer; earlier ones stand. */
export async function recordCandidateAnswer(tx: Transaction, grant: SubmissionGrant<'submission.answer-candidate'>, answer: NewCandidateAnswer): Promise<void> {
  const answeredBy = userIdOf(grant.actor);
  if (answeredBy === null) throw new Error('an answer needs somebody who gives it');
  await tx.insert(candidateAnswers).values({ submissionId: grant.submissionId, answeredBy, ...answer });
}
