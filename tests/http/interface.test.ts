import { BlobWriter, TextReader, ZipWriter } from '@zip.js/zip.js';
import { createHash, randomUUID } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { OPERATIONS } from '@/lib/http/contract/operations';
import { scopesOfDoor } from '@/lib/http/token-scope';
import { DOORS } from '@/lib/policy/doors';
import { REVIEW_DOORS } from '@/lib/policy/review-doors';
import { addFile } from '@/lib/services/files/add-file';
import type { StructureView } from '@/lib/services/files/structure-schema';
import { TOKEN_SCOPES } from '@/lib/policy/token-scopes';
import { askDoor, bearer, contractOf, loadHandlers, session, signedIn, tokenFor, type Ask, type DoorName, type Person } from '../support/interface-desk';
import { burstFiles, burstSheet } from '../support/burst-sheet';
import { enterAtLevelOne, inDeciding, inTriage, openSigner, REPORT, withReferee, type SignerDesk } from '../support/review-room';
import { draftWithBursts, must, openServiceDesk, type ServiceDesk } from '../support/service-desk';

vi.mock('next/headers', () => ({ headers: () => Promise.resolve(new Headers()) }));

const UNKNOWN = '7b0f6a52-6c1c-4c55-9a0f-3a3d1f9f8e11';
const doors = OPERATIONS.map((o) => o.door) as DoorName[];
const writes = doors.filter((door) => !door.startsWith('GET '));
let desk: ServiceDesk;
let signer: SignerDesk;
let handlers: Awaited<ReturnType<typeof loadHandlers>>;
let author: Person;
let editor: Person;
let referee: Person;
let stranger: Person;
let administrator: Person;
const token: Record<'author' | 'referee' | 'stranger' | 'read' | 'draft' | 'lodge' | 'review', string> = { author: '', referee: '', stranger: '', read: '', draft: '', lodge: '', review: '' };
let draft = '';
let reviewed = '';
let recordId = '';

beforeAll(async () => {
  desk = await openServiceDesk();
  signer = await openSigner(desk);
  handlers = await loadHandlers();
  [author, editor, referee, stranger, administrator] = [
    await signedIn('T. Marrable', 'larkfield'), await signedIn('R. Amsel', 'counterfoil', 'editor'), await signedIn('H. Brightwater', 'oxbow'), await signedIn('L. Quennell', 'saltern'), await signedIn('P. Osgood', 'counterfoil', 'administrator'),
  ];
  token.author = await tokenFor(author, ...TOKEN_SCOPES);
  token.referee = await tokenFor(referee, ...TOKEN_SCOPES);
  token.stranger = await tokenFor(stranger, ...TOKEN_SCOPES);
  for (const scope of TOKEN_SCOPES) token[scope] = await tokenFor(author, scope);
  draft = await draftWithBursts(author.actor);
  reviewed = await inTriage(desk, author.actor);
  await withReferee(reviewed, editor.actor, referee.actor);
  const entering = await inDeciding(desk, { author: author.actor, editor: editor.actor, referee: referee.actor });
  must(await enterAtLevelOne(editor.actor, entering, 'Two bursts in'));
  const [done] = await signer.run();
  recordId = done?.outcome === 'signed' ? done.recordId : '';
}, 180_000);
afterAll(async () => {
  await signer?.close();
  await desk?.close();
});

const ask = (door: DoorName, what: Ask = {}): Promise<Response> => askDoor(handlers, door, what);
const asAuthor = (door: DoorName, what: Ask = {}): Promise<Response> => ask(door, { as: bearer(token.author), params: { id: draft }, ...what });
const bytesOf = async (answer: Promise<Response>): Promise<readonly [number, string]> => [(await answer).status, await (await answer).text()];
const read = async <T>(answer: Response | Promise<Response>): Promise<T> => (await (await answer).json()) as T;
const paramsFor = (door: DoorName, id: string): Record<string, string> => ({ id, ...(door.includes('{fileId}') && { fileId: UNKNOWN }), ...(door.includes('{uploadId}') && { uploadId: UNKNOWN, number: '0' }), ...(door.includes('{variationId}') && { variationId: UNKNOWN }), ...(door.includes('{runId}') && { runId: UNKNOWN }) });
const searchFor = (door: DoorName): string => (door.endsWith('/figures') ? `?run=${UNKNOWN}` : '');

/** Everything a write could have left behind. */
const everything = () =>
  desk.sql<Record<string, unknown>>(`select (select json_agg(s order by id) from submissions s) s, (select json_agg(r order by id) from revisions r) r, (select count(*) from audit_entries) a, (select count(*) from runs) n,
    (select count(*) from stored_files) f, (select count(*) from comments) c, (select count(*) from outbox) o, (select count(*) from idempotency_keys) k`);

