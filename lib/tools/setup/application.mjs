import { runStep } from './commands.mjs';
import { ensureBuild } from './build.mjs';
import { demoAccounts, prepareDatabase, prepareDemo, startRestOfSeed } from './demo.mjs';
import { SetupError, say } from './ground.mjs';
import { startScript, startSigner, startWeb, startWorker, waitUntilReady } from './parts.mjs';

/** Everything on this machine: database server, object store, mail, web, worker and signer. */
export async function startDemo(supervisor, { dev }) {
  const { postgres, ports, env: base } = await prepareDemo();
  supervisor.addLast(() => postgres.stop());
  supervisor.watch('PostgreSQL', postgres);
  const env = { ...base, NODE_ENV: dev ? 'development' : 'production' };
  await startFakes(supervisor, ports, env);
  // The build and the seed need nothing from each other, and there are two cores.
  await allOrFirstError([prepareDatabase(env), ...(dev ? [] : [ensureBuild()])]);
  await ports.web.release();
  const web = supervisor.keep(() => startWeb(env, { port: ports.web.port, dev }));
  supervisor.keep(() => startWorker(env));
  supervisor.keep(() => startSigner(env));
  await waitUntilReady(`http://127.0.0.1:${ports.web.port}/readyz`, web);
  supervisor.once(() => startRestOfSeed(env));
  return demoSummary(env, postgres.port);
}

async function startFakes(supervisor, ports, env) {
  for (const held of [ports.store, ports.smtp, ports.reader, ports.openid]) await held.release();
  const store = supervisor.keep(() => startScript('store', 'lib/tools/object-store.ts', env));
  const mail = supervisor.keep(() => startScript('mail', 'lib/tools/mail-reader.ts', env));
  const openid = supervisor.keep(() => startScript('openid', 'lib/tools/openid-provider.ts', env));
  await waitUntilReady(`${env.MAIL_READER_URL}/`, mail);
  await waitUntilReady(`${env.S3_ENDPOINT}/${env.S3_BUCKET}`, store);
  await waitUntilReady(`${env.ORCID_ISSUER}/jwks`, openid);
}

/** With a team's own PostgreSQL, object store and mail server; starts the parts whose role is given. */
export async function startForTeam(supervisor) {
  const env = {
    ...process.env,
    NODE_ENV: 'production',
    NEXT_TELEMETRY_DISABLED: '1',
    DEMO: '0',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
  if (!env.APP_URL)
    throw new SetupError('DATABASE_URL is set, so this is no demonstration: set APP_URL too (README.md, "Running it for a team").');
  if (env.OWNER_DATABASE_URL) await runStep(process.execPath, ['--import', 'tsx', 'lib/tools/migrate.ts'], { env });
  else say('OWNER_DATABASE_URL is not set: the database is taken as migrated');
  await ensureBuild();
  const port = Number(env.PORT ?? 3000);
  const web = supervisor.keep(() => startWeb(env, { host: env.HOST, port }));
  if (env.WORKER_DATABASE_URL) supervisor.keep(() => startWorker(env));
  if (env.SIGNER_DATABASE_URL && env.SIGNING_KEY_FILE) supervisor.keep(() => startSigner(env));
  await waitUntilReady(`http://${env.HOST ?? '127.0.0.1'}:${port}/readyz`, web);
  return `  ${env.APP_URL}`;
}

/** Unlike Promise.all, no work is left running behind a thrown error. */
async function allOrFirstError(work) {
  const settled = await Promise.allSettled(work);
  const broken = settled.find(({ status }) => status === 'rejected');
  if (broken) throw broken.reason;
}

function demoSummary(env, pgPort) {
  const lines = [`  Counterfoil     ${env.APP_URL}`, `  letters it sent ${env.MAIL_READER_URL}`, `  PostgreSQL      127.0.0.1:${pgPort}`];
  const accounts = demoAccounts();
  if (accounts.length > 0) lines.push('', '  Invented people of the demonstration:');
  const width = (field) => Math.max(...accounts.map((account) => String(account[field]).length));
  for (const { role, name, email, password } of accounts)
    lines.push(`  ${role.padEnd(width('role'))}  ${name.padEnd(width('name'))}  ${email.padEnd(width('email'))}  ${password}`);
  return lines.join('\n');
}
