import type { Transaction } from '@/db/client';
import { failedJobs } from '@/db/schema/failed-jobs';

/** Takes no Grant: the machine notes what it gave up, and only the worker's role can write here. */
export async function recordFailedJob(tx: Transaction, job: { readonly task: string; readonly payload: unknown; readonly attempts: number; readonly lastError: string }): Promise<void> {
  await tx.insert(failedJobs).values(job);
}
