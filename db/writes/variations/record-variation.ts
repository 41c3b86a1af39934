import { and, eq } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { variations, variationSharings, type VariationChanges } from '@/db/schema/variations';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';

/** The nil UUID is nobody's. */
const NOBODY = '00000000-0000-0000-0000-000000000000';

export interface NewVariation {
  readonly runId: string;
  readonly revisionId: string;
  /** The run beside whose numbers it stands. */
  readonly baseRunId: string;
  readonly claimId: string;
  readonly changes: VariationChanges;
  readonly note: string;
}

export async function recordVariation(tx: Transaction, grant: SubmissionGrant<'submission.vary'>, variation: NewVariation): Promise<string> {
  const requestedBy = userIdOf(grant.actor);
  if (requestedBy === null) throw new Error('a variation needs somebody who asked');
  const [made] = await tx
    .insert(variations)
    .values({ submissionId: grant.submissionId, requestedBy, ...variation })
    .returning({ id: variations.id });
  if (!made) throw new Error('the database gave no row back');
  return made.id;
}

/** Opens the owner's variation to whoever has its link, or shuts it; the last word counts. False when it is not theirs. */
export async function recordSharing(tx: Transaction, grant: SubmissionGrant<'submission.share-variation'>, variationId: string, readable: boolean): Promise<boolean> {
  const [own] = await tx
    .select({ id: variations.id })
    .from(variations)
    .where(and(eq(variations.id, variationId), eq(variations.submissionId, grant.submissionId), eq(variations.requestedBy, userIdOf(grant.actor) ?? NOBODY)));
  if (!own) return false;
  await tx.insert(variationSharings).values({ variationId: own.id, readable });
  return true;
}
