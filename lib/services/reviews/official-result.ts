import type { Reader } from '@/db/client';
import { findLatestRun, findMeasuredRun } from '@/db/reads/runs/run';
import { findRevision } from '@/db/reads/submissions/revision';
import { listLodgedRevisions } from '@/db/reads/submissions/submission-head';
import type { ResultDocument } from '@/lib/pipeline/result';

export interface LodgedResult {
  readonly revisionId: string;
  readonly revision: number;
  readonly title: string;
  readonly runId: string | null;
  /** Null while the run goes on, or when the sheet could not be read. */
  readonly result: ResultDocument | null;
}

/** The official numbers of the newest lodged revision, or of one named; undefined before lodging. */
export async function findOfficialResult(reader: Reader, submissionId: string, number?: number): Promise<LodgedResult | undefined> {
  const lodged = await listLodgedRevisions(reader, submissionId);
  const wanted = number === undefined ? lodged[0]?.number : lodged.find((r) => r.number === number)?.number;
  const row = wanted === undefined ? undefined : await findRevision(reader, submissionId, wanted);
  if (!row) return undefined;
  const run = (await findMeasuredRun(reader, row.id, 'official')) ?? (await findLatestRun(reader, row.id, 'official'));
  return { revisionId: row.id, revision: row.number, title: row.title, runId: run?.id ?? null, result: run?.result ?? null };
}
