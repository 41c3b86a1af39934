import type { Transaction } from '@/db/client';
import { runResults, type RunStep } from '@/db/schema/runs';
import type { Problem } from '@/lib/kernel/problem';
import type { ReadingsByClaim } from '@/lib/pipeline/explain/offered-readings';
import type { FiguresByClaim, ResultDocument } from '@/lib/pipeline/result';

export type RunFinding = { readonly log: readonly RunStep[] } & (
  | { readonly outcome: 'measured'; readonly engine: string; readonly result: ResultDocument; readonly figures: FiguresByClaim; readonly readings: ReadingsByClaim | null; readonly resultDigest: string }
  | { readonly outcome: 'refused'; readonly engine: string; readonly problems: readonly Problem[] }
);

/** False when the run has a result already: the first to arrive stands. Takes no Grant: only the worker's role can write here. */
export async function recordResult(tx: Transaction, runId: string, finding: RunFinding): Promise<boolean> {
  const written = await tx.insert(runResults).values({ runId, ...finding }).onConflictDoNothing().returning({ runId: runResults.runId });
  return written.length === 1;
}
