import { Client } from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { freshDatabase, type FreshDatabase } from '../../support/database';

describe('jobs are enqueued by the web role and seen by the worker', () => {
  let database: FreshDatabase;
  let web: Client;
  let worker: Client;

  const connect = async (url: string): Promise<Client> => {
    const client = new Client({ connectionString: url });
    await client.connect();
    return client;
  };
  const jobs = async (): Promise<{ task_identifier: string; max_attempts: number; key: string | null; queue_name: string | null }[]> =>
    (await worker.query('select task_identifier, max_attempts, key, queue_name from graphile_worker.jobs order by id')).rows;

  beforeAll(async () => {
    database = await freshDatabase();
    web = await connect(database.webUrl);
    worker = await connect(database.workerUrl);
  });
  afterAll(async () => {
    await Promise.all([web?.end(), worker?.end()]);
    await database?.drop();
  });

  it('a job becomes visible with the transaction that enqueued it, and not before', async () => {
    await web.query('begin');
    await web.query(`select enqueue_job('measure', '{"revision": 1}', 'measure:1', 3, 'heavy')`);
    expect(await jobs()).toEqual([]);
    await web.query('commit');
    expect(await jobs()).toEqual([{ task_identifier: 'measure', max_attempts: 3, key: 'measure:1', queue_name: 'heavy' }]);
  });

  it('a job of a transaction that is rolled back never existed', async () => {
    const before = await jobs();
    await web.query('begin');
    await web.query(`select enqueue_job('measure', '{"revision": 2}')`);
    await web.query('rollback');
    expect(await jobs()).toEqual(before);
  });

  it('the same job key twice leaves one job', async () => {
    await web.query(`select enqueue_job('send-mail', '{}', 'mail:7')`);
    await web.query(`select enqueue_job('send-mail', '{}', 'mail:7')`);
    expect((await jobs()).filter((job) => job.key === 'mail:7')).toHaveLength(1);
  });

  it.each([
    ['add a job past the function', `select graphile_worker.add_job('measure')`],
    ['read the queue', 'select * from graphile_worker._private_jobs'],
    ['create a table', 'create table mine (id int)'],
    ['create a schema', 'create schema mine'],
  ])('the web role may not %s', async (_what, statement) => {
    await expect(web.query(statement)).rejects.toThrow(/permission denied/);
  });

  it.each([
    ['create a table in public', 'create table mine (id int)'],
    ['create a schema', 'create schema mine'],
  ])('the worker role may not %s once the migration is over', async (_what, statement) => {
    await expect(worker.query(statement)).rejects.toThrow(/permission denied/);
  });

  it('the signer may not enqueue', async () => {
    const signer = await connect(database.signerUrl);
    await expect(signer.query(`select enqueue_job('measure', '{}')`)).rejects.toThrow(/permission denied/);
    await signer.end();
  });
});
