import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { comments } from '@/db/schema/comments';
import { threads } from '@/db/schema/threads';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import type { Anchor, AnchoredNumber } from '@/lib/reviews/anchors';
import type { Closing, Side, ThreadKind, ThreadState, ThreadVisibility } from '@/lib/reviews/threads';

export interface NewThread {
  readonly kind: ThreadKind;
  readonly visibility: ThreadVisibility;
  readonly anchor: Anchor;
  readonly anchored: AnchoredNumber;
  readonly openedOnRevision: number;
}
export interface NewComment {
  readonly side: Side;
  readonly body: string;
  readonly variationId: string | null;
}

type MaySpeak = SubmissionGrant<'review.open-thread'> | SubmissionGrant<'review.comment'>;

const speaker = (grant: SubmissionGrant): string => {
  const userId = userIdOf(grant.actor);
  if (userId === null) throw new Error('a comment needs a writer');
  return userId;
};

export async function openThread(tx: Transaction, grant: SubmissionGrant<'review.open-thread'>, thread: NewThread): Promise<string> {
  const [made] = await tx
    .insert(threads)
    .values({ submissionId: grant.submissionId, openedBy: speaker(grant), ...thread })
    .returning({ id: threads.id });
  if (!made) throw new Error('the database gave no row back');
  return made.id;
}

/** Undefined when the variation is attached elsewhere already. */
export async function addComment(tx: Transaction, grant: MaySpeak, threadId: string, comment: NewComment): Promise<string | undefined> {
  const [made] = await tx
    .insert(comments)
    .values({ threadId, writerId: speaker(grant), ...comment })
    .onConflictDoNothing({ target: comments.variationId })
    .returning({ id: comments.id });
  return made?.id;
}

/** False when the thread is closed, or never was in this submission. */
export async function moveOpenThread(tx: Transaction, grant: SubmissionGrant<'review.comment'>, threadId: string, to: ThreadState): Promise<boolean> {
  const moved = await tx
    .update(threads)
    .set({ state: to })
    .where(and(eq(threads.id, threadId), eq(threads.submissionId, grant.submissionId), inArray(threads.state, ['open', 'answered'])))
    .returning({ id: threads.id });
  return moved.length === 1;
}

export async function closeThread(tx: Transaction, grant: SubmissionGrant<'review.set-thread-state'>, threadId: string, closing: Closing): Promise<boolean> {
  const closed = await tx
    .update(threads)
    .set({ state: closing, closedBy: speaker(grant), closedAt: sql`now()` })
    .where(and(eq(threads.id, threadId), eq(threads.submissionId, grant.submissionId), inArray(threads.state, ['open', 'answered'])))
    .returning({ id: threads.id });
  return closed.length === 1;
}