const VARIATION = { claimId: 'C1', changes: { settings: { fLowHz: 20 } } };
const THREAD = { kind: 'question', visibility: 'authors', anchor: { claim: 'C1', at: null }, body: 'Which window?' };
/** A body that each door would take from the right person at the right time. */
const BODIES: Readonly<Partial<Record<DoorName, unknown>>> = {
  'PATCH /api/v1/submissions/{id}': { version: 2, title: 'x' },
  'DELETE /api/v1/submissions/{id}/files': { name: 'a.txt' },
  'PUT /api/v1/submissions/{id}/answers': { code: 'x', where: 'x', text: 'x', answer: 'x' },
  'PUT /api/v1/submissions/{id}/candidates': { runId: '00000000-0000-4000-8000-000000000000', claim: 'C1', candidate: 'x', answer: 'not-so' },
  'POST /api/v1/submissions/{id}/candidates': { runId: '00000000-0000-4000-8000-000000000000', claim: 'C1', candidate: 'x' },
  'POST /api/v1/submissions/{id}/uploads': { name: 'long.txt', bytes: 3, sha256: 'a'.repeat(64) },
  'POST /api/v1/submissions/{id}/withdraw': { reason: 'x' },
  'POST /api/v1/submissions/{id}/variations': VARIATION,
  'PUT /api/v1/submissions/{id}/variations/{variationId}/link': { readable: true },
  'POST /api/v1/submissions/{id}/threads': THREAD,
  'POST /api/v1/threads/{id}/comments': { body: 'x' },
  'POST /api/v1/threads/{id}/close': { closing: 'resolved' },
  'POST /api/v1/submissions/{id}/reports': REPORT,
  'POST /api/v1/submissions/{id}/notes': { body: 'x' },
  'POST /api/v1/invitations/{id}/answer': { accept: false, noConflict: false },
  'POST /api/v1/submissions/{id}/invitations': { refereeId: UNKNOWN },
  'POST /api/v1/submissions/{id}/decisions': { kind: 'set-aside', prose: 'x', typed: 'x' },
};
const form = (files: Readonly<Record<string, string>>): FormData => {
  const made = new FormData();
  for (const [name, text] of Object.entries(files)) made.append(name === 'claim.json' ? 'claim' : 'file', new Blob([text]), name);
  return made;
};
const folder = (title = 'Two bursts in white noise') => form({ 'claim.json': JSON.stringify({ ...burstSheet(), title }), ...burstFiles() });
const fitting = (door: DoorName): Ask => (contractOf(door).body === 'bytes' ? { raw: 'x' } : contractOf(door).body === 'stream' ? { raw: form({ 'x.txt': '1 2\n' }) } : { json: BODIES[door] ?? {} });

describe('the contract', () => {
  it('has every door under /api/v1, each served by a route, and no other', () => {
    const inTable = Object.keys({ ...DOORS, ...REVIEW_DOORS }).filter((door) => door.includes(' /api/v1/')).sort();
    expect([...doors].sort(), 'add the operation to lib/http/contract').toEqual(inTable);
    expect([...handlers.keys()].sort()).toEqual(inTable);
  });

  it('is what each route was made from', () => {
    for (const [door, handler] of handlers) expect((handler as unknown as { door?: string }).door, door).toBe(door);
  });
});

describe('a token without the scope', () => {
  it('is refused at every door before anything is looked up, and told which scope would do', async () => {
    const before = await everything();
    for (const door of doors) {
      const needed = scopesOfDoor(door);
      if (needed === null) continue;
      for (const scope of TOKEN_SCOPES.filter((s) => !needed.includes(s))) {
        const said = [];
        for (const id of [draft, reviewed, UNKNOWN]) {
          const answer = await ask(door, { as: bearer(token[scope]), params: paramsFor(door, id), search: searchFor(door), ...(door.startsWith('GET ') ? {} : fitting(door)) });
          expect(answer.status, `${door} with ${scope}`).toBe(403);
          expect(answer.headers.get('www-authenticate')).toBe(`Bearer realm="counterfoil", error="insufficient_scope", scope="${needed.join(' ')}"`);
          said.push(await answer.text());
        }
        expect(new Set(said).size, door).toBe(1);
      }
    }
    expect(await everything()).toEqual(before);
  });
});

describe('the wrong person with a good token', () => {
  it('gets of every submission what anybody gets of an unknown one, byte for byte, and writes nothing', async () => {
    const before = await everything();
    for (const door of doors.filter((d) => d.includes('/submissions/{id}') && scopesOfDoor(d)?.length)) {
      const say = async (id: string) => {
        const answer = await ask(door, { as: bearer(token.stranger), params: paramsFor(door, id), search: searchFor(door), ...(door.startsWith('GET ') ? {} : fitting(door)) });
        return [answer.status, [...answer.headers].sort(), await answer.text()];
      };
      const unknown = await say(UNKNOWN);
      expect(unknown[0], door).toBe(404);
      for (const id of [draft, reviewed]) expect(await say(id), door).toEqual(unknown);
    }
    expect(await everything()).toEqual(before);
  });
});

