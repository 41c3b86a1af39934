import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { pathToFileURL } from 'node:url';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import type { SignedInActor } from '@/lib/policy/actor';
import { serveAuth } from '@/lib/http/serve-auth';
import { createAccount } from '@/lib/services/accounts/create-account';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { draftWithBursts, must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

/** What the framework would hand to a server action. */
let actionHeaders = new Headers();
vi.mock('next/headers', () => ({ headers: () => Promise.resolve(actionHeaders) }));

type Handler = (request: Request, context: { params: Promise<Record<string, string | string[]>> }) => Promise<Response>;
interface RouteDoor {
  readonly method: string;
  readonly address: string;
  readonly handler: Handler;
}

const UNKNOWN = '7b0f6a52-6c1c-4c55-9a0f-3a3d1f9f8e11';
const WRITES = ['POST', 'PUT', 'PATCH', 'DELETE'];
let desk: ServiceDesk;
let author: SignedInActor;
let draft: string;
let lodged: string;
const cookies: Record<'author' | 'stranger', string> = { author: '', stranger: '' };
const routes: RouteDoor[] = [];

const routeFiles = readdirSync('app', { recursive: true, encoding: 'utf8' }).filter((f) => f.endsWith('/route.ts')).map((f) => path.join('app', f)).sort();
const addressOf = (file: string): string => `/${path.dirname(file).split('/').slice(1).filter((p) => !/^\(.*\)$/.test(p)).join('/')}`;

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await signedUp('author', 'T. Marrable');
  await signedUp('stranger', 'L. Quennell');
  draft = await draftWithBursts(author);
  lodged = await draftWithBursts(author);
  must(await checkDraft(author, lodged));
  await desk.runAll();
  must(await lodgeSubmission(author, lodged));
  await desk.runAll();
  for (const file of routeFiles) {
    const module = (await import(pathToFileURL(path.resolve(file)).href)) as Record<string, unknown>;
    for (const method of ['GET', ...WRITES]) if (module[method]) routes.push({ method, address: addressOf(file), handler: module[method] as Handler });
  }
}, 120_000);
afterAll(() => desk.close());

async function signedUp(who: 'author' | 'stranger', name: string): Promise<SignedInActor> {
  const account = { email: `${who}@larkfield.example`, password: 'seven quiet herons' };
  const userId = await createAccount({ ...account, name, role: 'member', affiliation: null });
  const answer = await serveAuth(new Request(`${ORIGIN}/api/auth/sign-in/email`, { method: 'POST', headers: { origin: ORIGIN, 'content-type': 'application/json' }, body: JSON.stringify(account) }));
  cookies[who] = answer.headers.getSetCookie().map((c) => c.split(';')[0]).join('; ');
  return { kind: 'member', userId, name, accountRole: 'member' };
}

const fill = (address: string, id: string): string => address.replace('[id]', id).replace('[fileId]', UNKNOWN).replace('[uploadId]', UNKNOWN).replace('[number]', '0').replace('[file]', 'x.pem').replace('[...all]', 'sign-out');
const paramsOf = (address: string, id: string): Record<string, string | string[]> =>
  Object.fromEntries([...address.matchAll(/\[(\.\.\.)?(\w+)\]/g)].map(([, rest, name]) => [name ?? '', rest ? ['sign-out'] : name === 'id' ? id : name === 'file' ? 'x.pem' : name === 'number' ? '0' : UNKNOWN]));

function call(route: RouteDoor, id: string, headers: Record<string, string>, body?: string, search = ''): Promise<Response> {
  const init = { method: route.method, headers: { ...(body === undefined ? {} : { 'content-type': 'application/json' }), ...headers } };
  return route.handler(new Request(`${ORIGIN}${fill(route.address, id)}${search}`, body === undefined ? init : { ...init, body }), { params: Promise.resolve(paramsOf(route.address, id)) });
}
const ownWrites = (): RouteDoor[] => routes.filter((r) => WRITES.includes(r.method));
const searchOf = (r: RouteDoor): string => (r.address.endsWith('/figures') ? `?run=${UNKNOWN}` : '');
const onSubmissions = (r: RouteDoor): boolean => r.address.startsWith('/api/v1/submissions/[id]');
const find = (method: string, ending: string): RouteDoor => {
  const found = routes.find((r) => r.method === method && r.address.endsWith(ending));
  if (!found) throw new Error(`no ${method} ${ending}`);
  return found;
};

