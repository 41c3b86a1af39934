import { and, asc, count, desc, eq, inArray, isNull, ne, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { assignments, invitations } from '@/db/schema/invitations';
import { reports } from '@/db/schema/reports';
import { submissionPeople, submissions } from '@/db/schema/submissions';

/** Everyone ever asked, in the order of asking: for the editor's eyes, and for drawing a free letter. */
export const listInvitations = (reader: Reader, submissionId: string) =>
  reader
    .select({
      id: invitations.id,
      refereeId: invitations.refereeId,
      name: users.name,
      email: users.email,
      affiliation: users.affiliation,
      slot: invitations.slot,
      state: invitations.state,
      flags: invitations.flags,
      reason: invitations.reason,
      invitedAt: invitations.invitedAt,
      answeredAt: invitations.answeredAt,
    })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.refereeId))
    .where(eq(invitations.submissionId, submissionId))
    .orderBy(asc(invitations.invitedAt));
export type InvitationRow = Awaited<ReturnType<typeof listInvitations>>[number];

export async function findInvitation(reader: Reader, invitationId: string) {
  const [row] = await reader
    .select({ id: invitations.id, submissionId: invitations.submissionId, refereeId: invitations.refereeId, state: invitations.state, slot: invitations.slot })
    .from(invitations)
    .where(eq(invitations.id, invitationId));
  return row;
}

/** The letter under which somebody referees, if they do. */
export async function findSlot(reader: Reader, submissionId: string, userId: string): Promise<string | undefined> {
  const [row] = await reader
    .select({ slot: invitations.slot })
    .from(invitations)
    .where(and(eq(invitations.submissionId, submissionId), eq(invitations.refereeId, userId), eq(invitations.state, 'accepted')));
  return row?.slot;
}

/** Invitations to one person, newest first, with what they need to judge a conflict. */
export const listInvitationsTo = (reader: Reader, userId: string) =>
  reader
    .select({
      id: invitations.id,
      submissionId: invitations.submissionId,
      title: submissions.title,
      state: invitations.state,
      submissionState: submissions.state,
      round: submissions.round,
      editor: users.name,
      invitedAt: invitations.invitedAt,
    })
    .from(invitations)
    .innerJoin(submissions, eq(submissions.id, invitations.submissionId))
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(eq(invitations.refereeId, userId))
    .orderBy(desc(invitations.invitedAt));

/** People who could be asked: every account but those on the submission and those asked already. */
export const listPossibleReferees = (reader: Reader, submissionId: string) =>
  reader
    .select({ id: users.id, name: users.name, email: users.email, affiliation: users.affiliation })
    .from(users)
    .leftJoin(submissionPeople, and(eq(submissionPeople.userId, users.id), eq(submissionPeople.submissionId, submissionId)))
    .leftJoin(
      invitations,
      and(eq(invitations.refereeId, users.id), eq(invitations.submissionId, submissionId), inArray(invitations.state, ['asked', 'accepted'])),
    )
    .where(and(isNull(submissionPeople.userId), isNull(invitations.id), eq(users.emailVerified, true), ne(users.role, 'administrator')))
    .orderBy(asc(users.name));

export async function findPerson(reader: Reader, userId: string) {
  const [row] = await reader.select({ id: users.id, name: users.name, email: users.email }).from(users).where(eq(users.id, userId));
  return row;
}

/** Accepted reviews that still owe a report, by referee, over all submissions. */
export async function countOpenReviews(reader: Reader): Promise<ReadonlyMap<string, number>> {
  const rows = await reader
    .select({ refereeId: invitations.refereeId, n: count() })
    .from(invitations)
    .innerJoin(submissions, eq(submissions.id, invitations.submissionId))
    .leftJoin(
      reports,
      and(eq(reports.submissionId, invitations.submissionId), eq(reports.refereeId, invitations.refereeId), eq(reports.round, submissions.round)),
    )
    .where(and(eq(invitations.state, 'accepted'), inArray(submissions.state, ['triage', 'in-review']), isNull(reports.id)))
    .groupBy(invitations.refereeId);
  return new Map(rows.map((row) => [row.refereeId, row.n]));
}

export async function findAssignment(reader: Reader, submissionId: string) {
  const [row] = await reader
    .select({ editorId: assignments.editorId, name: users.name, email: users.email, takenAt: assignments.takenAt })
    .from(assignments)
    .innerJoin(users, eq(users.id, assignments.editorId))
    .where(eq(assignments.submissionId, submissionId));
  return row;
}

/** Accepted, and how many of them reported in this round: what the state machine's guards ask. */
export async function countReferees(reader: Reader, submissionId: string, round: number) {
  const [row] = await reader
    .select({
      accepted: sql<number>`count(*)::int`,
      reported: sql<number>`count(${reports.id})::int`,
    })
    .from(invitations)
    .leftJoin(reports, and(eq(reports.submissionId, invitations.submissionId), eq(reports.refereeId, invitations.refereeId), eq(reports.round, round)))
    .where(and(eq(invitations.submissionId, submissionId), eq(invitations.state, 'accepted')));
  return row ?? { accepted: 0, reported: 0 };
}