describe('somebody who is signed out', () => {
  it('is answered 401, or 404 where reading would tell, and reads what is public', async () => {
    for (const door of doors) {
      const answer = await ask(door, { as: { origin: 'http://127.0.0.1:3210' }, params: paramsFor(door, draft), search: searchFor(door), ...(door.startsWith('GET ') ? {} : fitting(door)) });
      expect(scopesOfDoor(door) === null ? [200, 404] : door.startsWith('GET ') ? [401, 404] : [401], door).toContain(answer.status);
    }
  });
});

describe('malformed requests', () => {
  const GARBAGE = ['{', '[1]', '"x"', 'null', '1e400', `{"a":${'['.repeat(5000)}${']'.repeat(5000)}}`, '{"__proto__":{"x":1}}', '\u0000', '{"body":"\\ud800"}'];
  const IDS = ['x', '1', '%00', '..', '../..', `${UNKNOWN}x`, 'é', 'x'.repeat(3000), "1' or '1'='1"];
  const QUERIES = ['?limit=0', '?limit=101', '?limit=x', '?limit=1e9', '?cursor=', '?cursor=x', '?cursor=%00', `?cursor=${'x'.repeat(70)}`, '?colour=red', '?limit=1&limit=2'];

  it('are a 4xx problem at every door, with a JSON Pointer to each fault, and never a 500', async () => {
    const before = await everything();
    for (const door of writes.filter((d) => contractOf(d).body && typeof contractOf(d).body !== 'string'))
      for (const raw of GARBAGE) {
        const answer = await asAuthor(door, { raw, headers: { 'content-type': 'application/json' }, params: paramsFor(door, draft) });
        expect(answer.status, `${door} ${raw.slice(0, 20)}`).toBeGreaterThanOrEqual(400);
        const { problems = [] } = await read<{ problems?: { where: string }[] }>(answer);
        for (const { where } of problems) expect(where, door).toMatch(/^(\/([^~/]|~[01])*)*$/);
      }
    for (const door of writes.filter((d) => contractOf(d).body !== 'bytes')) {
      const answer = await asAuthor(door, { raw: 'x', headers: { 'content-type': 'text/plain' }, params: paramsFor(door, draft) });
      expect([403, 415], door).toContain(answer.status);
    }
    expect(await everything()).toEqual(before);
  });

  it('an id that cannot exist is answered like one that does not', async () => {
    for (const door of doors.filter((d) => d.includes('{id}')))
      for (const id of IDS) {
        const answer = await asAuthor(door, { params: paramsFor(door, id), search: searchFor(door), ...(door.startsWith('GET ') ? {} : fitting(door)) });
        expect([403, 404], `${door} ${id.slice(0, 20)}`).toContain(answer.status);
      }
  });

  it('a parameter of a list that is not understood is named', async () => {
    for (const door of doors.filter((d) => d.startsWith('GET ') && contractOf(d).query && !d.endsWith('/figures')))
      for (const search of QUERIES) {
        const answer = await ask(door, { as: bearer(token.author), params: { id: reviewed }, search });
        if (search === '?limit=1&limit=2') continue;
        expect(answer.status, `${door} ${search.slice(0, 30)}`).toBe(422);
        expect((await read<{ problems: { where: string }[] }>(answer)).problems[0]?.where).toMatch(/^(\/(limit|cursor)|)$/);
      }
  });

  it('an Idempotency-Key of another form is refused and nothing done', async () => {
    const before = await everything();
    for (const key of ['short', 'x'.repeat(201), 'with a space in it']) expect((await asAuthor('POST /api/v1/submissions/{id}/check', { headers: { 'idempotency-key': key } })).status).toBe(422);
    expect(await everything()).toEqual(before);
  });
});

describe('an entity tag', () => {
  it('says 304 to who holds the same bytes, at every door that gives JSON', async () => {
    for (const door of ['GET /api/v1/submissions', 'GET /api/v1/submissions/{id}', 'GET /api/v1/submissions/{id}/runs', 'GET /api/v1/records', 'GET /api/v1/openapi.json'] as const) {
      const first = await asAuthor(door);
      const etag = first.headers.get('etag') ?? '';
      expect(etag, door).toMatch(/^"[^"]+"$/);
      const again = await asAuthor(door, { headers: { 'if-none-match': `"other", ${etag}` } });
      expect([again.status, await again.text()], door).toEqual([304, '']);
      expect((await asAuthor(door, { headers: { 'if-none-match': '"other"' } })).status).toBe(200);
    }
  });

  it('holds an edit to the draft it was made on', async () => {
    const id = await draftWithBursts(author.actor);
    const edit = (json: unknown, headers: Record<string, string> = {}) => asAuthor('PATCH /api/v1/submissions/{id}', { params: { id }, json, headers });
    const etag = (await asAuthor('GET /api/v1/submissions/{id}', { params: { id } })).headers.get('etag') ?? '';
    expect((await edit({ title: 'No version' })).status).toBe(428);
    expect((await edit({ title: 'Weak' }, { 'if-match': `W/${etag}` })).status).toBe(412);
    expect((await edit({ title: 'First' }, { 'if-match': `"other", ${etag}` })).status).toBe(200);
    const stale = await edit({ title: 'Second' }, { 'if-match': etag });
    expect([stale.status, (await read<{ detail: string }>(stale)).detail]).toEqual([412, expect.stringMatching(/version 3 now/)]);
    expect((await edit({ title: 'Any' }, { 'if-match': '*' })).status).toBe(200);
    expect((await asAuthor('DELETE /api/v1/submissions/{id}/files', { params: { id }, json: { name: 'a.txt' }, headers: { 'if-match': etag } })).status).toBe(412);
    expect((await asAuthor('POST /api/v1/submissions/{id}/lodge', { params: { id }, headers: { 'if-match': etag } })).status).toBe(412);
    expect((await read<{ title: string }>(asAuthor('GET /api/v1/submissions/{id}', { params: { id } }))).title).toBe('Any');
  });
});

