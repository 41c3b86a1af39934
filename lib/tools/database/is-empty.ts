import { Client } from 'pg';
import { migrationEnv } from '@/lib/env';

/** Ends with 0 when no account exists, with 1 when one does. */
const owner = new Client({ connectionString: migrationEnv().OWNER_DATABASE_URL });
await owner.connect();
const { rowCount } = await owner.query('select 1 from users limit 1');
await owner.end();
process.exitCode = rowCount ? 1 : 0;
