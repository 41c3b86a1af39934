import type { Transaction } from '@/db/client';
import { failedJobs } from '@/db/schema/failed-jobs';

export async function recordFailedJob(tx: Transaction, job: { readonly task: string; readonly payload: unknown; readonly attempts: number; readonly lastError: string }): Promise<void> {
  await tx.insert(failedJobs).values(job);
}
