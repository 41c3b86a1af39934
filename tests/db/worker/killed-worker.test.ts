import { spawn, type ChildProcess } from 'node:child_process';
import { Readable } from 'node:stream';
import { afterAll, afterEach, beforeAll, describe, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { addFile } from '@/lib/services/files/add-file';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { createDraft } from '@/lib/services/submissions/create-draft';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { longFile, longSheet } from '../../support/long-sheet';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let author: SignedInActor;
const workers = new Set<ChildProcess>();

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
});
afterEach(async () => {
  await Promise.all([...workers].map((worker) => end(worker)));
});
afterAll(() => desk.close());

/** A worker as `npm start` runs it: a process of its own, with its own role and secrets. */
function startWorker(): ChildProcess {
  const env: NodeJS.ProcessEnv = { ...process.env, NODE_ENV: 'production', WORKER_DATABASE_URL: desk.db.workerUrl, SMTP_URL: 'smtp://127.0.0.1:9', MAIL_FROM: 'Counterfoil <desk@counterfoil.example>' };
  const worker = spawn(process.execPath, ['--import', 'tsx', 'lib/worker/main.ts'], { env, stdio: ['ignore', 'pipe', 'pipe'] });
  worker.stderr?.on('data', (text: Buffer) => said.push(String(text)));
  workers.add(worker);
  return worker;
}
const said: string[] = [];

/** The code with which it ended; null after a signal. A worker that hangs is cut off by its own patience with code 1. */
async function end(worker: ChildProcess, signal: NodeJS.Signals = 'SIGKILL'): Promise<number | null> {
  workers.delete(worker);
  if (worker.exitCode === null && worker.signalCode === null) {
    const gone = new Promise((resolve) => worker.once('exit', resolve));
    worker.kill(signal);
    await gone;
  }
  return worker.exitCode;
}

async function until<T>(look: () => Promise<T | undefined | false>, what: string): Promise<T> {
  for (let i = 0; i < 2400; i++) {
    const seen = await look();
    if (seen) return seen;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error(`never seen: ${what}\n${said.join('')}`);
}

async function longDraft(): Promise<{ id: string; runId: string }> {
  const { id } = must(await createDraft(author));
  must(await addFile(author, id, { name: 'a.txt', stream: Readable.from(Buffer.from(longFile(24_000))) }));
  const { title, waveforms, claims } = longSheet() as unknown as { title: string; waveforms: never; claims: never };
  must(await updateDraft(author, id, { version: 1, title, sheet: { waveforms, claims } }));
  return { id, ...must(await checkDraft(author, id)) };
}

const progressOf = async (runId: string) => (await desk.sql<{ state: string; fraction: number; attempt: number; stopped_because: string | null }>('select * from run_progress where run_id = $1', runId))[0];
const underWay = (runId: string) => until(async () => { const p = await progressOf(runId); return p?.state === 'running' && p.fraction > 0 && p; }, 'a run under way');
const ended = (runId: string) => until(async () => { const p = await progressOf(runId); return (p?.state === 'finished' || p?.state === 'stopped') && p; }, 'the end of the run');
const jobsLeft = () => desk.worker.$client.query('select 1 from graphile_worker._private_jobs').then((r) => r.rowCount);

describe('a worker killed in the middle of a run', () => {
  it('is followed by another, and the run completes exactly once', async () => {
    const { id, runId } = await longDraft();
    const first = startWorker();
    await underWay(runId);
    await end(first, 'SIGKILL');
    expect(await desk.sql('select 1 from run_results where run_id = $1', runId)).toEqual([]);
    startWorker();
    expect(await ended(runId)).toMatchObject({ state: 'finished', attempt: 2 });
    expect(await desk.sql('select outcome from run_results where run_id = $1', runId)).toEqual([{ outcome: 'measured' }]);
    expect(await desk.sql(`select count(*)::int as n from audit_entries where action = 'run.finish-check' and subject_id = $1`, id)).toEqual([{ n: 1 }]);
    expect(must(await getDraft(author, id)).state).toBe('draft');
    await until(async () => (await jobsLeft()) === 0, 'an empty queue');
  }, 300_000);

  it('three times in a row is laid aside: the author gets the draft back, the administrator a row', async () => {
    const { id, runId } = await longDraft();
    for (let attempt = 1; attempt <= 3; attempt++) {
      const worker = startWorker();
      await until(async () => { const p = await progressOf(runId); return p?.attempt === attempt && p.state === 'running'; }, `try ${attempt}`);
      await end(worker, 'SIGKILL');
    }
    startWorker();
    expect(await ended(runId)).toMatchObject({ state: 'stopped' });
    expect(await desk.sql('select task, attempts from failed_jobs where payload->>\'runId\' = $1', runId)).toEqual([{ task: 'run-submission', attempts: 3 }]);
    const draft = must(await getDraft(author, id));
    expect([draft.state, draft.check?.run.state]).toEqual(['draft', 'stopped']);
    expect(await jobsLeft()).toBe(0);
  }, 400_000);
});

describe('a worker told to stop in the middle of a run', () => {
  it('ends by itself and hands the run on with all its tries', async () => {
    const { runId } = await longDraft();
    const first = startWorker();
    await underWay(runId);
    expect(await end(first, 'SIGTERM')).toBe(0);
    const jobs = await desk.worker.$client.query('select attempts, locked_by from graphile_worker._private_jobs');
    expect(jobs.rows).toEqual([{ attempts: 0, locked_by: null }]);
    startWorker();
    expect(await ended(runId)).toMatchObject({ state: 'finished' });
  }, 300_000);
});

describe('an input that is not what was uploaded', () => {
  it('gives no number: the run is tried, laid aside and told', async () => {
    const { runId } = await longDraft();
    await desk.sql(`update runs set inputs = replace(inputs::text, '"bytes":', '"bytes":1')::json where id = $1`, runId);
    startWorker();
    expect(await ended(runId)).toMatchObject({ state: 'stopped' });
    expect(await desk.sql('select 1 from run_results where run_id = $1', runId)).toEqual([]);
    const [failed] = await desk.sql<{ last_error: string }>('select last_error from failed_jobs where payload->>\'runId\' = $1', runId);
    expect(failed?.last_error).toMatch(/the store gave bytes with SHA-256/);
  }, 300_000);
});
