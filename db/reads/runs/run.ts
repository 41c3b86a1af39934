import { and, desc, eq, inArray } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { runProgress, runResults, runs, type RunKind } from '@/db/schema/runs';
import type { ReadingsByClaim } from '@/lib/pipeline/explain/offered-readings';
import { revisions } from '@/db/schema/submissions';

/** All of a run but its figures, which are large and asked for by themselves. */
const columns = {
  id: runs.id,
  submissionId: runs.submissionId,
  revisionId: runs.revisionId,
  kind: runs.kind,
  engine: runs.engine,
  inputsDigest: runs.inputsDigest,
  requestedAt: runs.requestedAt,
  state: runProgress.state,
  fraction: runProgress.fraction,
  doing: runProgress.doing,
  stoppedBecause: runProgress.stoppedBecause,
  /** The last word of its progress; of a run that ended, when it did. */
  lastWordAt: runProgress.beatAt,
  outcome: runResults.outcome,
  result: runResults.result,
  resultDigest: runResults.resultDigest,
  problems: runResults.problems,
  log: runResults.log,
  finishedAt: runResults.finishedAt,
};

const selectRuns = (reader: Reader) =>
  reader.select(columns).from(runs).innerJoin(runProgress, eq(runProgress.runId, runs.id)).leftJoin(runResults, eq(runResults.runId, runs.id));

export type RunRow = Awaited<ReturnType<typeof selectRuns>>[number];

export async function findRun(reader: Reader, runId: string): Promise<RunRow | undefined> {
  const [row] = await selectRuns(reader).where(eq(runs.id, runId));
  return row;
}

export async function findLatestRun(reader: Reader, revisionId: string, kind: RunKind): Promise<RunRow | undefined> {
  const [row] = await selectRuns(reader)
    .where(and(eq(runs.revisionId, revisionId), eq(runs.kind, kind)))
    .orderBy(desc(runs.requestedAt))
    .limit(1);
  return row;
}

/** The newest that has numbers: a later one that was stopped, refused or is under way does not hide it. */
export async function findMeasuredRun(reader: Reader, revisionId: string, kind: RunKind): Promise<RunRow | undefined> {
  const [row] = await selectRuns(reader)
    .where(and(eq(runs.revisionId, revisionId), eq(runs.kind, kind), eq(runResults.outcome, 'measured')))
    .orderBy(desc(runs.requestedAt))
    .limit(1);
  return row;
}

/** The newest first; what a run found is large and read for those that are shown. */
export const listRunHeads = (reader: Reader, submissionId: string) =>
  reader.select({ id: runs.id, kind: runs.kind }).from(runs).where(eq(runs.submissionId, submissionId)).orderBy(desc(runs.requestedAt), desc(runs.id));

export const listRuns = (reader: Reader, ids: readonly string[]) =>
  selectRuns(reader).where(inArray(runs.id, [...ids])).orderBy(desc(runs.requestedAt), desc(runs.id));

export async function findFigures(reader: Reader, runId: string) {
  const [row] = await reader.select({ figures: runResults.figures }).from(runResults).where(eq(runResults.runId, runId));
  return row?.figures ?? undefined;
}

/** How the claims of a run could be read otherwise; null where an earlier version computed it and kept none. */
export async function findReadings(reader: Reader, runId: string): Promise<ReadingsByClaim | null> {
  const [row] = await reader.select({ readings: runResults.readings }).from(runResults).where(eq(runResults.runId, runId));
  return row?.readings ?? null;
}

/** What the worker computes from. */
export async function findRunInputs(reader: Reader, runId: string) {
  const [row] = await reader
    .select({ id: runs.id, submissionId: runs.submissionId, revisionNumber: revisions.number, kind: runs.kind, sheet: runs.sheet, otherwise: runs.otherwise, inputs: runs.inputs, done: runResults.runId })
    .from(runs)
    .innerJoin(revisions, eq(revisions.id, runs.revisionId))
    .leftJoin(runResults, eq(runResults.runId, runs.id))
    .where(eq(runs.id, runId));
  return row;
}