describe('what a draft holds beside its version', () => {
  it('is part of what lodging is held to: a file changed meanwhile is 412', async () => {
    const id = await draftWithBursts(author.actor);
    const etag = (await asAuthor('GET /api/v1/submissions/{id}', { params: { id } })).headers.get('etag') ?? '';
    must(await addFile(author.actor, id, { name: 'notes.txt', stream: Readable.from('1 2\n') }));
    const lodged = await asAuthor('POST /api/v1/submissions/{id}/lodge', { params: { id }, headers: { 'if-match': etag } });
    expect([lodged.status, (await read<{ detail: string }>(lodged)).detail]).toEqual([412, expect.stringMatching(/or its files/)]);
  });
});

describe('text that no database keeps', () => {
  it('is refused with its place in any body, in a sheet and in a cursor, and is never a defect of ours', async () => {
    const id = await draftWithBursts(author.actor);
    for (const bad of ['a\u0000b', 'half \ud800 of a pair']) {
      const answer = await asAuthor('PATCH /api/v1/submissions/{id}', { params: { id }, json: { version: 2, title: bad } });
      expect([answer.status, (await read<{ problems: unknown[] }>(answer)).problems]).toEqual([422, [expect.objectContaining({ code: 'http/bad-text', where: '/title' })]]);
    }
    const deep = await asAuthor('PATCH /api/v1/submissions/{id}', { params: { id }, raw: `{"version":2,"sheet":${'['.repeat(5000)}${']'.repeat(5000)}}`, headers: { 'content-type': 'application/json' } });
    expect(deep.status).toBe(422);
    expect((await asAuthor('GET /api/v1/records', { search: '?cursor=AAAA' })).status).toBe(422);
  });
});

