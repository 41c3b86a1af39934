import type { Transaction } from '@/db/client';
import { variations, type VariationChanges } from '@/db/schema/variations';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';

export interface NewVariation {
  readonly runId: string;
  readonly revisionId: string;
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
