import { fileURLToPath } from 'node:url';
import { migrationEnv } from '@/lib/env';
import { migrateDatabase } from '@/lib/tools/database/migrate-database';

/** Command line: migrates the database that the environment names. */
const env = migrationEnv();
const urls = {
  owner: env.OWNER_DATABASE_URL,
  web: env.DATABASE_URL,
  worker: env.WORKER_DATABASE_URL,
  signer: env.SIGNER_DATABASE_URL,
};
const root = fileURLToPath(new URL('../..', import.meta.url));

try {
  await migrateDatabase(urls, { adminUrl: env.ADMIN_DATABASE_URL, root });
} catch (error) {
  console.error(error instanceof Error ? `The database was not migrated. ${error.message}` : error);
  process.exitCode = 1;
}
