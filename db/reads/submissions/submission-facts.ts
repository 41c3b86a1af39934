import { and, desc, eq, inArray, isNotNull } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { invitations } from '@/db/schema/invitations';
import { revisions, submissionPeople, submissions } from '@/db/schema/submissions';
import { isUuid } from '@/lib/kernel/uuid';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';

/**
 * The facts by which policy judges, or null when there is no such submission. With `lock` the row
 * is held until the transaction ends, so that two who act at once act one after the other.
 */
export async function findSubmissionFacts(reader: Reader, actor: Actor, submissionId: string, lock = false): Promise<SubmissionFacts | null> {
  if (!isUuid(submissionId)) return null;
  const query = reader
    .select({ state: submissions.state, round: submissions.round, current: submissions.currentRevision })
    .from(submissions)
    .where(eq(submissions.id, submissionId));
  const [row] = lock ? await query.for('update') : await query;
  if (!row) return null;
  const lodged = await lodgedNumbers(reader, submissionId);
  return {
    submissionId,
    state: row.state,
    round: row.round,
    everLodged: lodged.length > 0,
    currentLodged: lodged.includes(row.current),
    ...(await relation(reader, actor, submissionId)),
  };
}

async function lodgedNumbers(reader: Reader, submissionId: string): Promise<readonly number[]> {
  const rows = await reader
    .select({ number: revisions.number })
    .from(revisions)
    .where(and(eq(revisions.submissionId, submissionId), isNotNull(revisions.lodgedAt)));
  return rows.map((r) => r.number);
}

type Relation = Pick<SubmissionFacts, 'authorship' | 'referee' | 'barred'>;

async function relation(reader: Reader, actor: Actor, submissionId: string): Promise<Relation> {
  const userId = userIdOf(actor);
  if (userId === null) return { authorship: null, referee: null, barred: false };
  const [author] = await reader
    .select({ role: submissionPeople.role })
    .from(submissionPeople)
    .where(and(eq(submissionPeople.submissionId, submissionId), eq(submissionPeople.userId, userId)));
  const [invitation] = await reader
    .select({ state: invitations.state })
    .from(invitations)
    .where(and(eq(invitations.submissionId, submissionId), eq(invitations.refereeId, userId), inArray(invitations.state, ['asked', 'accepted'])))
    .orderBy(desc(invitations.invitedAt))
    .limit(1);
  const referee = invitation === undefined ? null : invitation.state === 'accepted' ? 'accepted' : 'invited';
  return { authorship: author?.role ?? null, referee, barred: false };
}