describe('the same key', () => {
  const keyed = (door: DoorName, key: string, what: Ask): Promise<Response> => asAuthor(door, { ...what, headers: { ...what.headers, 'idempotency-key': key } });
  const count = async (table: string): Promise<number> => (await desk.sql<{ n: number }>(`select count(*)::int as n from ${table}`))[0]?.n ?? 0;

  it('sent twice at once acts once, and the second gets the first answer', async () => {
    const id = await draftWithBursts(author.actor);
    const both = await Promise.all([0, 1].map(() => keyed('POST /api/v1/submissions/{id}/withdraw', `withdraw-${id}`, { params: { id }, json: { reason: 'Sent twice.' } })));
    expect(both.map((answer) => answer.status)).toEqual([200, 200]);
    expect(both.filter((answer) => answer.headers.has('idempotency-replayed'))).toHaveLength(1);
  });

  it('gives an upload’s first answer again, whatever boundary the sender drew, and a conflict to another upload', async () => {
    const before = await count('submissions');
    const first = await keyed('POST /api/v1/submissions', 'folder-once', { raw: folder() });
    const again = await keyed('POST /api/v1/submissions', 'folder-once', { raw: folder() });
    expect([first.status, again.status, again.headers.get('idempotency-replayed'), again.headers.get('location')]).toEqual([201, 201, 'true', first.headers.get('location')]);
    expect(await again.text()).toBe(await first.text());
    expect((await keyed('POST /api/v1/submissions', 'folder-once', { raw: folder('Another title') })).status).toBe(409);
    expect(await count('submissions')).toBe(before + 1);
  });

  it('sent twice at once makes one draft, and keeps no bytes of the other', async () => {
    const before = [await count('submissions'), await count('stored_files')];
    const both = await Promise.all([1, 2].map(() => keyed('POST /api/v1/submissions', 'folder-twice-at-once', { raw: folder('At once') })));
    expect(both.map((r) => r.status)).toEqual([201, 201]);
    expect(new Set(await Promise.all(both.map((r) => r.text()))).size).toBe(1);
    expect([await count('submissions'), await count('stored_files')]).toEqual([(before[0] ?? 0) + 1, (before[1] ?? 0) + 3]);
  });

  it('adds files once, all or none', async () => {
    const files = { 'one.txt': '1\n', 'two.txt': '2\n' };
    const first = await keyed('POST /api/v1/submissions/{id}/files', 'files-once', { raw: form(files) });
    const again = await keyed('POST /api/v1/submissions/{id}/files', 'files-once', { raw: form(files) });
    expect([first.status, await again.text()]).toEqual([201, await first.text()]);
    const half = await asAuthor('POST /api/v1/submissions/{id}/files', { raw: form({ 'three.txt': '3\n', '../four.txt': '4\n' }) });
    expect(half.status).toBe(422);
    const { revision } = await read<{ revision: { files: { name: string }[] } }>(asAuthor('GET /api/v1/submissions/{id}'));
    expect(revision.files.map((f) => f.name)).not.toContain('three.txt');
  });

  it('acts once at each door that takes a body: variation, thread, comment', async () => {
    const inReview = { params: { id: reviewed } };
    for (const [door, json, table] of [['POST /api/v1/submissions/{id}/variations', VARIATION, 'variations'], ['POST /api/v1/submissions/{id}/threads', THREAD, 'threads']] as const) {
      const before = await count(table);
      const [first, again] = [await keyed(door, `once-${table}`, { ...inReview, json }), await keyed(door, `once-${table}`, { ...inReview, json })];
      expect([first.status, again.status], door).toEqual([first.status, contractOf(door).status]);
      expect(await again.text()).toBe(await first.text());
      expect(await count(table)).toBe(before + 1);
    }
    await desk.runAll();
  });

  it('is another’s own: two people may use the same', async () => {
    const mine = await keyed('POST /api/v1/submissions', 'a-key-of-two', { raw: folder('Mine') });
    const theirs = await ask('POST /api/v1/submissions', { as: bearer(token.stranger), raw: folder('Theirs'), headers: { 'idempotency-key': 'a-key-of-two' } });
    expect(await theirs.text()).not.toBe(await mine.text());
  });

  it('is free again after a day, and its old answer is gone', async () => {
    const first = await keyed('POST /api/v1/submissions', 'a-day-long', { raw: folder('Day one') });
    // Not even the owner changes a kept answer, so the day passes with the guard off.
    for (const statement of ['alter table idempotency_keys disable trigger append_only_rows', `update idempotency_keys set created_at = now() - interval '25 hours' where key = 'a-day-long'`, 'alter table idempotency_keys enable trigger append_only_rows']) await desk.sql(statement);
    const second = await keyed('POST /api/v1/submissions', 'a-day-long', { raw: folder('Day two') });
    expect([second.status, second.headers.get('idempotency-replayed')]).toEqual([201, null]);
    expect(await second.text()).not.toBe(await first.text());
    expect(await count(`idempotency_keys where created_at < now() - interval '24 hours'`)).toBe(0);
  });

  it('keeps no refusal', async () => {
    expect((await keyed('POST /api/v1/submissions', 'mend-and-retry', { raw: form({ 'a.txt': '1\n' }) })).status).toBe(422);
    expect((await keyed('POST /api/v1/submissions', 'mend-and-retry', { raw: folder('Mended') })).status).toBe(201);
  });
});

describe('lists', () => {
  interface Listed { readonly items: readonly { readonly id: string }[]; readonly next: string | null }
  const walk = async (door: DoorName, id: string): Promise<string[]> => {
    const ids: string[] = [];
    let search = '?limit=1';
    for (let pages = 0; pages < 50; pages++) {
      const answer = await asAuthor(door, { params: { id }, search });
      const link = answer.headers.get('link');
      const { items, next } = await read<Listed>(answer);
      ids.push(...items.map((i) => i.id));
      expect(link).toBe(next === null ? null : `<${link?.slice(1, link.indexOf('>'))}>; rel="next"`);
      if (next === null) return ids;
      search = link?.slice(link.indexOf('?'), link.indexOf('>')) ?? '';
      expect(new URLSearchParams(search).get('cursor')).toBe(next);
    }
    throw new Error('the list has no end');
  };

  it.each(['GET /api/v1/submissions', 'GET /api/v1/submissions/{id}/runs', 'GET /api/v1/submissions/{id}/variations', 'GET /api/v1/submissions/{id}/threads', 'GET /api/v1/records'] as const)('%s page by page is the whole list, each once', async (door) => {
    for (const body of ['Why?', 'And why?']) await asAuthor('POST /api/v1/submissions/{id}/threads', { params: { id: reviewed }, json: { ...THREAD, body } });
    const whole = (await read<Listed>(asAuthor(door, { params: { id: reviewed }, search: '?limit=100' }))).items.map((i) => i.id);
    expect(whole.length).toBeGreaterThan(0);
    expect(await walk(door, reviewed)).toEqual(whole);
  });

  it('a cursor of another list is refused', async () => {
    const { next } = await read<Listed>(asAuthor('GET /api/v1/submissions', { search: '?limit=1' }));
    expect((await asAuthor('GET /api/v1/submissions/{id}/runs', { params: { id: reviewed }, search: `?cursor=${next}` })).status).toBe(422);
  });
});

