import type { Runner } from 'graphile-worker';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { nobodyWaits } from '@/lib/jobs/urgency';
import type { SignedInActor } from '@/lib/policy/actor';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { createS3Store } from '@/lib/storage/s3-store';
import type { ComputeSheet } from '@/lib/worker/compute';
import { openLiveness, type Liveness } from '@/lib/worker/liveness';
import { startRuns } from '@/lib/worker/pools';
import { RUN_SLOTS } from '@/lib/worker/threads/run-sheet';
import { burstSheet } from '../../support/burst-sheet';
import { computeHere, draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
let liveness: Liveness;
let runner: Runner;
let people: readonly SignedInActor[];
const leaving = new AbortController();

/** One run in the worker's hands: what it is of, whether it stands aside, and the ways on from here. */
interface Held {
  readonly title: string;
  aside: boolean;
  readonly finish: () => void;
  readonly search: () => void;
}
let held: readonly Held[] = [];

/** Numbers as ever, but not before the test says so: how long a run takes is the test's to choose. */
const compute: ComputeSheet = async (job, watch) => {
  await new Promise<void>((resolve) => {
    const one: Held = { title: (job.sheet as { title: string }).title, aside: false, finish: resolve, search: () => watch.turn?.searching() };
    held = [...held, one];
    watch.turn?.follow((aside) => (one.aside = aside));
    watch.turn?.putOff.addEventListener('abort', () => resolve());
    watch.signal.addEventListener('abort', () => resolve());
    if (watch.signal.aborted) resolve();
  });
  return computeHere(job, watch);
};

beforeAll(async () => {
  desk = await openServiceDesk();
  people = await Promise.all(['L. Quennell', 'F. Hartsease', 'T. Marrable', 'A. Lindmere'].map((name) => desk.person(name)));
  liveness = await openLiveness(desk.db.workerUrl, () => undefined);
});
async function open(): Promise<void> {
  runner = await startRuns(desk.worker, liveness, { database: desk.worker, store: createS3Store(desk.store.env), mail: { SMTP_URL: 'smtp://127.0.0.1:9', MAIL_FROM: 'x@y.example' }, compute, signal: leaving.signal });
}
afterAll(async () => {
  leaving.abort();
  await runner.stop();
  await liveness.close();
  await desk.close();
});

async function ask(person: number, title: string): Promise<void> {
  const actor = people[person];
  if (!actor) throw new Error(`nobody has the number ${person}`);
  must(await checkDraft(actor, await draftWithBursts(actor, { ...burstSheet(), title })));
}

async function seed(person: number, ...titles: readonly string[]): Promise<void> {
  const somebodyWaits = nobodyWaits();
  for (const title of titles) await ask(person, title);
  somebodyWaits();
}

async function until(look: () => boolean | Promise<boolean>, what: string): Promise<void> {
  for (let i = 0; i < 1200; i++) {
    if (await look()) return;
    await new Promise((resolve) => setTimeout(resolve, 25));
  }
  throw new Error(`never seen: ${what}; held are ${JSON.stringify(held)}`);
}

const titles = (): readonly string[] => held.map(({ title }) => title).toSorted();
const of = (title: string): Held => {
  const one = held.find((other) => other.title === title);
  if (!one) throw new Error(`${title} is not under way`);
  return one;
};
const finished = async (): Promise<readonly string[]> => (await desk.sql<{ title: string }>("select r.sheet->>'title' as title from runs r join run_results on run_id = r.id order by finished_at")).map(({ title }) => title);

/** What stands in the queue with nobody's hand on it. */
async function waiting(): Promise<readonly { readonly title: string; readonly flags: readonly string[] }[]> {
  const { rows } = await desk.worker.$client.query<{ run: string; flags: Record<string, true> }>("select payload->>'runId' as run, coalesce(flags, '{}') as flags from graphile_worker._private_jobs where locked_at is null");
  const named = await desk.sql<{ id: string; title: string }>("select id, sheet->>'title' as title from runs");
  return rows.map(({ run, flags }) => ({ title: named.find(({ id }) => id === run)?.title ?? run, flags: Object.keys(flags) }));
}

describe('a worker with two cores', () => {
  it('begins a person’s check before seeding that was queued earlier, and lets it finish first', async () => {
    await seed(0, 'seed 1', 'seed 2', 'seed 3');
    await seed(1, 'seed 4');
    await ask(2, 'mine');
    await open();
    await until(() => titles().includes('mine') && titles().includes('seed 1'), 'two runs');
    // Three questions may reach the queue at once: then a second seed has begun as well, and stands aside.
    expect(titles().filter((title) => !['mine', 'seed 1', 'seed 2'].includes(title))).toEqual([]);
    expect(of('mine').aside).toBe(false);
    of('mine').finish();
    await until(async () => (await finished()).length === 1, 'a result');
    expect(await finished()).toEqual(['mine']);
  });

  it('lets seeding under way stand aside while people’s checks compute', async () => {
    await until(() => held.length === 3, 'the next seed');
    for (const person of [2, 3]) await ask(person, `asked by ${person}`);
    await until(() => held.length === 5, 'both checks');
    expect(held.flatMap(({ title, aside }) => (aside ? [title] : []))).toEqual(['seed 1', 'seed 2']);
  });

  it('keeps a slot free of searches: the least urgent goes back to the queue, and a newcomer’s check begins at once', async () => {
    for (const person of [2, 3]) await ask(person, `asked by ${person} once more`);
    await until(() => held.length === 1 + RUN_SLOTS, 'as many runs as there are slots');
    const searching = held.filter(({ title }) => title !== 'mine');
    for (const run of searching) run.search();
    await until(async () => (await waiting()).length === 3, 'a seed that is back in the queue');
    await ask(3, 'the newcomer’s');
    await until(() => titles().includes('the newcomer’s'), 'the check of the newcomer');
    expect(of('the newcomer’s').aside).toBe(false);
    expect((await waiting()).flatMap(({ title, flags }) => (flags.includes('put-off') ? [title] : []))).toEqual(['seed 2']);
    for (const run of held) run.finish();
    await until(async () => (await finished()).length >= 7, 'the results of all that were under way');
  });
});
