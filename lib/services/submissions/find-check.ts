import type { Reader } from '@/db/client';
import { findLatestRun, findMeasuredRun, type RunRow } from '@/db/reads/runs/run';
import { findWhoStopped } from '@/db/reads/runs/who-stopped';
import { viewRun } from '@/lib/services/runs/run-view';
import { isUnderWay } from '@/lib/services/runs/under-way';
import { isCurrent } from './before-lodging';
import type { CheckView, RevisionView } from './submission-view';

/** The latest check of a revision with, where it has no numbers, the one before it whose numbers stand. */
export async function findCheck(reader: Reader, revision: Pick<RevisionView, 'id' | 'sheet' | 'files'>): Promise<CheckView | null> {
  const latest = await findLatestRun(reader, revision.id, 'check');
  if (!latest) return null;
  const seen = (row: RunRow) => ({ run: viewRun(row), current: isCurrent(row.inputsDigest, revision.sheet, revision.files) });
  const newest = seen(latest);
  if (newest.run.state === 'measured') return { ...newest, stoppedBy: null, before: null };
  const measured = await findMeasuredRun(reader, revision.id, 'check');
  const before = measured ? seen(measured) : null;
  // What came to nothing was of another save: this one is measured.
  if (before?.current && !newest.current && !isUnderWay(newest.run)) return { ...before, stoppedBy: null, before: null };
  const stoppedBy = newest.run.state === 'stopped' ? ((await findWhoStopped(reader, latest.id)) ?? null) : null;
  return { ...newest, stoppedBy, before: before?.run.state === 'measured' ? { run: before.run, current: before.current } : null };
}
