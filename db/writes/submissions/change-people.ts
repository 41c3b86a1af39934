import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { submissionPeople } from '@/db/schema/submissions';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';

/** Puts somebody last in the list of authors; undefined when they are in it already or have no confirmed account. */
export async function addCoAuthor(tx: Transaction, grant: SubmissionGrant<'submission.manage-people'>, email: string): Promise<string | undefined> {
  const [person] = await tx.select({ id: users.id }).from(users).where(and(eq(users.email, email.toLowerCase()), eq(users.emailVerified, true)));
  if (!person) return undefined;
  const last = sql<number>`(select coalesce(max(position), 0) + 1 from submission_people where submission_id = ${grant.submissionId})`;
  const [added] = await tx
    .insert(submissionPeople)
    .values({ submissionId: grant.submissionId, userId: person.id, role: 'co-author', position: last })
    .onConflictDoNothing({ target: [submissionPeople.submissionId, submissionPeople.userId] })
    .returning({ userId: submissionPeople.userId });
  return added?.userId;
}

/** What stood in the list of somebody who was taken off it. */
export interface FormerPlace {
  readonly position: number;
  readonly confirmedAt: Date | null;
}

/** The author who lodges stays; anybody else can be taken off while nothing is lodged. */
export async function dropCoAuthor(tx: Transaction, grant: SubmissionGrant<'submission.manage-people'>, userId: string): Promise<FormerPlace | undefined> {
  const [gone] = await tx
    .delete(submissionPeople)
    .where(and(eq(submissionPeople.submissionId, grant.submissionId), eq(submissionPeople.userId, userId), eq(submissionPeople.role, 'co-author')))
    .returning({ position: submissionPeople.position, confirmedAt: submissionPeople.confirmedAt });
  return gone;
}

/** Back to where they stood, with what they had said; nothing when they are in the list again already. */
export async function bringBackCoAuthor(tx: Transaction, grant: SubmissionGrant<'submission.manage-people'>, userId: string, { position, confirmedAt }: FormerPlace): Promise<boolean> {
  const ofThis = sql`select position from submission_people where submission_id = ${grant.submissionId}`;
  // Somebody else may have been named meanwhile and stand there now.
  const free = sql<number>`(case when ${position} in (${ofThis}) then (select max(position) + 1 from (${ofThis}) p) else ${position} end)::int`;
  const back = await tx
    .insert(submissionPeople)
    .values({ submissionId: grant.submissionId, userId, role: 'co-author', position: free, confirmedAt })
    .onConflictDoNothing({ target: [submissionPeople.submissionId, submissionPeople.userId] })
    .returning({ userId: submissionPeople.userId });
  return back.length === 1;
}

/** One's own authorship alone; nobody confirms for another. */
export async function confirmOwnAuthorship(tx: Transaction, grant: SubmissionGrant<'submission.confirm-authorship'>): Promise<boolean> {
  const confirmed = await tx
    .update(submissionPeople)
    .set({ confirmedAt: sql`now()` })
    .where(and(eq(submissionPeople.submissionId, grant.submissionId), eq(submissionPeople.userId, userIdOf(grant.actor) ?? ''), isNull(submissionPeople.confirmedAt)))
    .returning({ userId: submissionPeople.userId });
  return confirmed.length === 1;
}
