import type { RunRow } from '@/db/reads/runs/run';
import type { RunView } from '@/lib/services/submissions/submission-view';

/** A result decides; progress only tells, so a late word of progress never hides a result. */
export function viewRun(row: RunRow): RunView {
  const head = { id: row.id, kind: row.kind, engine: row.engine, requestedAt: row.requestedAt.toISOString() };
  if (row.outcome !== null && row.finishedAt !== null) {
    const finishedAt = row.finishedAt.toISOString();
    if (row.result !== null && row.resultDigest !== null) return { ...head, state: 'measured', finishedAt, result: row.result, resultDigest: row.resultDigest, log: row.log ?? [] };
    return { ...head, state: 'refused', finishedAt, problems: row.problems ?? [] };
  }
  if (row.state === 'stopped') return { ...head, state: 'stopped', stoppedAt: row.lastWordAt.toISOString(), because: row.stoppedBecause ?? 'The run was given up.' };
  return { ...head, state: row.state === 'queued' ? 'queued' : 'running', fraction: row.fraction, doing: row.doing };
}
