import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { existsSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import { reservePort } from '@/lib/tools/setup/ports.mjs';
import { startSigner, startWeb, startWorker, waitUntilReady, type Part } from '@/lib/tools/setup/parts.mjs';
import { startOpenIdProvider } from '@/lib/tools/fakes/openid-provider';
import { freshDatabase, type FreshDatabase } from './database';
import { startMailSink, startObjectStore, temporaryFolder, type TestMailSink, type TestObjectStore } from './fakes';

const ROOT = fileURLToPath(new URL('../..', import.meta.url));

export interface TestApplication {
  /** http://127.0.0.1:port */
  readonly url: string;
  /** The same application under both loopback names. */
  readonly urls: readonly [string, string];
  readonly database: FreshDatabase;
  readonly store: TestObjectStore['env'];
  readonly mail: TestMailSink;
  /** Everything the processes print, for the message of a failing test. */
  log(): string;
  /** Replaces the worker's process: `kill` ends it with SIGKILL first. */
  restartWorker(options?: { kill?: boolean }): Promise<void>;
  stop(): Promise<void>;
}

/**
 * The built application as `npm start` runs it (web, worker, signer), against a database, an object
 * store, a mail sink and an OpenID provider of this test file's own. `npm test` has built it before.
 */
export async function startApplication(extra: Readonly<Record<string, string>> = {}): Promise<TestApplication> {
  if (!existsSync(path.join(ROOT, '.next/BUILD_ID')))
    throw new Error('There is no build in .next; run the browser tests through `npm test`.');
  const folder = temporaryFolder('application');
  const client = { clientId: 'counterfoil-under-test', clientSecret: randomBytes(24).toString('base64url') };
  const [database, store, mail, openid] = await Promise.all([freshDatabase(), startObjectStore(), startMailSink(), startOpenIdProvider(client)]);
  const held = await reservePort(56_000);
  const orcid = { ORCID_ISSUER: openid.issuer, ORCID_CLIENT_ID: client.clientId, ORCID_CLIENT_SECRET: client.clientSecret };
  const env = { ...process.env, ...environment(folder, database, store, mail, held.port), ...orcid, ...extra };
  const running = await startParts(env, held);
  return {
    url: `http://127.0.0.1:${held.port}`,
    urls: [`http://127.0.0.1:${held.port}`, `http://localhost:${held.port}`],
    database,
    store: store.env,
    mail,
    log: running.log,
    restartWorker: running.restartWorker,
    async stop() {
      await running.stop();
      await Promise.all([store.stop(), mail.stop(), openid.stop(), database.drop()]);
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

type Held = Awaited<ReturnType<typeof reservePort>>;

async function startParts(env: Record<string, string | undefined>, held: Held) {
  const lines: string[] = [];
  const write = (text: string): void => void lines.push(text);
  await held.release();
  const web = startWeb(env, { port: held.port, write });
  let worker = startWorker(env, write);
  const signer = startSigner(env, write);
  const stop = async (): Promise<void> => void (await Promise.all([web, worker, signer].map((part: Part | undefined) => part?.stop())));
  try {
    await waitUntilReady(`http://127.0.0.1:${held.port}/readyz`, web);
  } catch (error) {
    await stop();
    throw new Error(`${String(error)}\n${lines.join('')}`, { cause: error });
  }
  return {
    log: () => lines.join(''),
    stop,
    async restartWorker({ kill = false } = {}) {
      if (kill && worker) process.kill(-worker.pid, 'SIGKILL');
      await worker?.stop();
      worker = startWorker(env, write);
    },
  };
}

function environment(folder: string, database: FreshDatabase, store: TestObjectStore, mail: TestMailSink, port: number) {
  const keyFile = path.join(folder, 'signing-key.pem');
  writeFileSync(keyFile, generateKeyPairSync('ed25519').privateKey.export({ type: 'pkcs8', format: 'pem' }), { mode: 0o600 });
  return {
    NODE_ENV: 'production',
    DEMO: '1',
    NEXT_TELEMETRY_DISABLED: '1',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    APP_URL: `http://127.0.0.1:${port}`,
    AUTH_SECRET: randomBytes(33).toString('base64url'),
    OWNER_DATABASE_URL: database.ownerUrl,
    DATABASE_URL: database.webUrl,
    WORKER_DATABASE_URL: database.workerUrl,
    SIGNER_DATABASE_URL: database.signerUrl,
    ...store.env,
    SMTP_URL: mail.smtpUrl,
    MAIL_FROM: 'Counterfoil <desk@counterfoil.example>',
    MAIL_READER_URL: mail.readerUrl,
    SIGNING_KEY_FILE: keyFile,
    DATA_DIR: folder,
  };
}
