import { sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';

/** True when a statement comes back, under this process's own role. */
export async function databaseAnswers(reader: Reader): Promise<boolean> {
  try {
    await reader.execute(sql`select 1`);
    return true;
  } catch {
    return false;
  }
}
