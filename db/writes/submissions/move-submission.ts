import { and, eq, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { submissions } from '@/db/schema/submissions';
import type { SubmissionAction } from '@/lib/policy/actions';
import type { SubmissionGrant } from '@/lib/policy/grant';
import type { SubmissionState } from '@/lib/policy/submission-state';

interface Move {
  readonly to: SubmissionState;
  readonly round?: number;
  readonly currentRevision?: number;
}

/**
 * Moves a submission out of the state in which the grant was given. False when it is no longer in it:
 * somebody else was quicker, and the caller answers *conflict*.
 */
export async function moveSubmission(tx: Transaction, grant: SubmissionGrant<SubmissionAction>, move: Move): Promise<boolean> {
  if (grant.seen === null) throw new Error('a grant without a state cannot move a submission');
  const moved = await tx
    .update(submissions)
    .set({
      state: move.to,
      stateChangedAt: sql`now()`,
      updatedAt: sql`now()`,
      ...(move.round !== undefined && { round: move.round }),
      ...(move.currentRevision !== undefined && { currentRevision: move.currentRevision }),
    })
    .where(and(eq(submissions.id, grant.submissionId), eq(submissions.state, grant.seen)))
    .returning({ id: submissions.id });
  return moved.length === 1;
}
