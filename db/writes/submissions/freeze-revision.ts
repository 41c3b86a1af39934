import { and, eq, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { revisions } from '@/db/schema/submissions';
import type { SubmissionGrant } from '@/lib/policy/grant';

/** From here on no role can change this revision. False when it was frozen before. */
export async function freezeRevision(tx: Transaction, grant: SubmissionGrant<'submission.lodge'>, revisionId: string): Promise<boolean> {
  const frozen = await tx
    .update(revisions)
    .set({ lodgedAt: sql`now()` })
    .where(and(eq(revisions.id, revisionId), eq(revisions.submissionId, grant.submissionId), isNull(revisions.lodgedAt)))
    .returning({ id: revisions.id });
  return frozen.length === 1;
}
