import fs from 'node:fs';
import path from 'node:path';
import { startChild } from './children.mjs';
import { ROOT, SetupError } from './ground.mjs';

/**
 * The processes of the application, and which secrets each may know. A variable named in no list
 * is harmless and goes to all of them.
 */
const SECRETS = {
  web: ['DATABASE_URL', 'AUTH_SECRET', 'ORCID_CLIENT_SECRET'],
  worker: ['WORKER_DATABASE_URL', 'SMTP_URL'],
  signer: ['SIGNER_DATABASE_URL', 'SIGNING_KEY_FILE'],
};
const RESERVED = [...Object.values(SECRETS).flat(), 'OWNER_DATABASE_URL', 'ADMIN_DATABASE_URL'];

const NEXT = 'node_modules/next/dist/bin/next';
const script = (file) => ['--import', 'tsx', file];

export function startWeb(env, { host = '127.0.0.1', port, dev = false, write }) {
  return startChild('web', [NEXT, dev ? 'dev' : 'start', '-H', host, '-p', String(port)], environmentOf('web', env), write);
}

/** Gives undefined when this copy of the project has no such part. */
export function startScript(name, file, env, write) {
  if (!fs.existsSync(path.join(ROOT, file))) return undefined;
  return startChild(name, script(file), name in SECRETS ? environmentOf(name, env) : env, write);
}

export const startWorker = (env, write) => startScript('worker', 'lib/worker/main.ts', env, write);
export const startSigner = (env, write) => startScript('signer', 'lib/signer/main.ts', env, write);

function environmentOf(part, env) {
  const hidden = RESERVED.filter((name) => !SECRETS[part].includes(name));
  return Object.fromEntries(Object.entries(env).filter(([name]) => !hidden.includes(name)));
}

/** Polls until the address answers 200; gives up at once when `part` has ended. */
export async function waitUntilReady(url, part, patienceMs = 90_000) {
  let ended = false;
  void part.ended.then(() => (ended = true));
  for (let waited = 0; waited < patienceMs; waited += 100) {
    if (ended) throw new SetupError(`${part.name} ended before ${url} answered; its last lines above say why`);
    if (await answers(url)) return;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new SetupError(`${url} did not answer within ${patienceMs / 1000} s`);
}

async function answers(url) {
  try {
    return (await fetch(url, { signal: AbortSignal.timeout(5000) })).ok;
  } catch {
    return false;
  }
}
