import { setTimeout } from 'node:timers/promises';
import { openDatabase, useDatabase, type Database } from '@/db/client';
import { findRun } from '@/db/reads/runs/run';
import { publishKey } from '@/db/writes/records/enter-record';
import { signerEnv, webEnv, workerEnv } from '@/lib/env';
import { nobodyWaits } from '@/lib/jobs/urgency';
import { signWaiting } from '@/lib/signer/sign-decision';
import { loadSigningKey } from '@/lib/signer/signing-key';
import type { Outcome } from '@/lib/services/app-error';
import { createS3Store } from '@/lib/storage/s3-store';
import { runSubmission } from '@/lib/worker/handlers/run-submission';
import { openSheetThreads } from '@/lib/worker/threads/run-sheet';
import { storeOldResult, type OffBy } from './store-old-result';
import { rememberingResults } from './remembering-results';

/** The three processes of the application in one, each part under its own database role. */
export interface DemoRoom {
  /** Does what the worker would with this run; its job in the queue then finds it done. */
  compute(runId: string): Promise<void>;
  /** Stores what an earlier engine is said to have found for a lodged submission. */
  storeOldResult(submissionId: string, offBy: OffBy): Promise<void>;
  /** Does what the signer would; every decision has to be signed. */
  sign(): Promise<void>;
  close(): Promise<void>;
}

function openWeb(): Database {
  const web = openDatabase(webEnv().DATABASE_URL, { application_name: 'counterfoil-seed' });
  useDatabase(web);
  return web;
}

/** Beside a running application: its worker measures what stands in the queue when no person's run wants the room, and its signer signs. */
export function openWaitingRoom(): DemoRoom {
  nobodyWaits();
  const web = openWeb();
  const storeOldResult = () => Promise.reject(new Error('Old results are stored before the site opens.'));
  return { compute: (runId) => untilMeasured(web, runId), storeOldResult, sign: () => Promise.resolve(), close: () => web.$client.end() };
}

const LOOK_MS = 500;
const PATIENCE_MS = 20 * 60_000;

async function untilMeasured(web: Database, runId: string): Promise<void> {
  for (let waited = 0; waited < PATIENCE_MS; waited += LOOK_MS) {
    const run = await findRun(web, runId);
    if (run?.finishedAt) return;
    await setTimeout(LOOK_MS);
  }
  throw new Error(`run ${runId} was not measured within ${PATIENCE_MS / 60_000} minutes`);
}

export function openDemoRoom(): DemoRoom {
  const web = openWeb();
  const env = workerEnv();
  const worker = openDatabase(env.WORKER_DATABASE_URL, { application_name: 'counterfoil-seed-worker' });
  const threads = openSheetThreads();
  const hand = { database: worker, store: createS3Store(env), mail: env, compute: rememberingResults(threads.run), signal: new AbortController().signal };
  return {
    compute: (runId) => runSubmission({ runId }, hand, 1),
    storeOldResult: (id, offBy) => storeOldResult(worker, id, offBy),
    sign: signAll,
    async close() {
      await threads.close();
      await Promise.all([web, worker].map((database: Database) => database.$client.end()));
    },
  };
}

async function signAll(): Promise<void> {
  const env = signerEnv();
  const database = openDatabase(env.SIGNER_DATABASE_URL, { max: 2, application_name: 'counterfoil-seed-signer' });
  try {
    const key = loadSigningKey(env.SIGNING_KEY_FILE);
    await publishKey(database, { id: key.id, publicKey: key.publicPem });
    const done = await signWaiting({ database, store: createS3Store(env), key, domain: env.APP_URL, now: () => new Date() });
    const unsigned = done.filter(({ outcome }) => outcome !== 'signed');
    if (unsigned.length > 0) throw new Error(`The signer did not sign: ${JSON.stringify(unsigned)}`);
  } finally {
    await database.$client.end();
  }
}

/** In a demonstration nothing may be refused; the sentence says what was. */
export function must<T>(outcome: Outcome<T>): T {
  if (outcome.ok) return outcome.value;
  const { code, sentence, problems } = outcome.error;
  throw new Error(`${code}: ${sentence}${problems ? ` ${JSON.stringify(problems)}` : ''}`);
}
