import { existsSync } from 'node:fs';
import path from 'node:path';
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import { Client } from 'pg';
import { migrateQueue } from '@/lib/tools/database/queue';
import { ensureRolesAndDatabase, refuseOtherNames, type RoleUrls } from '@/lib/tools/database/roles';

/** Any constant will do; it has to be the same in every process that migrates. */
const MIGRATION_LOCK = 540_320_716;

/**
 * Brings a database to the present state: roles (when an administrator's address is given), tables as
 * the owner, the queue as the worker. Two at once wait for each other; a second run changes nothing.
 */
export async function migrateDatabase(urls: RoleUrls, options: { adminUrl?: string; root: string }): Promise<void> {
  refuseOtherNames(urls);
  const { adminUrl } = options;
  if (adminUrl) await underLock(adminUrl, () => ensureRolesAndDatabase(adminUrl, urls));
  await underLock(urls.owner, async (owner) => {
    await applyTables(owner, path.join(options.root, 'drizzle'));
    await migrateQueue(owner, urls.worker);
  });
}

async function underLock(url: string, work: (client: Client) => Promise<void>): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await client.query('select pg_advisory_lock($1)', [MIGRATION_LOCK]);
    await work(client);
  } finally {
    await client.end();
  }
}

async function applyTables(owner: Client, migrationsFolder: string): Promise<void> {
  if (!existsSync(path.join(migrationsFolder, 'meta/_journal.json'))) return;
  await migrate(drizzle(owner), { migrationsFolder });
}
