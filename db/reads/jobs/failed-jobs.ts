import { desc, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { failedJobs } from '@/db/schema/failed-jobs';

export const listFailedJobs = (reader: Reader) => reader.select().from(failedJobs).orderBy(desc(failedJobs.failedAt)).limit(200);

export async function findFailedJob(reader: Reader, id: string) {
  const [row] = await reader.select().from(failedJobs).where(eq(failedJobs.id, id));
  return row;
}