describe('an archive', () => {
  const packed = async (entries: Readonly<Record<string, string>>): Promise<FormData> => {
    const zip = new ZipWriter(new BlobWriter());
    for (const [name, text] of Object.entries(entries)) await zip.add(name, new TextReader(text));
    const made = new FormData();
    made.append('file', await zip.close(), 'claim.zip');
    return made;
  };
  const sheet = { 'claim.json': JSON.stringify(burstSheet()) };

  it('is taken where a folder is', async () => {
    const made = await asAuthor('POST /api/v1/submissions', { raw: await packed({ ...sheet, ...burstFiles() }) });
    expect(made.status).toBe(201);
    const { revision } = await read<{ revision: { files: { name: string }[] } }>(asAuthor('GET /api/v1/submissions/{id}', { params: { id: (await read<{ id: string }>(made)).id } }));
    expect(revision.files.map((f) => f.name)).toEqual(Object.keys(burstFiles()).sort());
  });

  it.each(['../x.txt', '/etc/x.txt', 'a/../../x.txt', 'C:\\x.txt'])('with the path %s is refused whole', async (name) => {
    const before = await everything();
    expect((await asAuthor('POST /api/v1/submissions', { raw: await packed({ ...sheet, [name]: '1\n' }) })).status).toBe(422);
    expect(await everything()).toEqual(before);
  });
});

describe('an archive that swells', () => {
  it('is refused: what an entry says of its length is held against what comes out', async () => {
    const before = await everything();
    const zip = new ZipWriter(new BlobWriter(), { level: 9 });
    await zip.add('claim.json', new TextReader(JSON.stringify(burstSheet())));
    await zip.add('bomb.txt', new TextReader('0'.repeat(40_000_000)));
    const bytes = Buffer.from(await (await zip.close()).arrayBuffer());
    expect(bytes.length).toBeLessThan(100_000);
    // The length in the two headers of the entry is made to lie.
    for (let at = bytes.indexOf('bomb.txt'); at >= 0; at = bytes.indexOf('bomb.txt', at + 1)) {
      const header = bytes.lastIndexOf('PK', at);
      const isLocal = bytes.readUInt16LE(header + 2) === 0x0403;
      bytes.writeUInt32LE(10, header + (isLocal ? 22 : 24));
    }
    const made = new FormData();
    made.append('file', new Blob([bytes]), 'claim.zip');
    expect((await asAuthor('POST /api/v1/submissions', { raw: made })).status).toBe(422);
    expect(await everything()).toEqual(before);
  });

  it('with more files than a submission holds is refused', async () => {
    const many = Object.fromEntries(Array.from({ length: 70 }, (_, i) => [`f${i}.txt`, '1\n']));
    const zip = new ZipWriter(new BlobWriter());
    for (const [name, text] of Object.entries({ 'claim.json': JSON.stringify(burstSheet()), ...many })) await zip.add(name, new TextReader(text));
    const made = new FormData();
    made.append('file', await zip.close(), 'claim.zip');
    expect((await asAuthor('POST /api/v1/submissions', { raw: made })).status).toBe(422);
  });
});

