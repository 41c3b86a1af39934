import { Client } from 'pg';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

/** Tables whose rows are never changed or removed, by whom they may be written, and a change to try. */
const APPEND_ONLY = {
  audit_entries: `action = 'x'`,
  stored_files: `bytes = 1`,
  runs: `engine = 'x'`,
  run_results: `engine = 'x'`,
  variations: `note = 'x'`,
  failed_jobs: `task = 'x'`,
  idempotency_keys: `status = 1`,
} as const;

let desk: ServiceDesk;
let author: SignedInActor;
const clients: Record<string, Client> = {};

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  const id = await draftWithBursts(author);
  must(await checkDraft(author, id));
  await desk.runAll();
  await desk.sql(`insert into failed_jobs (task, payload, attempts, last_error) values ('run-submission', '{}', 3, 'x')`);
  await desk.sql(`insert into idempotency_keys (user_id, key, request_digest, status, body) values ($1, 'k', 'd', 200, '{}')`, author.userId);
  await desk.sql(`insert into variations (run_id, submission_id, revision_id, claim_id, changes, requested_by) select id, submission_id, revision_id, 'C1', '{}', $1 from runs limit 1`, author.userId);
  const urls = { web: desk.db.webUrl, worker: desk.db.workerUrl, signer: desk.db.signerUrl };
  for (const [role, url] of Object.entries(urls)) {
    clients[role] = new Client({ connectionString: url });
    await clients[role].connect();
  }
});
afterAll(async () => {
  await Promise.all(Object.values(clients).map((c) => c.end()));
  await desk.close();
});

const attempt = async (role: string, statement: string): Promise<string> => {
  try {
    const done = await clients[role]?.query(statement);
    return `${done?.rowCount} rows`;
  } catch (error) {
    return (error as { code?: string }).code ?? String(error);
  }
};

describe.each(['web', 'worker', 'signer'])('the %s role', (role) => {
  it.each(Object.entries(APPEND_ONLY))('can neither change, remove nor empty %s', async (table, change) => {
    const before = await desk.sql(`select * from ${table}`);
    expect(before.length).toBeGreaterThan(0);
    expect(await attempt(role, `update ${table} set ${change}`)).toBe('42501');
    expect(await attempt(role, `delete from ${table}`)).toBe('42501');
    expect(await attempt(role, `truncate ${table} cascade`)).toBe('42501');
    expect(await desk.sql(`select * from ${table}`)).toEqual(before);
  });

  it('cannot make, alter or drop a table, a role or a trigger', async () => {
    for (const statement of ['create table x (a int)', 'alter table runs disable trigger all', 'drop table runs', 'create role x', 'set role counterfoil_owner', 'drop trigger append_only_rows on runs'])
      expect(await attempt(role, statement), statement).toMatch(/^(42501|42704)$/);
  });
});

describe('append-only, even where a right was given by mistake', () => {
  it.each(Object.entries(APPEND_ONLY))('a trigger guards %s', async (table, change) => {
    await desk.sql(`grant update, delete, truncate on ${table} to counterfoil_web`);
    const before = await desk.sql(`select * from ${table}`);
    for (const statement of [`update ${table} set ${change}`, `delete from ${table}`, `truncate ${table}`, `truncate ${table} cascade`])
      expect(await attempt('web', statement), statement).toMatch(/^(42501|0A000)$/);
    expect(await desk.sql(`select * from ${table}`)).toEqual(before);
    await desk.sql(`revoke update, delete, truncate on ${table} from counterfoil_web`);
  });
});

describe('what a role cannot read', () => {
  it('the worker knows no person, no author and no variation, so it cannot learn who a referee is', async () => {
    for (const table of ['users', 'sessions', 'accounts', 'verifications', 'submission_people', 'variations', 'audit_entries', 'invitations', 'stored_files', 'two_factors', 'declined_letters'])
      expect(await attempt('worker', `select * from ${table}`), table).toBe('42501');
    expect(await attempt('worker', 'select owner_id from submissions')).toBe('42501');
  });

  it('the signer knows no password, no session and no address', async () => {
    for (const what of ['* from accounts', '* from sessions', 'email from users', '* from invitations', '* from audit_entries', 'password from accounts', '* from two_factors']) expect(await attempt('signer', `select ${what}`), what).toBe('42501');
  });

  it('the web cannot write a result, and sees no job', async () => {
    expect(await attempt('web', `insert into run_results (run_id, outcome, engine) select id, 'refused', 'x' from runs`)).toBe('42501');
    expect(await attempt('web', `update run_progress set fraction = 1`)).toBe('42501');
    expect(await attempt('web', 'select * from graphile_worker._private_jobs')).toBe('42501');
  });

  it('nobody who is signed out of the database can do anything', async () => {
    const rows = await desk.sql<{ table: string }>(`select table_name as table from information_schema.table_privileges where grantee = 'PUBLIC' and table_schema = 'public'`);
    expect(rows).toEqual([]);
  });
});
