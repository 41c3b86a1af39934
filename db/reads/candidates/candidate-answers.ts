import { asc, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { candidateAnswers } from '@/db/schema/candidate-answers';
import { revisions } from '@/db/schema/submissions';

/** Every answer given on a submission, in the order in which they were given. */
export const listCandidateAnswers = (reader: Reader, submissionId: string) =>
  reader
    .select({
      runId: candidateAnswers.runId,
      revision: revisions.number,
      claimId: candidateAnswers.claimId,
      candidateId: candidateAnswers.candidateId,
      reading: candidateAnswers.reading,
      clause: candidateAnswers.clause,
      answer: candidateAnswers.answer,
      note: candidateAnswers.note,
      answeredAt: candidateAnswers.answeredAt,
    })
    .from(candidateAnswers)
    .innerJoin(revisions, eq(revisions.id, candidateAnswers.revisionId))
    .where(eq(candidateAnswers.submissionId, submissionId))
    .orderBy(asc(candidateAnswers.answeredAt), asc(candidateAnswers.id));