describe('every other answer fits its schema', () => {
  it('for the author by token', async () => {
    expect((await asAuthor('POST /api/v1/submissions/{id}/check')).status).toBe(202);
    const events = await asAuthor('GET /api/v1/submissions/{id}/events');
    await events.body?.cancel();
    await desk.runAll();
    expect((await asAuthor('GET /api/v1/submissions/{id}/events')).status).toBe(204);
    for (const door of ['GET /api/v1/submissions', 'GET /api/v1/submissions/{id}', 'GET /api/v1/submissions/{id}/sheet', 'GET /api/v1/submissions/{id}/runs'] as const) expect((await asAuthor(door)).status, door).toBe(200);
    const { items: [run] } = await read<{ items: { id: string }[] }>(asAuthor('GET /api/v1/submissions/{id}/runs'));
    expect((await asAuthor('GET /api/v1/submissions/{id}/figures', { search: `?run=${run?.id}` })).status).toBe(200);
    const { revision } = await read<{ revision: { files: { id: string }[] } }>(asAuthor('GET /api/v1/submissions/{id}'));
    expect((await asAuthor('GET /api/v1/submissions/{id}/files/{fileId}', { params: { id: draft, fileId: revision.files[0]?.id ?? '' } })).status).toBe(200);
    const arrays = new FormData();
    arrays.append('file', new Blob([readFileSync('tests/unit/formats/fixtures/layouts.h5')]), 'layouts.h5');
    const [stored] = await read<{ id: string }[]>(asAuthor('POST /api/v1/submissions/{id}/files', { raw: arrays }));
    const held = await read<StructureView>(asAuthor('GET /api/v1/submissions/{id}/files/{fileId}/structure', { params: { id: draft, fileId: stored?.id ?? '' } }));
    expect(held.entries.find(({ path }) => path === '/R0100/l2_m2')).toMatchObject({ shape: [40, 3], refusal: null });
    expect((await asAuthor('GET /api/v1/submissions/{id}/files/{fileId}/structure', { params: { id: draft, fileId: revision.files[0]?.id ?? '' } })).status).toBe(422);
    const absent = await bytesOf(asAuthor('GET /api/v1/submissions/{id}/files/{fileId}/structure', { params: { id: draft, fileId: UNKNOWN } }));
    expect(absent[0]).toBe(404);
    for (const [who, where] of [['stranger', draft], ['referee', draft], ['author', reviewed]] as const)
      expect(await bytesOf(ask('GET /api/v1/submissions/{id}/files/{fileId}/structure', { as: bearer(token[who]), params: { id: where, fileId: stored?.id ?? '' } })), `${who} of ${where}`).toEqual(absent);
    const long = Buffer.from('1 2\n3 4\n');
    const announced = { name: 'long.txt', bytes: long.length, sha256: createHash('sha256').update(long).digest('hex') };
    const begun = async () => (await read<{ upload: { id: string } }>(asAuthor('POST /api/v1/submissions/{id}/uploads', { json: announced }))).upload.id;
    expect((await asAuthor('DELETE /api/v1/submissions/{id}/uploads/{uploadId}', { params: { id: draft, uploadId: await begun() } })).status).toBe(200);
    const upload = { id: draft, uploadId: await begun(), number: '0' };
    expect((await asAuthor('PUT /api/v1/submissions/{id}/uploads/{uploadId}/parts/{number}', { params: upload, raw: long })).status).toBe(200);
    expect((await asAuthor('POST /api/v1/submissions/{id}/uploads/{uploadId}', { params: upload })).status).toBe(201);
    expect((await asAuthor('POST /api/v1/submissions/{id}/uploads', { json: announced })).status).toBe(200);
    for (const name of ['long.txt', 'layouts.h5']) expect((await asAuthor('DELETE /api/v1/submissions/{id}/files', { json: { name } })).status, name).toBe(200);
    expect((await asAuthor('POST /api/v1/submissions/{id}/lodge')).status).toBe(202);
    expect((await asAuthor('POST /api/v1/submissions/{id}/withdraw', { json: { reason: 'A better one follows.' } })).status).toBe(200);
    for (const door of ['GET /api/v1/submissions/{id}', 'GET /api/v1/submissions/{id}/desk', 'GET /api/v1/submissions/{id}/threads', 'GET /api/v1/submissions/{id}/variations'] as const) expect((await asAuthor(door, { params: { id: reviewed } })).status, door).toBe(200);
  });

  it('and a file that cannot be read is told by its own name, whoever else has the same bytes', async () => {
    const other = await draftWithBursts(stranger.actor);
    const broken = readFileSync('tests/unit/formats/fixtures/layouts.h5').subarray(0, 30_000);
    const troubleOf = async (who: 'author' | 'stranger', id: string, name: string): Promise<readonly string[]> => {
      const form = new FormData();
      form.append('file', new Blob([broken]), name);
      const as = bearer(token[who]);
      const [stored] = await read<{ id: string }[]>(ask('POST /api/v1/submissions/{id}/files', { as, params: { id }, raw: form }));
      return (await read<StructureView>(ask('GET /api/v1/submissions/{id}/files/{fileId}/structure', { as, params: { id, fileId: stored?.id ?? '' } }))).trouble;
    };
    const mine = await draftWithBursts(author.actor);
    expect(await troubleOf('author', mine, 'mine.h5')).toEqual([expect.stringMatching(/^mine\.h5: saw a file that ends before/)]);
    expect(await troubleOf('stranger', other, 'other.h5')).toEqual([expect.stringMatching(/^other\.h5: saw a file that ends before/)]);
  });

  it('for a variation: one’s own beside the official number, and opened by its link once there is a record', async () => {
    const offered = await read<{ readings: { id: string; factor: number | null }[] }>(asAuthor('GET /api/v1/submissions/{id}/variations', { params: { id: reviewed }, search: '?claimId=C1' }));
    expect(offered.readings.find(({ id }) => id === 'C55:per-cent')).toMatchObject({ factor: 100 });
    const { variationId } = await read<{ variationId: string }>(asAuthor('POST /api/v1/submissions/{id}/variations', { params: { id: reviewed }, json: { ...VARIATION, changes: { settings: { fLowHz: 40, taper: null }, noise: { curve: 'G2' } }, note: 'Another curve.' } }));
    const one = { params: { id: reviewed, variationId } };
    expect(await read(asAuthor('GET /api/v1/submissions/{id}/variations/{variationId}', one))).toMatchObject({ id: variationId, visibility: 'private', run: { state: 'queued' }, official: { id: 'C1' } });
    await desk.runAll();
    expect((await read<{ run: { state: string } }>(asAuthor('GET /api/v1/submissions/{id}/variations/{variationId}', one))).run.state).toBe('measured');
    expect((await ask('GET /api/v1/submissions/{id}/variations/{variationId}', { as: bearer(token.referee), ...one })).status).toBe(404);
    expect((await asAuthor('PUT /api/v1/submissions/{id}/variations/{variationId}/link', { ...one, json: { readable: true } })).status).toBe(409);
    const [{ submissionId } = { submissionId: '' }] = await desk.sql<{ submissionId: string }>('select submission_id as "submissionId" from records where id = $1', recordId);
    const of = await read<{ variationId?: string }>(asAuthor('POST /api/v1/submissions/{id}/variations', { params: { id: submissionId }, json: VARIATION }));
    await desk.runAll();
    expect(of).toHaveProperty('variationId');
    const shared = { params: { id: submissionId, variationId: of.variationId ?? '' } };
    const asVisitor = async () => (await ask('GET /api/v1/submissions/{id}/variations/{variationId}', { as: {}, ...shared })).status;
    expect(await asVisitor()).toBe(404);
    expect(await read(asAuthor('PUT /api/v1/submissions/{id}/variations/{variationId}/link', { ...shared, json: { readable: true } }))).toEqual({ visibility: 'link' });
    expect(await asVisitor()).toBe(200);
  });

  it('for everybody', async () => {
    const public_ = { as: {}, params: { id: recordId } };
    expect((await read<{ items: { id: string }[] }>(ask('GET /api/v1/records', { search: '?verdict=agrees' }))).items.map((r) => r.id)).toEqual([recordId]);
    for (const door of ['GET /api/v1/records/{id}', 'GET /api/v1/records/{id}/badge.svg'] as const) expect((await ask(door, public_)).status, door).toBe(200);
    expect((await ask('GET /api/v1/openapi.json')).status).toBe(200);
  });

  it('for referee, editor and administrator', async () => {
    const id = { params: { id: reviewed } };
    const asReferee = (door: DoorName, what: Ask = {}) => ask(door, { as: bearer(token.referee), ...id, ...what });
    const asEditor = (door: DoorName, what: Ask = {}) => ask(door, { as: session(editor.cookie), ...id, ...what });
    const { threadId } = await read<{ threadId: string }>(asReferee('POST /api/v1/submissions/{id}/threads', { json: { ...THREAD, kind: 'must-change' } }));
    expect((await ask('POST /api/v1/threads/{id}/comments', { as: bearer(token.author), params: { id: threadId }, json: { body: 'As declared.' } })).status).toBe(201);
    expect((await asReferee('POST /api/v1/threads/{id}/close', { params: { id: threadId }, json: { closing: 'resolved' } })).status).toBe(200);
    expect((await asReferee('POST /api/v1/submissions/{id}/notes', { json: { body: 'For the editor.' } })).status).toBe(201);
    const another = await signedIn('D. Fenn', 'tarn');
    for (const door of ['GET /api/v1/submissions/{id}/invitations', 'GET /api/v1/submissions/{id}/desk', 'GET /api/v1/queue'] as const) expect((await asEditor(door)).status, door).toBe(200);
    const invited = await asEditor('POST /api/v1/submissions/{id}/invitations', { json: { refereeId: another.actor.userId } });
    expect(invited.status).toBe(201);
    expect([200, 412]).toContain((await asEditor('POST /api/v1/submissions/{id}/reminders')).status);
    expect((await asReferee('POST /api/v1/submissions/{id}/reports', { json: REPORT })).status).toBe(201);
    expect((await asEditor('GET /api/v1/submissions/{id}/decisions')).status).toBe(200);
    expect((await asEditor('POST /api/v1/submissions/{id}/decisions', { json: { kind: 'back-with-author', prose: 'Please widen the band.', typed: 'Two bursts in' } })).status).toBe(201);
    expect((await ask('POST /api/v1/submissions/{id}/revise', { as: bearer(token.author), ...id })).status).toBe(201);
    expect((await ask('GET /api/v1/jobs/failed', { as: session(administrator.cookie) })).status).toBe(200);
    expect((await ask('POST /api/v1/jobs/{id}/retry', { as: session(administrator.cookie), params: { id: randomUUID() } })).status).toBe(404);
  });

  it('an editor’s token is a member’s', async () => {
    const as = bearer(await tokenFor(editor, ...TOKEN_SCOPES));
    expect((await ask('GET /api/v1/queue', { as })).status).toBe(403);
    expect((await ask('GET /api/v1/submissions/{id}', { as, params: { id: reviewed } })).status).toBe(404);
  });
});
