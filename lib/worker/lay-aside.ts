import { sql } from 'drizzle-orm';
import type { Database, Transaction } from '@/db/client';
import { findRunInputs } from '@/db/reads/runs/run';
import { recordFailedJob } from '@/db/writes/jobs/record-failed-job';
import { TASKS } from '@/lib/jobs/tasks';
import { giveUpRun } from '@/lib/services/runs/complete-run';

interface SpentJob {
  readonly id: string;
  readonly task: string;
  readonly payload: unknown;
  readonly attempts: number;
  readonly lastError: string;
}

/**
 * Lays aside the jobs whose tries are used up: a row in `failed_jobs`, a word to the people it
 * concerns, and the job leaves the queue, all in one transaction. Looked for rather than listened
 * for, because a job that kills its worker is spent without any event.
 */
export async function layAsideSpentJobs(db: Database): Promise<number> {
  let count = 0;
  while (await db.transaction(layAsideOne)) count++;
  return count;
}

async function layAsideOne(tx: Transaction): Promise<boolean> {
  const found = await tx.execute<Record<string, unknown> & { id: string; task: string; payload: unknown; attempts: number; last_error: string | null }>(sql`
    select jobs.id, tasks.identifier as task, jobs.payload, jobs.attempts, jobs.last_error
      from graphile_worker._private_jobs jobs join graphile_worker._private_tasks tasks on tasks.id = jobs.task_id
     where jobs.attempts >= jobs.max_attempts and jobs.locked_by is null
     order by jobs.id limit 1 for update of jobs skip locked`);
  const row = found.rows[0];
  if (!row) return false;
  const lastError = row.last_error ?? 'The worker died while it had this job, each time.';
  await tell(tx, { id: row.id, task: row.task, payload: row.payload, attempts: row.attempts, lastError });
  await tx.execute(sql`select graphile_worker.complete_jobs(array[${row.id}::bigint])`);
  return true;
}

async function tell(tx: Transaction, job: SpentJob): Promise<void> {
  const { task, payload, attempts, lastError } = job;
  const asked = task === 'run-submission' ? TASKS['run-submission'].safeParse(payload) : null;
  const run = asked?.success ? await findRunInputs(tx, asked.data.runId) : undefined;
  if (run && run.done !== null) return; // the worker died between storing the result and saying so
  await recordFailedJob(tx, { task, payload, attempts, lastError });
  if (run) await giveUpRun(tx, run, attempts);
}
