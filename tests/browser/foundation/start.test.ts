import { spawn, type ChildProcess } from 'node:child_process';
import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { chmodSync, existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { afterEach, describe, expect, it } from 'vitest';
import { reservePort } from '@/lib/tools/setup/ports.mjs';
import { roleUrl, startPostgres } from '@/lib/tools/setup/postgres.mjs';
import { ROOT } from '../../architecture/support/source-files';
import { freshDatabase } from '../../support/database';
import { startMailSink, startObjectStore, temporaryFolder } from '../../support/fakes';

/** What the command printed so far, and how it ended. */
interface Started {
  readonly process: ChildProcess;
  output(): string;
  until(text: string): Promise<void>;
  ended(): Promise<number | null>;
}

function start(env: Record<string, string>): Started {
  const process_ = spawn(process.execPath, ['lib/tools/start.mjs'], {
    cwd: ROOT,
    env: { ...process.env, NODE_ENV: undefined, ...env } as unknown as NodeJS.ProcessEnv,
  });
  let text = '';
  const waiting = new Set<() => void>();
  const wake = (): void => waiting.forEach((look) => look());
  for (const stream of [process_.stdout, process_.stderr])
    stream.on('data', (chunk: Buffer) => {
      text += String(chunk);
      wake();
    });
  process_.on('exit', wake);
  return {
    process: process_,
    output: () => text,
    until: (wanted) =>
      new Promise((resolve, reject) => {
        const look = (): void => {
          if (text.includes(wanted)) resolve();
          else if (process_.exitCode !== null) reject(new Error(`ended with ${process_.exitCode} before it said "${wanted}":\n${text}`));
        };
        waiting.add(look);
        look();
      }),
    ended: () => new Promise((resolve) => (process_.exitCode !== null ? resolve(process_.exitCode) : process_.once('exit', resolve))),
  };
}

const isAlive = (pid: number): boolean => {
  try {
    return readFileSync(`/proc/${pid}/cmdline`, 'utf8') !== '';
  } catch {
    return false;
  }
};

const childrenOf = (parent: number): number[] =>
  readFileSync(`/proc/${parent}/task/${parent}/children`, 'utf8').trim().split(/\s+/).filter(Boolean).map(Number);

// Each starts whole servers; on a busy machine that alone takes a minute.
describe('one command brings everything up, and takes everything down', { timeout: 300_000 }, () => {
  const cleanUp: (() => Promise<void> | void)[] = [];
  afterEach(async () => {
    for (const step of cleanUp.splice(0).reverse()) await step();
  });

  const dataFolder = (): string => {
    const folder = temporaryFolder('start');
    chmodSync(folder, 0o711); // started by root, the database server's own user has to pass through
    cleanUp.push(() => rmSync(folder, { recursive: true, force: true }));
    return folder;
  };
  const run = (env: Record<string, string>): Started => {
    const started = start(env);
    cleanUp.push(async () => {
      started.process.kill('SIGTERM');
      await started.ended();
    });
    return started;
  };

  it('the demonstration, from an empty folder; a second start finds the first; nothing is left after SIGTERM', async () => {
    const env = { DATA_DIR: dataFolder(), SEED: '0', DATABASE_URL: '' };
    const first = run(env);
    await first.until('ready after');
    const url = /http:\/\/localhost:\d+/.exec(first.output())?.[0] ?? '';
    expect((await fetch(`${url}/readyz`)).status).toBe(200);
    expect(existsSync(path.join(env.DATA_DIR, 'secrets.json'))).toBe(true);

    const second = run(env);
    expect(await second.ended()).toBe(0);
    expect(second.output()).toContain('already runs');
    expect(second.output()).toContain(url);

    const parts = childrenOf(first.process.pid ?? 0);
    expect(parts.length).toBeGreaterThanOrEqual(5);
    first.process.kill('SIGTERM');
    expect(await first.ended()).toBe(0);
    expect(parts.filter(isAlive)).toEqual([]);
    await expect(fetch(url)).rejects.toThrow();
  });

  it('a part that is killed is started again', async () => {
    const first = run({ DATA_DIR: dataFolder(), SEED: '0', DATABASE_URL: '' });
    await first.until('ready after');
    const url = /http:\/\/localhost:\d+/.exec(first.output())?.[0] ?? '';
    const web = childrenOf(first.process.pid ?? 0).find((pid) => readFileSync(`/proc/${pid}/cmdline`, 'utf8').includes('next')) ?? 0;
    process.kill(web, 'SIGKILL');
    await first.until('web ended (SIGKILL); starting it again');
    await expect
      .poll(
        () =>
          fetch(`${url}/healthz`).then(
            ({ status }) => status,
            () => 0,
          ),
        { timeout: 60_000, interval: 100 },
      )
      .toBe(200);
  });

  /** A server as a team runs it: the worker refuses the throw-away one of the tests, which may lose what it confirmed. */
  async function teamDatabase(folder: string): Promise<Record<string, string>> {
    const password = randomBytes(18).toString('base64url');
    const postgres = await startPostgres({ folder, password, firstPort: 55_300 });
    cleanUp.push(() => postgres.stop());
    const of = (role: string): string => roleUrl(`counterfoil_${role}`, password, postgres.port, 'records');
    return {
      ADMIN_DATABASE_URL: postgres.adminUrl,
      OWNER_DATABASE_URL: of('owner'),
      DATABASE_URL: of('web'),
      WORKER_DATABASE_URL: of('worker'),
      SIGNER_DATABASE_URL: of('signer'),
    };
  }

  it('a team’s own servers are used when they are named, roles and database are made, and no fake is started', async () => {
    const [store, mail, port] = await Promise.all([startObjectStore(), startMailSink(), reservePort(57_000)]);
    cleanUp.push(async () => void (await Promise.all([store.stop(), mail.stop()])));
    const folder = dataFolder();
    const database = await teamDatabase(dataFolder());
    const keyFile = path.join(folder, 'key.pem');
    writeFileSync(keyFile, generateKeyPairSync('ed25519').privateKey.export({ type: 'pkcs8', format: 'pem' }), { mode: 0o600 });
    await port.release();
    const team = run({
      DATA_DIR: folder,
      APP_URL: `http://127.0.0.1:${port.port}`,
      PORT: String(port.port),
      AUTH_SECRET: randomBytes(33).toString('base64'),
      ...database,
      SIGNING_KEY_FILE: keyFile,
      SMTP_URL: mail.smtpUrl,
      MAIL_FROM: 'Counterfoil <desk@counterfoil.example>',
      ...store.env,
    });
    await Promise.all(['ready after', '[worker] {"level":"info"', '[signer] {"level":"info"'].map((words) => team.until(words)));
    expect((await fetch(`http://127.0.0.1:${port.port}/readyz`)).status).toBe(200);
    expect(existsSync(path.join(folder, 'postgres'))).toBe(false);
    expect(team.output()).not.toContain('starting it again');
    expect(childrenOf(team.process.pid ?? 0), team.output()).toHaveLength(3);
  });

  it('a secret that everybody knows stops the start with a sentence that names it', async () => {
    const database = await freshDatabase();
    cleanUp.push(() => database.drop());
    const env = {
      DATA_DIR: dataFolder(),
      APP_URL: 'http://127.0.0.1:57500',
      PORT: '57500',
      DATABASE_URL: database.webUrl,
      AUTH_SECRET: 'changeme',
      S3_BUCKET: 'records',
      S3_ACCESS_KEY_ID: 'key-of-the-team',
      S3_SECRET_ACCESS_KEY: randomBytes(24).toString('hex'),
    };
    const started = run(env);
    expect(await started.ended()).toBe(1);
    expect(started.output()).toContain('AUTH_SECRET');
    expect(started.output()).not.toContain('ready after');
  });
});