/** Everything a write could have left behind. */
const everything = () =>
  desk.sql<Record<string, unknown>>(`select (select json_agg(s order by id) from submissions s) s, (select json_agg(r order by id) from revisions r) r,
    (select count(*) from audit_entries) a, (select count(*) from runs) n, (select count(*) from stored_files) f, (select count(*) from sessions) e, (select count(*) from outbox) o`);

const FOREIGN: Readonly<Record<string, Record<string, string>>> = {
  'no origin at all': {},
  'another site': { origin: 'https://elsewhere.example' },
  'an opaque origin': { origin: 'null' },
  'a name that begins like ours': { origin: `${ORIGIN}.elsewhere.example` },
  'our name over https': { origin: ORIGIN.replace('http:', 'https:') },
  'our name on another port': { origin: 'http://127.0.0.1:9999' },
  'a forwarded host that claims to be theirs': { origin: 'https://elsewhere.example', 'x-forwarded-host': 'elsewhere.example', host: 'elsewhere.example' },
  'same-site but not same-origin': { 'sec-fetch-site': 'same-site' },
  'our origin in a request marked cross-site': { origin: ORIGIN, 'sec-fetch-site': 'cross-site' },
};

describe('a write sent from elsewhere', () => {
  it.each(Object.entries(FOREIGN))('with %s is refused at every route and writes nothing', async (_name, headers) => {
    const before = await everything();
    for (const route of ownWrites()) {
      const answer = await call(route, draft, { cookie: cookies.author, ...headers }, '{}');
      expect(answer.status, `${route.method} ${route.address}`).toBe(403);
      expect(answer.headers.get('content-type')).toBe('application/problem+json');
    }
    expect(await everything()).toEqual(before);
  });

  it.each(Object.entries(FOREIGN))('with %s is refused by every server action', async (_name, headers) => {
    const before = await everything();
    actionHeaders = new Headers({ cookie: cookies.author, ...headers });
    for (const [name, action] of await serverActions()) expect(await action({ id: draft }), name).toMatchObject({ ok: false, error: { code: 'foreign-origin' } });
    expect(await everything()).toEqual(before);
  });
});

async function serverActions(): Promise<[string, (raw: unknown) => Promise<unknown>][]> {
  const files = readdirSync('app', { recursive: true, encoding: 'utf8' }).filter((f) => /\.tsx?$/.test(f)).map((f) => path.join('app', f)).filter((f) => readFileSync(f, 'utf8').trimStart().startsWith(`'use server'`));
  expect(files.length).toBeGreaterThan(0);
  const found: [string, (raw: unknown) => Promise<unknown>][] = [];
  for (const file of files) for (const [name, action] of Object.entries((await import(pathToFileURL(path.resolve(file)).href)) as Record<string, (raw: unknown) => Promise<unknown>>)) found.push([`${file} ${name}`, action]);
  return found;
}

describe('somebody who is signed out', () => {
  it('writes nothing anywhere', async () => {
    const before = await everything();
    for (const route of ownWrites().filter((r) => !r.address.startsWith('/api/auth'))) {
      const answer = await call(route, draft, { origin: ORIGIN }, JSON.stringify(BODIES[`${route.method} ${route.address}`] ?? {}));
      expect([401, 422], `${route.method} ${route.address} answered ${answer.status}`).toContain(answer.status);
    }
    actionHeaders = new Headers({ origin: ORIGIN });
    for (const [name, action] of await serverActions()) expect(await action(ACTION_INPUT[name.split(' ')[1] ?? ''] ?? { id: draft }), name).toMatchObject({ ok: false, error: { code: expect.stringMatching(/signed-out|invalid/) } });
    expect(await everything()).toEqual(before);
  });

  it('reads of a submission what anybody reads of an unknown one, byte for byte', async () => {
    for (const route of routes.filter((r) => r.method === 'GET' && onSubmissions(r)))
      await expectSameBytes(route, {}, [draft, lodged], searchOf(route));
  });
});

