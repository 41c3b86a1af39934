import { eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { runStops } from '@/db/schema/run-stops';

/** Whether the one who asked for a run wants it no longer. */
export async function stopAsked(reader: Reader, runId: string): Promise<boolean> {
  const [row] = await reader.select({ runId: runStops.runId }).from(runStops).where(eq(runStops.runId, runId));
  return row !== undefined;
}
