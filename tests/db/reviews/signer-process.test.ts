import { spawn, spawnSync, type ChildProcess } from 'node:child_process';
import { once } from 'node:events';
import { chmodSync, readFileSync } from 'node:fs';
import { afterAll, beforeAll, expect, it } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { enterAtLevelOne, inDeciding, personOf, throwAwayKey } from '../../support/review-room';
import { must, openServiceDesk, ORIGIN, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let people: { author: SignedInActor; editor: SignedInActor; referee: SignedInActor };
let signer: ChildProcess | undefined;
const { keyFile, key } = throwAwayKey();

beforeAll(async () => {
  desk = await openServiceDesk();
  people = { author: await personOf('M. Ondaro', 'saltern'), editor: await personOf('R. Amsel', 'counterfoil', 'editor'), referee: await personOf('H. Brightwater', 'oxbow') };
});
afterAll(async () => {
  signer?.kill('SIGKILL');
  await desk.close();
});

const environment = () =>
  ({ PATH: process.env['PATH'], NODE_ENV: 'test', APP_URL: ORIGIN, DEMO: '1', ...desk.store.env, SIGNER_DATABASE_URL: desk.db.signerUrl, SIGNING_KEY_FILE: keyFile }) as unknown as NodeJS.ProcessEnv;

const COMMAND = ['--import', 'tsx', 'lib/signer/main.ts'];

/** Lines of the log, one at a time, in order. */
async function nextLine(lines: AsyncIterator<string>): Promise<Record<string, unknown>> {
  const line = await lines.next();
  if (line.done) throw new Error('the signer ended');
  return JSON.parse(line.value) as Record<string, unknown>;
}

async function* linesOf(child: ChildProcess): AsyncGenerator<string> {
  let rest = '';
  for await (const chunk of child.stdout ?? []) {
    rest += String(chunk);
    const parts = rest.split('\n');
    rest = parts.pop() ?? '';
    yield* parts;
  }
}

it('the signer signs what waited when it starts and what is decided while it runs, and ends when told', { timeout: 120_000 }, async () => {
  const waiting = await inDeciding(desk, people);
  must(await enterAtLevelOne(people.editor, waiting, 'Two bursts in'));
  signer = spawn(process.execPath, COMMAND, { env: environment(), stdio: ['ignore', 'pipe', 'inherit'] });
  const lines = linesOf(signer);
  expect(await nextLine(lines)).toMatchObject({ message: 'ready', keyId: key.id });
  const first = await nextLine(lines);
  expect(first).toMatchObject({ message: 'signed' });
  const later = await inDeciding(desk, people);
  must(await enterAtLevelOne(people.editor, later, 'Two bursts in'));
  expect(await nextLine(lines)).toMatchObject({ message: 'signed' });
  const states = await desk.sql<{ state: string }>('select state from submissions');
  expect(states.map((s) => s.state)).toEqual(['entered', 'entered']);
  expect(await desk.sql('select id, public_key from signing_keys')).toEqual([{ id: key.id, public_key: key.publicPem }]);
  expect(readFileSync(keyFile.replace('.pem', '.public.pem'), 'utf8')).toBe(key.publicPem);
  signer.kill('SIGTERM');
  expect(await once(signer, 'exit')).toEqual([0, null]);
});

it('a key that others can read is not used', { timeout: 60_000 }, () => {
  chmodSync(keyFile, 0o644);
  const { status, stderr } = spawnSync(process.execPath, COMMAND, { env: environment(), encoding: 'utf8' });
  expect(status).not.toBe(0);
  expect(stderr).toContain('can be read by others (mode 644); expected 600');
});
