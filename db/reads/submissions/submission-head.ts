import { and, asc, desc, eq, isNotNull, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';

export async function getSubmissionHead(reader: Reader, submissionId: string) {
  const [row] = await reader
    .select({
      id: submissions.id,
      title: submissions.title,
      state: submissions.state,
      round: submissions.round,
      currentRevision: submissions.currentRevision,
      ownerId: submissions.ownerId,
      stateChangedAt: submissions.stateChangedAt,
    })
    .from(submissions)
    .where(eq(submissions.id, submissionId));
  if (!row) throw new Error('a submission that policy knows is not there');
  return row;
}

/** The iD that ORCID vouched for when this person linked it. */
const linkedOrcid = sql<string | null>`(select a.account_id from accounts a where a.user_id = ${users.id} and a.provider_id = 'orcid' order by a.created_at limit 1)`;

/** In printed order. */
export const listAuthors = (reader: Reader, submissionId: string) =>
  reader
    .select({ userId: users.id, name: users.name, affiliation: users.affiliation, orcid: linkedOrcid, typedOrcid: users.typedOrcid, role: submissionPeople.role, confirmedAt: submissionPeople.confirmedAt })
    .from(submissionPeople)
    .innerJoin(users, eq(users.id, submissionPeople.userId))
    .where(eq(submissionPeople.submissionId, submissionId))
    .orderBy(asc(submissionPeople.position));

export const listLodgedRevisions = (reader: Reader, submissionId: string) =>
  reader
    .select({ number: revisions.number, lodgedAt: revisions.lodgedAt })
    .from(revisions)
    .where(and(eq(revisions.submissionId, submissionId), isNotNull(revisions.lodgedAt)))
    .orderBy(desc(revisions.number));
