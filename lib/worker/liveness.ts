import { Client } from 'pg';

/**
 * A worker is alive while its connection is: each pool of jobs holds an advisory lock under its own
 * id, and PostgreSQL lets go of it the moment the process dies. The queue itself would keep a dead
 * worker's jobs for four hours; here they are free again within two looks.
 */
const LOCK_CLASS = 540_321;

export interface Liveness {
  announce(poolId: string): Promise<void>;
  /** Frees the jobs of pools that were found dead twice in a row (once could be a pool just being born). */
  freeDead(): Promise<readonly string[]>;
  close(): Promise<void>;
}

/** `onLost` is called when the connection breaks: nobody else can then tell us from the dead, so the process has to end. */
export async function openLiveness(url: string, onLost: (error: Error) => void): Promise<Liveness> {
  const client = new Client({ connectionString: url, application_name: 'counterfoil-worker-liveness', keepAlive: true });
  const own = new Set<string>();
  let suspects = new Set<string>();
  let closing = false;
  client.on('error', onLost);
  client.on('end', () => {
    if (!closing) onLost(new Error('the liveness connection ended'));
  });
  await client.connect();
  return {
    async announce(poolId) {
      own.add(poolId);
      await client.query('select pg_advisory_lock($1, hashtext($2))', [LOCK_CLASS, poolId]);
    },
    async freeDead() {
      const dead = await findDead(client, own);
      const sure = dead.filter((id) => suspects.has(id));
      suspects = new Set(dead);
      if (sure.length > 0) await client.query('select graphile_worker.force_unlock_workers($1::text[])', [sure]);
      return sure;
    },
    async close() {
      closing = true;
      await client.end();
    },
  };
}

async function findDead(client: Client, own: ReadonlySet<string>): Promise<string[]> {
  const { rows } = await client.query<{ id: string; dead: boolean }>(
    `select id, pg_try_advisory_lock($1, hashtext(id)) as dead
       from (select locked_by from graphile_worker._private_jobs where locked_by is not null
             union select locked_by from graphile_worker._private_job_queues where locked_by is not null) as l(id)
      where id <> all($2::text[])`,
    [LOCK_CLASS, [...own]],
  );
  const dead = rows.filter((row) => row.dead).map((row) => row.id);
  for (const id of dead) await client.query('select pg_advisory_unlock($1, hashtext($2))', [LOCK_CLASS, id]);
  return dead;
}
