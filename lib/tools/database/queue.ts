import { runMigrations } from 'graphile-worker';
import { Pool, escapeIdentifier, type ClientBase } from 'pg';
import { ROLES, databaseOf } from '@/lib/tools/database/roles';

/**
 * The queue's schema belongs to the worker's role. Its tables carry row-level security, under
 * which any other role sees no jobs, silently, and may not add one. The web role therefore adds
 * jobs through one function that runs with the worker's rights, inside the caller's transaction.
 */
const ENQUEUE = `
-- As it was before jobs had an urgency: two functions of one name would be told apart by nobody.
drop function if exists public.enqueue_job(text, jsonb, text, int, text);
create or replace function public.enqueue_job(
  task text, payload jsonb, job_key text default null, max_attempts int default 3, queue_name text default null,
  urgency int default 0, flags text[] default null
) returns bigint language plpgsql security definer set search_path = pg_catalog, pg_temp as $$
declare
  v_id bigint;
begin
  select job.id into v_id from graphile_worker.add_job(
    identifier => enqueue_job.task, payload => enqueue_job.payload::json, queue_name => enqueue_job.queue_name,
    max_attempts => enqueue_job.max_attempts, job_key => enqueue_job.job_key,
    priority => enqueue_job.urgency, flags => enqueue_job.flags) as job;
  return v_id;
end $$;
revoke all on function public.enqueue_job(text, jsonb, text, int, text, int, text[]) from public;
grant execute on function public.enqueue_job(text, jsonb, text, int, text, int, text[]) to ${ROLES.web};`;

/** `owner` lends the worker the right to create for the length of this call, and takes it back. */
export async function migrateQueue(owner: ClientBase, workerUrl: string): Promise<void> {
  const database = escapeIdentifier(databaseOf(workerUrl));
  await owner.query(`grant create on database ${database} to ${ROLES.worker}`);
  await owner.query(`grant create on schema public to ${ROLES.worker}`);
  try {
    await asWorker(workerUrl);
  } finally {
    await owner.query(`revoke create on database ${database} from ${ROLES.worker}`);
    await owner.query(`revoke create on schema public from ${ROLES.worker}`);
  }
}

async function asWorker(workerUrl: string): Promise<void> {
  const pool = new Pool({ connectionString: workerUrl, max: 2 });
  pool.on('error', () => undefined);
  pool.on('connect', (client) => client.on('error', () => undefined));
  try {
    await runMigrations({ pgPool: pool });
    await pool.query(ENQUEUE);
  } finally {
    await pool.end();
  }
}
