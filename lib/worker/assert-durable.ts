import type { Database } from '@/db/client';

const NEEDED = ['fsync', 'full_page_writes', 'synchronous_commit'] as const;

/**
 * Nothing acknowledged is ever lost only holds on a server that writes before it says so. Asked once
 * at the start; a server set for speed instead stops the process rather than the promise.
 */
export async function assertDurable(database: Database): Promise<void> {
  for (const setting of NEEDED) {
    const { rows } = await database.$client.query<Record<string, string>>(`show ${setting}`);
    const value = rows[0]?.[setting];
    if (value === 'off') throw new Error(`The database runs with ${setting} = off, so an answer it gave can be lost. Set it to on and start again.`);
  }
}
