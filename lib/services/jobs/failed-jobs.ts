import { database } from '@/db/client';
import { findFailedJob, listFailedJobs as readFailedJobs } from '@/db/reads/jobs/failed-jobs';
import { enqueue } from '@/lib/jobs/enqueue';
import { TASKS, type TaskName } from '@/lib/jobs/tasks';
import { isUuid } from '@/lib/kernel/uuid';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { actGenerally } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';

export interface FailedJobView {
  readonly id: string;
  readonly task: string;
  readonly payload: unknown;
  readonly attempts: number;
  readonly lastError: string;
  readonly failedAt: string;
}

/** Jobs that were laid aside, the newest first. */
export async function listFailedJobs(actor: Actor): Promise<Outcome<readonly FailedJobView[]>> {
  const grant = mayGenerally('admin.read-jobs', actor);
  if (!grant.ok) return grant;
  const rows = await readFailedJobs(database());
  return ok(rows.map(({ failedAt, ...row }) => ({ ...row, failedAt: failedAt.toISOString() })));
}

/** Asks for it once more, as a new job with all its tries; the row of the failure stays. */
export function retryJob(actor: Actor, jobId: string): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'admin.retry-job' }, async ({ tx, note }) => {
    const job = isUuid(jobId) ? await findFailedJob(tx, jobId) : undefined;
    if (!job) return { ok: false, error: NOT_FOUND };
    if (!(job.task in TASKS)) return fail('precondition', `This version knows no job named ${job.task}.`);
    const task = job.task as TaskName;
    const payload = TASKS[task].safeParse(job.payload);
    if (!payload.success) return fail('precondition', 'The payload is not what this version expects, so it cannot be tried again.');
    await enqueue(tx, task, payload.data, { key: `retry:${job.id}` });
    note('job', job.id, { task });
    return ok(null);
  });
}
