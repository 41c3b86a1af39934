import { Client } from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { migrateDatabase } from '@/lib/tools/database/migrate-database';
import type { RoleUrls } from '@/lib/tools/database/roles';
import { ROOT } from '../../architecture/support/source-files';
import { freshDatabase, type FreshDatabase } from '../../support/database';

describe('a migration can be run again, and by several at once', () => {
  let database: FreshDatabase;
  let urls: RoleUrls;
  let owner: Client;
  beforeAll(async () => {
    database = await freshDatabase();
    urls = { owner: database.ownerUrl, web: database.webUrl, worker: database.workerUrl, signer: database.signerUrl };
    owner = new Client({ connectionString: database.ownerUrl });
    await owner.connect();
  });
  afterAll(async () => {
    await owner?.end();
    await database?.drop();
  });

  const one = async (sql: string): Promise<unknown> => Object.values((await owner.query(sql)).rows[0] as object)[0];

  it('three at once wait for each other and change nothing that stands', async () => {
    const applied = await one('select count(*) from drizzle.__drizzle_migrations');
    await Promise.all([1, 2, 3].map(() => migrateDatabase(urls, { root: ROOT })));
    expect(await one('select count(*) from drizzle.__drizzle_migrations')).toBe(applied);
    expect(Number(applied)).toBeGreaterThan(0);
  });

  it('the owner owns the tables, the worker the queue and the function that enqueues', async () => {
    const ownersOf = async (schema: string): Promise<string[]> =>
      (await owner.query<{ tableowner: string }>('select distinct tableowner from pg_tables where schemaname = $1', [schema])).rows.map(
        (row) => row.tableowner,
      );
    expect(await ownersOf('public')).toEqual(['counterfoil_owner']);
    expect(await ownersOf('graphile_worker')).toEqual(['counterfoil_worker']);
    expect(await one(`select pg_get_userbyid(proowner) from pg_proc where proname = 'enqueue_job'`)).toBe('counterfoil_worker');
  });

  it('none of the four roles is a superuser, or may create roles or databases', async () => {
    const mighty = await owner.query(
      `select rolname from pg_roles where rolname like 'counterfoil\\_%' and rolname <> 'counterfoil_admin' and (rolsuper or rolcreaterole or rolcreatedb or rolbypassrls)`,
    );
    expect(mighty.rows).toEqual([]);
  });

  it('a function that runs with its owner’s rights names its search path', async () => {
    const open = await owner.query(
      `select proname from pg_proc where prosecdef and pronamespace = 'public'::regnamespace and not exists (select 1 from unnest(proconfig) as setting where setting like 'search_path=%')`,
    );
    expect(open.rows).toEqual([]);
  });

  it('an address with another user name is refused before anything is touched', async () => {
    const web = urls.web.replace('counterfoil_web', 'somebody');
    await expect(migrateDatabase({ ...urls, web }, { root: ROOT })).rejects.toThrow('names the user "somebody"; expected counterfoil_web');
  });
});
