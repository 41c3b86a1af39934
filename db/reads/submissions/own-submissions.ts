import { and, desc, eq, inArray, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { submissionPeople, submissions } from '@/db/schema/submissions';

/** Verdict words of the newest finished check or official run, without carrying the whole result. */
const verdicts = sql<{ claim: string; verdict: string }[] | null>`(
  select json_agg(json_build_object('claim', c.value->>'id', 'verdict', c.value->>'verdict') order by c.ordinality)
    from (select r.id, rr.result from runs r join run_results rr on rr.run_id = r.id
           where r.submission_id = ${submissions.id} and r.kind in ('check', 'official') and rr.result is not null
           order by rr.finished_at desc limit 1) latest,
         json_array_elements(latest.result->'claims') with ordinality c)`;

/** In the order of making, which never changes under a reader who pages. */
export const listOwnSubmissionIds = (reader: Reader, userId: string) =>
  reader
    .select({ id: submissions.id })
    .from(submissionPeople)
    .innerJoin(submissions, eq(submissions.id, submissionPeople.submissionId))
    .where(eq(submissionPeople.userId, userId))
    .orderBy(desc(submissions.createdAt), desc(submissions.id));

/** All of them, or those named; the latest change first. */
export const listOwnSubmissions = (reader: Reader, userId: string, ids?: readonly string[]) =>
  reader
    .select({
      id: submissions.id,
      title: submissions.title,
      state: submissions.state,
      round: submissions.round,
      revision: submissions.currentRevision,
      role: submissionPeople.role,
      updatedAt: submissions.updatedAt,
      verdicts,
    })
    .from(submissionPeople)
    .innerJoin(submissions, eq(submissions.id, submissionPeople.submissionId))
    .where(and(eq(submissionPeople.userId, userId), ids && inArray(submissions.id, [...ids])))
    .orderBy(desc(submissions.updatedAt));