const BODIES: Readonly<Record<string, unknown>> = {
  'PATCH /api/v1/submissions/[id]': { version: 1, title: 'x' },
  'POST /api/v1/submissions/[id]/withdraw': { reason: 'x' },
  'POST /api/v1/submissions/[id]/variations': { claimId: 'C1', changes: { settings: { fLowHz: 20 } } },
  'PUT /api/v1/submissions/[id]/variations/[variationId]/link': { readable: true },
  'DELETE /api/v1/submissions/[id]/files': { name: 'a.txt' },
};
const ACTION_INPUT: Readonly<Record<string, unknown>> = { createDraft: { title: 'x' } };

async function expectSameBytes(route: RouteDoor, headers: Record<string, string>, ids: readonly string[], search = ''): Promise<void> {
  const describeAnswer = async (id: string) => {
    const answer = await call(route, id, headers, undefined, search);
    return { status: answer.status, headers: [...answer.headers].sort(), body: await answer.text() };
  };
  const unknown = await describeAnswer(UNKNOWN);
  expect(unknown.status).toBe(404);
  for (const id of [...ids, 'not-an-id', '1', '%00']) expect(await describeAnswer(id), `${route.method} ${route.address} ${id}`).toEqual(unknown);
}

describe('the wrong person', () => {
  it('reads what anybody reads of an unknown submission, byte for byte', async () => {
    for (const route of routes.filter((r) => r.method === 'GET' && onSubmissions(r)))
      await expectSameBytes(route, { cookie: cookies.stranger }, [draft, lodged], searchOf(route));
  });

  it('writes nothing, and is told of a submission no more than of an unknown one', async () => {
    const before = await everything();
    for (const route of ownWrites().filter(onSubmissions)) {
      const body = JSON.stringify(BODIES[`${route.method} ${route.address}`] ?? {});
      const say = async (id: string) => {
        const answer = await call(route, id, { cookie: cookies.stranger, origin: ORIGIN }, body);
        return [answer.status, await answer.text()];
      };
      const unknown = await say(UNKNOWN);
      expect([404, 422], `${route.method} ${route.address}`).toContain(unknown[0]);
      for (const id of [draft, lodged]) expect(await say(id), `${route.method} ${route.address}`).toEqual(unknown);
    }
    expect(await everything()).toEqual(before);
  });
});

describe('a request with an Authorization header', () => {
  it('never falls back to the cookie', async () => {
    const before = await everything();
    for (const route of routes.filter((r) => !r.address.startsWith('/api/health') && !r.address.includes('records') && !r.address.startsWith('/keys'))) {
      const answer = await call(route, draft, { cookie: cookies.author, origin: ORIGIN, authorization: 'Bearer cf_nobody' }, route.method === 'GET' ? undefined : '{}');
      expect(answer.status, `${route.method} ${route.address}`).toBe(401);
      expect(answer.headers.get('www-authenticate')).toMatch(/^Bearer/);
    }
    expect(await everything()).toEqual(before);
  });
});

