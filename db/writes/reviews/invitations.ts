import { and, eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { assignments, invitations } from '@/db/schema/invitations';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import type { ConflictFlag } from '@/lib/reviews/conflicts';

const whoActs = (grant: SubmissionGrant): string => {
  const userId = userIdOf(grant.actor);
  if (userId === null) throw new Error('a review act needs somebody who acts');
  return userId;
};

/** The editor who holds the submission from now on. */
export async function takeSubmission(tx: Transaction, grant: SubmissionGrant<'review.take'>): Promise<void> {
  const editorId = whoActs(grant);
  await tx
    .insert(assignments)
    .values({ submissionId: grant.submissionId, editorId })
    .onConflictDoUpdate({ target: assignments.submissionId, set: { editorId, takenAt: sql`now()` } });
}

/** Who asks the first referee holds the submission, unless somebody does already. */
export async function takeIfFree(tx: Transaction, grant: SubmissionGrant<'review.invite'>): Promise<void> {
  await tx.insert(assignments).values({ submissionId: grant.submissionId, editorId: whoActs(grant) }).onConflictDoNothing({ target: assignments.submissionId });
}

export interface NewInvitation {
  readonly refereeId: string;
  readonly slot: string;
  readonly flags: readonly ConflictFlag[];
  readonly reason: string | null;
}

/** Undefined when this person is asked already, or the letter is taken: somebody else was quicker. */
export async function inviteReferee(tx: Transaction, grant: SubmissionGrant<'review.invite'>, invitation: NewInvitation): Promise<string | undefined> {
  const [made] = await tx
    .insert(invitations)
    .values({ submissionId: grant.submissionId, invitedBy: whoActs(grant), ...invitation })
    .onConflictDoNothing()
    .returning({ id: invitations.id });
  return made?.id;
}

/** False when it was answered, withdrawn or never there. */
export async function answerInvitation(
  tx: Transaction,
  grant: SubmissionGrant<'review.answer-invitation'>,
  invitationId: string,
  answer: { readonly state: 'accepted' | 'declined'; readonly statement: string | null },
): Promise<boolean> {
  const answered = await tx
    .update(invitations)
    .set({ state: answer.state, answeredAt: sql`now()`, statedNoConflict: answer.statement })
    .where(
      and(
        eq(invitations.id, invitationId),
        eq(invitations.submissionId, grant.submissionId),
        eq(invitations.refereeId, whoActs(grant)),
        eq(invitations.state, 'asked'),
      ),
    )
    .returning({ id: invitations.id });
  return answered.length === 1;
}

/** Takes an invitation back, or relieves a referee of a report that is not coming. */
export async function withdrawInvitation(
  tx: Transaction,
  grant: SubmissionGrant<'review.withdraw-invitation'>,
  invitationId: string,
  from: 'asked' | 'accepted',
): Promise<boolean> {
  const to = from === 'asked' ? 'lapsed' : 'relieved';
  const gone = await tx
    .update(invitations)
    .set({ state: to, answeredAt: sql`coalesce(${invitations.answeredAt}, now())` })
    .where(and(eq(invitations.id, invitationId), eq(invitations.submissionId, grant.submissionId), eq(invitations.state, from)))
    .returning({ id: invitations.id });
  return gone.length === 1;
}
