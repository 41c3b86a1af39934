import { eq } from 'drizzle-orm';
import { database, type Database } from '@/db/client';
import { findLatestRun } from '@/db/reads/runs/run';
import { findRevision } from '@/db/reads/submissions/revision';
import { runProgress, runs } from '@/db/schema/runs';
import { recordResult } from '@/db/writes/runs/record-result';
import { endProgress } from '@/db/writes/runs/tell-progress';
import type { ResultDocument, ResultPoint } from '@/lib/pipeline/result';
import { digestOf } from '@/lib/services/runs/inputs-digest';

/** An invented engine before this one, whose numbers were a little off. */
const OLD_ENGINE = '0.9.0';

/** How far the old engine was off, for one point. */
export type OffBy = (point: ResultPoint) => number;

/** Stores what the old engine is said to have found for a lodged revision, so that there is something to measure again. */
export async function storeOldResult(worker: Database, submissionId: string, offBy: OffBy): Promise<void> {
  const revision = await findRevision(database(), submissionId, 1);
  const newer = revision && (await findLatestRun(database(), revision.id, 'official'));
  if (!newer?.result) throw new Error('there is no official result to make an old one of');
  const [{ id: _id, requestedAt: _at, ...asked } = { id: '', requestedAt: null }] = await database().select().from(runs).where(eq(runs.id, newer.id));
  const [made] = await database().insert(runs).values({ ...(asked as typeof runs.$inferInsert), engine: OLD_ENGINE }).returning({ id: runs.id });
  if (!made) throw new Error('the old run was not stored');
  await database().insert(runProgress).values({ runId: made.id });
  const result = aged(newer.result, offBy);
  await worker.transaction(async (tx) => {
    await recordResult(tx, made.id, { outcome: 'measured', engine: OLD_ENGINE, result, figures: {}, readings: null, resultDigest: digestOf(result), log: [] });
    await endProgress(tx, { runId: made.id, submissionId }, { state: 'finished' });
  });
}

const aged = (result: ResultDocument, offBy: OffBy): ResultDocument => ({ ...result, engine: OLD_ENGINE, claims: result.claims.map((claim) => ({ ...claim, candidates: [], points: claim.points.map((point) => agedPoint(point, offBy(point))) })) });

function agedPoint(point: ResultPoint, by: number): ResultPoint {
  const moved = (x: number | null): number | null => (x === null ? null : x + by);
  return { ...point, value: moved(point.value), apart: moved(point.apart), routes: { ...point.routes, A: moved(point.routes.A), B: moved(point.routes.B) } };
}