describe('input of the wrong shape', () => {
  it('with a field nobody asked for is refused, and the row is unchanged', async () => {
    const before = await everything();
    const extra = { state: 'entered', role: 'administrator', ownerId: UNKNOWN, round: 9, lodgedAt: '2026-01-01' };
    for (const route of ownWrites().filter((r) => onSubmissions(r) && !(r.method === 'POST' && r.address.endsWith('/files')) && !r.address.endsWith('/parts/[number]'))) {
      for (const [name, value] of Object.entries(extra)) {
        const answer = await call(route, draft, { cookie: cookies.author, origin: ORIGIN }, JSON.stringify({ ...(BODIES[`${route.method} ${route.address}`] as object | undefined), [name]: value }));
        expect(answer.status, `${route.method} ${route.address} ${name}`).toBe(422);
      }
    }
    const query = await call(find('GET', 'submissions/[id]'), draft, { cookie: cookies.author }, undefined, '?as=editor');
    expect(query.status).toBe(422);
    expect(await everything()).toEqual(before);
  });

  it('that is no JSON, the wrong type or too long is a 4xx with the problem', async () => {
    const patch = find('PATCH', 'submissions/[id]');
    const asAuthor = { cookie: cookies.author, origin: ORIGIN };
    expect((await call(patch, draft, asAuthor, '{')).status).toBe(422);
    expect((await call(patch, draft, asAuthor, '[1]')).status).toBe(422);
    expect((await call(patch, draft, { ...asAuthor, 'content-type': 'text/plain' }, '{}')).status).toBe(415);
    expect((await call(patch, draft, asAuthor, JSON.stringify({ version: 1, statement: 'x'.repeat(1_100_000) }))).status).toBe(413);
    const upload = find('POST', 'submissions/[id]/files');
    expect((await call(upload, draft, asAuthor, '{}')).status).toBe(415);
    expect((await call(upload, draft, { ...asAuthor, 'content-type': 'multipart/form-data; charset=x' }, 'x')).status).toBe(422);
    expect((await call(upload, draft, { ...asAuthor, 'content-type': 'multipart/form-data; boundary=b' }, '--b\r\nContent-Disposition: form-data; name="f"; filename="x.txt"\r\n\r\nhalf')).status).toBe(422);
  });
});

describe('an Idempotency-Key', () => {
  const ask = (key: string, title: string) =>
    call(find('PATCH', 'submissions/[id]'), draft, { cookie: cookies.author, origin: ORIGIN, 'idempotency-key': key }, JSON.stringify({ version: 2, title }));

  it('used twice acts once and gives the same answer; with another request it is a conflict', async () => {
    const first = await ask('key-of-one-act', 'A new title');
    const again = await ask('key-of-one-act', 'A new title');
    expect([first.status, await first.text()]).toEqual([200, '{"version":3}']);
    expect([again.status, await again.text()]).toEqual([200, '{"version":3}']);
    expect((await ask('key-of-one-act', 'Another title')).status).toBe(409);
    expect((await ask('key-of-two', 'Stale')).status).toBe(409);
  });

  it('sent twice at once acts once', async () => {
    const act = () => call(find('POST', '/check'), draft, { cookie: cookies.author, origin: ORIGIN, 'idempotency-key': 'two-at-once-1' }, '');
    const both = await Promise.all([act(), act()]);
    const said = await Promise.all(both.map(async (r) => [r.status, await r.text()]));
    const runs = await desk.sql('select 1 from runs where submission_id = $1', draft);
    expect(runs).toHaveLength(1);
    const accepted = said.filter(([status]) => status === 202);
    expect(accepted.length).toBeGreaterThanOrEqual(1);
    const later = await act();
    expect([later.status, await later.text()]).toEqual(accepted[0]);
    await desk.runAll();
  });
});

describe('what nobody foresaw', () => {
  it('is a 500 with a reference and without its message', async () => {
    const log = vi.spyOn(console, 'error').mockImplementation(() => undefined);
    await desk.sql(`alter table run_results rename column outcome to outcome_away`);
    const answer = await call(find('GET', 'submissions/[id]'), lodged, { cookie: cookies.author });
    await desk.sql(`alter table run_results rename column outcome_away to outcome`);
    const body = (await answer.json()) as { reference: string; detail: string };
    expect(answer.status).toBe(500);
    expect(JSON.stringify(body)).not.toMatch(/outcome|column|select/);
    expect(String(log.mock.calls[0]?.[0])).toContain(body.reference);
    log.mockRestore();
  });
});

describe('a door too often used', () => {
  it('answers 429 and when to come back', async () => {
    await desk.sql(`insert into rate_points (key, points, expire) values ($1, 1000, (extract(epoch from now()) * 1000 + 30000)::bigint)
      on conflict (key) do update set points = excluded.points, expire = excluded.expire`, `POST /api/v1/submissions/{id}/withdraw:${author.userId}`);
    const answer = await call(find('POST', '/withdraw'), draft, { cookie: cookies.author, origin: ORIGIN }, '{"reason":"x"}');
    expect(answer.status).toBe(429);
    expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0);
  });
});
