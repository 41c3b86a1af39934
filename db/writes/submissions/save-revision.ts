import { and, eq, exists, inArray, isNull, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { revisions, submissions } from '@/db/schema/submissions';
import type { SubmissionGrant } from '@/lib/policy/grant';

export interface RevisionChange {
  readonly title: string;
  readonly statement: string;
  readonly sheet: unknown;
}

/** The new version number, or undefined when the revision is lodged or no longer at the version the edit was made on. */
export async function saveRevision(
  tx: Transaction,
  grant: SubmissionGrant<'submission.edit'>,
  at: { readonly revisionId: string; readonly version: number },
  change: RevisionChange,
): Promise<number | undefined> {
  const stillOpen = tx
    .select({ one: sql`1` })
    .from(submissions)
    .where(and(eq(submissions.id, grant.submissionId), inArray(submissions.state, [...grant.states])));
  const [saved] = await tx
    .update(revisions)
    .set({ ...change, version: sql`${revisions.version} + 1`, updatedAt: sql`now()` })
    .where(and(eq(revisions.id, at.revisionId), eq(revisions.submissionId, grant.submissionId), eq(revisions.version, at.version), isNull(revisions.lodgedAt), exists(stillOpen)))
    .returning({ version: revisions.version });
  if (saved) await tx.update(submissions).set({ title: change.title, updatedAt: sql`now()` }).where(eq(submissions.id, grant.submissionId));
  return saved?.version;
}
