import { and, asc, desc, eq, isNull, ne, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { decisions } from '@/db/schema/decisions';
import { revisionFiles, storedFiles } from '@/db/schema/files';
import { records, signingRefusals } from '@/db/schema/records';
import { reports } from '@/db/schema/reports';
import { runResults, runs } from '@/db/schema/runs';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';

/** Decisions to enter that are neither signed nor refused, the oldest first. */
export const listUnsigned = (reader: Reader) =>
  reader
    .select({ id: decisions.id })
    .from(decisions)
    .innerJoin(submissions, eq(submissions.id, decisions.submissionId))
    .leftJoin(records, eq(records.decisionId, decisions.id))
    .leftJoin(signingRefusals, eq(signingRefusals.decisionId, decisions.id))
    .where(and(eq(decisions.kind, 'enter'), eq(submissions.state, 'deciding'), isNull(records.id), isNull(signingRefusals.decisionId)))
    .orderBy(asc(decisions.decidedAt));

/**
 * Everything a record is made of, read by the signer's own role and from nothing but tables. Undefined
 * when the decision names a revision or run that is not there.
 */
export async function findSigningFacts(reader: Reader, decisionId: string) {
  const [row] = await reader
    .select({
      decision: decisions,
      state: submissions.state,
      by: users.name,
      revision: revisions,
      run: runs,
      result: runResults.result,
      resultDigest: runResults.resultDigest,
      resultEngine: runResults.engine,
    })
    .from(decisions)
    .innerJoin(submissions, eq(submissions.id, decisions.submissionId))
    .innerJoin(users, eq(users.id, decisions.decidedBy))
    .innerJoin(revisions, and(eq(revisions.submissionId, decisions.submissionId), eq(revisions.number, decisions.revision)))
    .innerJoin(runs, eq(runs.id, decisions.runId))
    .leftJoin(runResults, eq(runResults.runId, runs.id))
    .where(eq(decisions.id, decisionId));
  if (!row) return undefined;
  const submissionId = row.decision.submissionId;
  return {
    ...row,
    files: await listFiles(reader, row.revision.id),
    authors: await listAuthorsAsPrinted(reader, submissionId),
    reports: await countReportsByLetter(reader, submissionId),
    supersedes: await findNewestRecordId(reader, submissionId),
  };
}
export type SigningFacts = NonNullable<Awaited<ReturnType<typeof findSigningFacts>>>;

const listFiles = (reader: Reader, revisionId: string) =>
  reader
    .select({ name: revisionFiles.name, bytes: storedFiles.bytes, sha256: storedFiles.sha256, storageKey: storedFiles.storageKey })
    .from(revisionFiles)
    .innerJoin(storedFiles, eq(storedFiles.id, revisionFiles.fileId))
    .where(eq(revisionFiles.revisionId, revisionId))
    .orderBy(asc(revisionFiles.name));

/** Names, and the iDs that ORCID vouched for; this role reads nothing else of how anybody signs in. */
const linkedOrcid = sql<string | null>`(select min(a.account_id) from accounts a where a.user_id = ${users.id} and a.provider_id = 'orcid')`;

const listAuthorsAsPrinted = (reader: Reader, submissionId: string) =>
  reader
    .select({ name: users.name, orcid: linkedOrcid })
    .from(submissionPeople)
    .innerJoin(users, eq(users.id, submissionPeople.userId))
    .where(eq(submissionPeople.submissionId, submissionId))
    .orderBy(asc(submissionPeople.position));

/** By the referees' letters: this role cannot read who they are. */
async function countReportsByLetter(reader: Reader, submissionId: string): Promise<number> {
  const [row] = await reader
    .select({ n: sql<number>`count(distinct ${reports.slot})::int` })
    .from(reports)
    .where(and(eq(reports.submissionId, submissionId), ne(reports.recommendation, 'outside')));
  return row?.n ?? 0;
}

async function findNewestRecordId(reader: Reader, submissionId: string): Promise<string | null> {
  const [row] = await reader.select({ id: records.id }).from(records).where(eq(records.submissionId, submissionId)).orderBy(desc(records.revision)).limit(1);
  return row?.id ?? null;
}
