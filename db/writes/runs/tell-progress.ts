import { and, eq, ne, sql } from 'drizzle-orm';
import type { Reader, Transaction } from '@/db/client';
import { runProgress } from '@/db/schema/runs';

/** Progress is nobody's evidence, so it takes no Grant; only the worker's role can write it. */
export interface ProgressNote {
  readonly runId: string;
  readonly submissionId: string;
  readonly fraction: number;
  readonly doing: string;
}

const told = (runId: string, submissionId: string) => sql`select pg_notify('run_progress', ${JSON.stringify({ runId, submissionId })})`;

export async function startProgress(db: Reader, note: Omit<ProgressNote, 'fraction'>, attempt: number): Promise<void> {
  await db
    .update(runProgress)
    .set({ state: 'running', fraction: 0, doing: note.doing, attempt, stoppedBecause: null, beatAt: sql`now()` })
    .where(and(eq(runProgress.runId, note.runId), ne(runProgress.state, 'finished')));
  await db.execute(told(note.runId, note.submissionId));
}

export async function tellProgress(db: Reader, note: ProgressNote): Promise<void> {
  await db
    .update(runProgress)
    .set({ fraction: note.fraction, doing: note.doing, beatAt: sql`now()` })
    .where(and(eq(runProgress.runId, note.runId), eq(runProgress.state, 'running')));
  await db.execute(told(note.runId, note.submissionId));
}

export async function endProgress(tx: Transaction, run: { readonly runId: string; readonly submissionId: string }, end: { readonly state: 'finished' } | { readonly state: 'stopped'; readonly because: string }): Promise<void> {
  await tx
    .update(runProgress)
    .set({ state: end.state, ...(end.state === 'finished' && { fraction: 1, doing: '' }), stoppedBecause: end.state === 'stopped' ? end.because : null, beatAt: sql`now()` })
    .where(eq(runProgress.runId, run.runId));
  await tx.execute(told(run.runId, run.submissionId));
}
