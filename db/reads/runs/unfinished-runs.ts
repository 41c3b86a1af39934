import { and, count, eq, inArray } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { runProgress, runs } from '@/db/schema/runs';
import { submissions } from '@/db/schema/submissions';

/** Checks and official runs of one author's submissions that are not done. */
export async function countUnfinishedRuns(reader: Reader, ownerId: string): Promise<number> {
  const [row] = await reader
    .select({ n: count() })
    .from(runs)
    .innerJoin(runProgress, eq(runProgress.runId, runs.id))
    .innerJoin(submissions, eq(submissions.id, runs.submissionId))
    .where(and(eq(submissions.ownerId, ownerId), inArray(runs.kind, ['check', 'official']), inArray(runProgress.state, ['queued', 'running'])));
  return row?.n ?? 0;
}
