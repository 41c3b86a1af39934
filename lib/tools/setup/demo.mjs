import fs from 'node:fs';
import path from 'node:path';
import { runStep } from './commands.mjs';
import { DATA, ROOT, SetupError, say } from './ground.mjs';
import { holderOf } from './lock.mjs';
import { startScript } from './parts.mjs';
import { reservePort } from './ports.mjs';
import { roleUrl, startPostgres } from './postgres.mjs';
import { secrets, signingKeyFile } from './secrets.mjs';

const DATABASE = 'counterfoil';
const SEED = 'lib/tools/seed.ts';
const SEEDING = path.join(DATA, 'seeding');
const PORTS = path.join(DATA, 'ports.json');
const ACCOUNTS = path.join(DATA, 'demo-accounts.json');

/** This checkout's own database server, and the addresses of everything the demo consists of. */
export async function prepareDemo() {
  const known = secrets();
  const postgres = await startPostgres({ folder: path.join(DATA, 'postgres'), password: known.admin });
  const chosen = Number(process.env.PORT);
  const ports = {
    web: chosen ? await reservePort(chosen, chosen) : await reservePort(3000),
    store: await reservePort(54340),
    smtp: await reservePort(54340),
    reader: await reservePort(54340),
    openid: await reservePort(54340),
  };
  const numbers = { postgres: postgres.port, ...Object.fromEntries(Object.entries(ports).map(([name, held]) => [name, held.port])) };
  fs.writeFileSync(PORTS, JSON.stringify(numbers));
  return { postgres, ports, env: { ...process.env, ...demoEnvironment(known, numbers) } };
}

/** For commands beside a running `npm start`: the same addresses and secrets. */
export function runningDemoEnvironment() {
  if (holderOf(path.join(DATA, 'start.pid')) === undefined)
    throw new SetupError(
      'No demonstration runs from this folder: run npm start in another terminal, or set OWNER_DATABASE_URL and the other addresses.',
    );
  return { ...process.env, ...demoEnvironment(secrets(), JSON.parse(fs.readFileSync(PORTS, 'utf8'))) };
}

function demoEnvironment(known, ports) {
  const database = (role) => roleUrl(`counterfoil_${role}`, known[role], ports.postgres, DATABASE);
  const local = (port) => `http://127.0.0.1:${port}`;
  return {
    DEMO: '1',
    DATA_DIR: DATA,
    NEXT_TELEMETRY_DISABLED: '1',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    APP_URL: `http://localhost:${ports.web}`,
    AUTH_SECRET: known.session,
    ADMIN_DATABASE_URL: roleUrl('counterfoil_admin', known.admin, ports.postgres, 'postgres'),
    OWNER_DATABASE_URL: database('owner'),
    DATABASE_URL: database('web'),
    WORKER_DATABASE_URL: database('worker'),
    SIGNER_DATABASE_URL: database('signer'),
    S3_ENDPOINT: local(ports.store),
    S3_REGION: 'us-east-1',
    S3_BUCKET: 'counterfoil',
    S3_ACCESS_KEY_ID: known.storeKey,
    S3_SECRET_ACCESS_KEY: known.storeSecret,
    OBJECT_STORE_FOLDER: path.join(DATA, 'objects'),
    SMTP_URL: `smtp://127.0.0.1:${ports.smtp}`,
    MAIL_FROM: 'Counterfoil <desk@counterfoil.example>',
    MAIL_READER_URL: local(ports.reader),
    MAIL_FOLDER: path.join(DATA, 'mail'),
    ORCID_ISSUER: local(ports.openid),
    ORCID_CLIENT_ID: 'counterfoil-on-this-machine',
    ORCID_CLIENT_SECRET: known.openid,
    SIGNING_KEY_FILE: signingKeyFile(),
  };
}

/** Migrates, and seeds an empty database unless SEED=0. A seed that was interrupted begins again from nothing. */
export async function prepareDatabase(env) {
  if (fs.existsSync(SEEDING)) await tsx('lib/tools/database/drop-demo.ts', env);
  await tsx('lib/tools/migrate.ts', env);
  if (process.env.SEED === '0' || !fs.existsSync(path.join(ROOT, SEED)) || !(await isEmpty(env))) return;
  say('filling the empty database with the demonstration');
  fs.writeFileSync(SEEDING, '');
  await tsx(SEED, env);
  fs.rmSync(SEEDING);
}

/** The courses that nobody waits for, begun when the site is open; undefined when there are none left. */
export function startRestOfSeed(env) {
  return fs.existsSync(path.join(DATA, 'demo-later.json')) ? startScript('seed', 'lib/tools/seed-later.ts', env) : undefined;
}

/** Exit code 0 when nobody has an account yet. */
async function isEmpty(env) {
  try {
    await runStep(process.execPath, ['--import', 'tsx', 'lib/tools/database/is-empty.ts'], { env });
    return true;
  } catch {
    return false;
  }
}

const tsx = (file, env) => runStep(process.execPath, ['--import', 'tsx', file], { env });

/** Written by the seed: role, e-mail address and password of each invented person. */
export function demoAccounts() {
  return fs.existsSync(ACCOUNTS) ? JSON.parse(fs.readFileSync(ACCOUNTS, 'utf8')) : [];
}
