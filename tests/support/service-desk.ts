import { createHash, randomUUID } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { Readable } from 'node:stream';
import { closeDatabase, database, openDatabase, useDatabase, type Database } from '@/db/client';
import { openAccount } from '@/db/writes/accounts/open-account';
import { ok } from '@/lib/kernel/result';
import { reproduce } from '@/lib/pipeline/reproduce';
import type { AccountRole } from '@/lib/policy/account-role';
import type { SignedInActor } from '@/lib/policy/actor';
import type { Outcome } from '@/lib/services/app-error';
import { addFile } from '@/lib/services/files/add-file';
import { createDraft } from '@/lib/services/submissions/create-draft';
import type { DraftSheet } from '@/lib/services/submissions/submission-view';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { createS3Store } from '@/lib/storage/s3-store';
import type { ComputeSheet } from '@/lib/worker/compute';
import { runSubmission } from '@/lib/worker/handlers/run-submission';
import { burstFiles, burstSheet } from './burst-sheet';
import { freshDatabase, type FreshDatabase } from './database';
import { startObjectStore, type TestObjectStore } from './fakes';

/** The services of one process against a database and store of this test file's own, with nobody signed in but by name. */
export interface ServiceDesk {
  readonly db: FreshDatabase;
  readonly worker: Database;
  readonly store: TestObjectStore;
  person(name: string, role?: AccountRole): Promise<SignedInActor>;
  /** Does what the worker would: computes each run that has no result, and looks for other readings where that is asked. */
  runAll(how?: { readonly searching: boolean }): Promise<number>;
  /** As the owner, past every right of a role. */
  sql<T>(text: string, ...values: unknown[]): Promise<T[]>;
  close(): Promise<void>;
}

export const ORIGIN = 'http://127.0.0.1:3210';

export async function openServiceDesk(): Promise<ServiceDesk> {
  const [db, store] = await Promise.all([freshDatabase(), startObjectStore()]);
  Object.assign(process.env, store.env, { DATABASE_URL: db.webUrl, APP_URL: ORIGIN, DEMO: '1', NODE_ENV: 'test', AUTH_SECRET: 'kD82nfa-0Qmz_71pLxYw93hVtRs56bGc' });
  delete (globalThis as { counterfoilStore?: unknown }).counterfoilStore;
  useDatabase(openDatabase(db.webUrl, { onError: () => undefined }));
  const worker = openDatabase(db.workerUrl, { onError: () => undefined });
  const owner = openDatabase(db.ownerUrl, { max: 2, onError: () => undefined });
  return {
    db,
    worker,
    store,
    person,
    runAll: ({ searching } = { searching: false }) => runAll(worker, store, searching),
    sql: async <T>(text: string, ...values: unknown[]) => (await owner.$client.query(text, values)).rows as T[],
    async close() {
      await Promise.all([closeDatabase(), worker.$client.end(), owner.$client.end()]);
      await Promise.all([db.drop(), store.stop()]);
    },
  };
}

/** The hash opens with no password: these people never sign in. */
async function person(name: string, role: AccountRole = 'member'): Promise<SignedInActor> {
  const email = `${name.toLowerCase().replace(/[^a-z]+/g, '-')}-${randomUUID().slice(0, 8)}@larkfield.example`;
  const userId = await database().transaction((tx) => openAccount(tx, { name, email, role, affiliation: 'Larkfield Wave Group', passwordHash: 'none' }));
  return { kind: 'member', userId, name, accountRole: role };
}

/** The pipeline itself, in this thread. */
export const computeHere: ComputeSheet = (job, watch) => compute({ ...job, explain: false }, watch);

/** With the search for other readings, which takes its time. */
const compute: ComputeSheet = async ({ sheet, files, withFigures, explain, otherwise }, { onProgress, signal }) => {
  const pathOf = new Map(files.map((f) => [f.name, f.path]));
  const openFile = (name: string) => createReadStream(pathOf.get(name) ?? '/nowhere') as AsyncIterable<Uint8Array>;
  const done = await reproduce({ sheetJson: sheet, openFile }, { withFigures, onProgress, cancelled: () => signal.aborted, digest: streamingSha256, ...(otherwise && { otherwise }), ...(explain && { explain: { endedBy: () => null } }) });
  return done.ok ? ok(done.value) : done;
};

const streamingSha256 = () => {
  const hash = createHash('sha256');
  return { update: (bytes: Uint8Array) => void hash.update(bytes), hex: () => hash.digest('hex') };
};

async function runAll(worker: Database, store: TestObjectStore, searching: boolean): Promise<number> {
  const waiting = await worker.$client.query<{ id: string }>('select r.id from runs r left join run_results rr on rr.run_id = r.id where rr.run_id is null order by r.requested_at');
  const room = { database: worker, store: createS3Store(store.env), mail: { SMTP_URL: 'smtp://127.0.0.1:9', MAIL_FROM: 'x@y.example' }, compute: searching ? compute : computeHere, signal: new AbortController().signal };
  for (const { id } of waiting.rows) await runSubmission({ runId: id }, room, 1);
  return waiting.rows.length;
}

export function must<T>(outcome: Outcome<T>): T {
  if (!outcome.ok) throw new Error(`${outcome.error.code}: ${outcome.error.sentence} ${JSON.stringify(outcome.error.problems ?? [])}`);
  return outcome.value;
}

/** A draft with the two bursts, ready to be checked. */
export async function draftWithBursts(author: SignedInActor, sheet: DraftSheet = burstSheet()): Promise<string> {
  const { id } = must(await createDraft(author, { title: sheet.title }));
  for (const [name, text] of Object.entries(burstFiles())) must(await addFile(author, id, { name, stream: Readable.from(Buffer.from(text)) }));
  const { waveforms, noise, claims } = sheet as unknown as { waveforms: never; noise: never; claims: never };
  must(await updateDraft(author, id, { version: 1, title: sheet.title, statement: sheet.statement, sheet: { waveforms, noise, claims } }));
  return id;
}
