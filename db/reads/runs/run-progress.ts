import { and, eq, inArray } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { runProgress, runs } from '@/db/schema/runs';

/** Runs of one submission that are still to come or under way, or the one named. */
export const listProgress = (reader: Reader, submissionId: string) =>
  reader
    .select({ runId: runs.id, kind: runs.kind, state: runProgress.state, fraction: runProgress.fraction, doing: runProgress.doing })
    .from(runProgress)
    .innerJoin(runs, eq(runs.id, runProgress.runId))
    .where(and(eq(runs.submissionId, submissionId), inArray(runProgress.state, ['queued', 'running'])));

export async function findProgress(reader: Reader, runId: string) {
  const [row] = await reader
    .select({ runId: runs.id, kind: runs.kind, state: runProgress.state, fraction: runProgress.fraction, doing: runProgress.doing })
    .from(runProgress)
    .innerJoin(runs, eq(runs.id, runProgress.runId))
    .where(eq(runs.id, runId));
  return row;
}
