import { Client } from 'pg';
import { openDatabase } from '@/db/client';
import { DECIDED_CHANNEL } from '@/db/writes/decisions/record-decision';
import { publishKey } from '@/db/writes/records/enter-record';
import { signerEnv, type SignerEnv } from '@/lib/env';
import { createS3Store } from '@/lib/storage/s3-store';
import { endWithParent } from '@/lib/tools/process';
import { signWaiting, type Signing, type SigningFault } from './sign-decision';
import { loadSigningKey, writePublicKey } from './signing-key';

/** Told of a decision at once; looks by itself too, should a word be lost. */
const LOOK_EVERY_MS = 10_000;

const say = (level: 'info' | 'error', message: string, more: object = {}): void =>
  (level === 'error' ? console.error : console.log)(JSON.stringify({ level, at: new Date().toISOString(), where: 'signer', message, ...more }));

const tell = (done: Signing | SigningFault): void => {
  if (done.outcome === 'broken') say('error', done.because, { decisionId: done.decisionId });
  if (done.outcome === 'signed') say('info', 'signed', { recordId: done.recordId });
  if (done.outcome === 'refused') say('info', 'refused', done.refusal);
};

async function listen(url: string, onDecided: () => void, onLost: (error: Error) => void): Promise<Client> {
  const client = new Client({ connectionString: url, application_name: 'counterfoil-signer-listen', keepAlive: true });
  client.on('error', onLost);
  client.on('notification', onDecided);
  await client.connect();
  await client.query(`listen ${DECIDED_CHANNEL}`);
  return client;
}

async function start(env: SignerEnv): Promise<() => Promise<void>> {
  const key = loadSigningKey(env.SIGNING_KEY_FILE);
  const publicKeyFile = writePublicKey(env.SIGNING_KEY_FILE, key);
  const database = openDatabase(env.SIGNER_DATABASE_URL, { max: 2, application_name: 'counterfoil-signer' });
  await publishKey(database, { id: key.id, publicKey: key.publicPem });
  const room = { database, store: createS3Store(env), key, domain: env.APP_URL, now: () => new Date() };
  let stopped = false;
  let looking: Promise<void> = Promise.resolve();
  /** One look after the other; a fault is told and the next look tries again. */
  const look = (): void => {
    if (stopped) return;
    looking = looking.then(() => signWaiting(room)).then((all) => all.forEach(tell), (error: unknown) => say('error', error instanceof Error ? error.message : String(error)));
  };
  // Without the connection nobody tells it of decisions; the supervisor starts another.
  const listener = await listen(env.SIGNER_DATABASE_URL, look, (error) => {
    say('error', error.message);
    if (!stopped) process.exit(1);
  });
  const clock = setInterval(look, LOOK_EVERY_MS);
  look();
  say('info', 'ready', { keyId: key.id, publicKeyFile });
  return async () => {
    stopped = true;
    clearInterval(clock);
    await looking;
    await Promise.allSettled([listener.end(), database.$client.end()]);
  };
}

const stop = await start(signerEnv());
endWithParent(stop);
