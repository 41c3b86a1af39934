import { and, eq, ne, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { runStops } from '@/db/schema/run-stops';
import { runs } from '@/db/schema/runs';
import type { SubmissionGrant } from '@/lib/policy/grant';

/**
 * The first word counts; a second says the same. The service has seen to it that the run is the asker's; whatever
 * it saw, no official run and none of another submission takes the word.
 */
export async function askStop(tx: Transaction, grant: SubmissionGrant<'submission.stop-run'>, runId: string): Promise<void> {
  const stoppable = tx
    .select({ runId: runs.id, askedAt: sql<Date>`now()`.as('asked_at') })
    .from(runs)
    .where(and(eq(runs.id, runId), eq(runs.submissionId, grant.submissionId), ne(runs.kind, 'official')));
  await tx.insert(runStops).select(stoppable).onConflictDoNothing();
}
