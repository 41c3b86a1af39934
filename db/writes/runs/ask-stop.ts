import type { Transaction } from '@/db/client';
import { runStops } from '@/db/schema/run-stops';
import type { SubmissionGrant } from '@/lib/policy/grant';

/** The first word counts; a second says the same. The service has seen to it that the run is the asker's. */
export async function askStop(tx: Transaction, _grant: SubmissionGrant<'submission.stop-run'>, runId: string): Promise<void> {
  await tx.insert(runStops).values({ runId }).onConflictDoNothing();
}
