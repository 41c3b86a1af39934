import { Client, escapeIdentifier } from 'pg';
import { migrationEnv } from '@/lib/env';
import { databaseOf } from '@/lib/tools/database/roles';

/** Removes the demonstration's database after its seed was interrupted; refuses any other. */
const env = migrationEnv();
if (process.env['DEMO'] !== '1' || !env.ADMIN_DATABASE_URL) throw new Error('Only the database of the demonstration is ever dropped.');
const admin = new Client({ connectionString: env.ADMIN_DATABASE_URL });
await admin.connect();
await admin.query(`drop database if exists ${escapeIdentifier(databaseOf(env.OWNER_DATABASE_URL))} with (force)`);
await admin.end();
