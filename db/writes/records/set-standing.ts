import type { Transaction } from '@/db/client';
import { recordStandings } from '@/db/schema/records';
import type { RecordStanding } from '@/lib/badges/standing';
import { isSignedIn } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';

/** How a record stands from now on, and why; what it stood as before is kept. */
export async function setStanding(tx: Transaction, grant: SubmissionGrant<'record.recheck'>, now: { readonly recordId: string; readonly standing: RecordStanding; readonly reason: string }): Promise<void> {
  await tx.insert(recordStandings).values({ ...now, setBy: isSignedIn(grant.actor) ? grant.actor.userId : null });
}
