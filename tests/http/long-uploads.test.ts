import { createHash, randomBytes } from 'node:crypto';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { ok } from '@/lib/kernel/result';
import { VISITOR, type Actor, type SignedInActor } from '@/lib/policy/actor';
import { addFiles } from '@/lib/services/files/add-files';
import { beginUpload, type BegunUpload } from '@/lib/services/files/begin-upload';
import { fileStore } from '@/lib/services/files/file-store';
import { restoreFile } from '@/lib/services/files/restore-file';
import { removeFile } from '@/lib/services/files/remove-file';
import { finishUpload, letGoOfUpload, listOpenUploads } from '@/lib/services/files/finish-upload';
import { takePart } from '@/lib/services/files/take-part';
import { openFile } from '@/lib/services/files/open-file';
import { PART_BYTES } from '@/lib/services/files/upload-view';
import { getDraft } from '@/lib/services/submissions/get-draft';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { clearUploads } from '@/lib/worker/handlers/clear-uploads';
import { createS3Store } from '@/lib/storage/s3-store';
import { POST as begin } from '@/app/api/v1/submissions/[id]/uploads/route';
import { DELETE as letGo, POST as finish } from '@/app/api/v1/submissions/[id]/uploads/[uploadId]/route';
import { PUT as putPart } from '@/app/api/v1/submissions/[id]/uploads/[uploadId]/parts/[number]/route';
import { computeHere, draftWithBursts, must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

/** Who is signed in; sign-in itself has its own tests. */
let actor: Actor = VISITOR;
vi.mock('@/lib/auth/current-actor', () => ({ currentActor: () => Promise.resolve(ok(actor)) }));

let desk: ServiceDesk;
let author: SignedInActor;
let draft: string;
const bytes = randomBytes(2 * PART_BYTES + 1234);
const sha256 = createHash('sha256').update(bytes).digest('hex');
const announced = { name: 'long/modes.txt', bytes: bytes.length, sha256 };

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  draft = await draftWithBursts(author);
});
beforeEach(() => void (actor = author));
afterAll(() => desk.close());

const json = (body: unknown) => ({ method: 'POST', headers: { origin: ORIGIN, 'content-type': 'application/json' }, body: JSON.stringify(body) });
const announce = (file: unknown = announced) => begin(new Request(`${ORIGIN}/x`, json(file)), { params: Promise.resolve({ id: draft }) });
const begun = async (file?: unknown) => (await (await announce(file)).json()) as BegunUpload;

const put = (uploadId: string, number: number, body: Uint8Array | ReadableStream<Uint8Array>) =>
  putPart(new Request(`${ORIGIN}/x`, { method: 'PUT', headers: { origin: ORIGIN }, body, duplex: 'half' } as RequestInit), { params: Promise.resolve({ id: draft, uploadId, number: String(number) }) });
const part = (number: number): Uint8Array => bytes.subarray(number * PART_BYTES, (number + 1) * PART_BYTES);
const end = (uploadId: string, handler: typeof finish = finish, more: Record<string, string> = {}) => handler(new Request(`${ORIGIN}/x`, { method: handler === finish ? 'POST' : 'DELETE', headers: { origin: ORIGIN, ...more } }), { params: Promise.resolve({ id: draft, uploadId }) });
const detailOf = async (answer: Response) => ((await answer.json()) as { detail: string }).detail;
const hashOf = (body: string | Buffer): string => createHash('sha256').update(body).digest('hex');
const stored = async (prefix: string) => (await desk.sql<{ storage_key: string }>('select storage_key from upload_parts')).filter(({ storage_key }) => storage_key.startsWith(prefix));

/** Gives some bytes and then breaks, as a connection does. */
const broken = (some: Uint8Array): ReadableStream<Uint8Array> => new ReadableStream({ start: (c) => c.enqueue(some), pull: (c) => c.error(new Error('aborted')) });

describe('a long file', () => {
  let uploadId = '';

  it('is announced, and nothing of it is there yet', async () => {
    const answer = await begun();
    expect(answer.upload).toMatchObject({ name: announced.name, partBytes: PART_BYTES, arrived: [] });
    uploadId = answer.upload?.id ?? '';
  });

  it('goes on where the connection broke: the part on its way is lost, those before it are not', async () => {
    expect((await put(uploadId, 0, part(0))).status).toBe(200);
    const cut = await put(uploadId, 1, broken(part(1).subarray(0, 100_000))).catch(() => null);
    expect(cut?.status).toBe(422);
    expect((await begun()).upload).toMatchObject({ id: uploadId, arrived: [0] });
    expect(must(await listOpenUploads(author, draft)).map((u) => [u.name, u.arrived])).toEqual([[announced.name, [0]]]);
  });

  it('refuses to be finished with parts missing, and a part of another size', async () => {
    const early = await end(uploadId);
    expect([early.status, ((await early.json()) as { detail: string }).detail]).toEqual([412, `2 of 3 parts of ${announced.name} are not here yet. Send them first.`]);
    expect((await put(uploadId, 1, part(1).subarray(1))).status).toBe(422);
    expect((await put(uploadId, 9, part(1))).status).toBe(404);
    expect((await begun()).upload?.arrived).toEqual([0]);
  });

  it('comes back bit for bit when the rest has come, a part sent twice among it', async () => {
    for (const number of [2, 1, 1]) expect((await put(uploadId, number, part(number))).status).toBe(200);
    const done = await end(uploadId);
    expect(done.status).toBe(201);
    const file = (await done.json()) as FileView;
    expect(file).toMatchObject({ name: announced.name, bytes: bytes.length, sha256 });
    const there = must(await openFile(author, draft, file.id));
    const chunks: Buffer[] = [];
    for await (const chunk of await there.open()) chunks.push(chunk as Buffer);
    expect(Buffer.concat(chunks).equals(bytes)).toBe(true);
    expect(await desk.sql('select 1 from uploads')).toEqual([]);
    expect(await stored('parts/')).toEqual([]);
  });

  it('whose bytes are here already is only given its name', async () => {
    const again = await begun({ ...announced, name: 'copy.txt' });
    expect(again).toMatchObject({ upload: null, file: { name: 'copy.txt', sha256 } });
    expect(must(await getDraft(author, draft)).revision.files.map((f) => f.name)).toContain('copy.txt');
  });

  it('taken out of the draft is brought back by its id alone', async () => {
    const file = must(await getDraft(author, draft)).revision.files.find((f) => f.name === 'copy.txt');
    must(await removeFile(author, draft, { name: 'copy.txt' }));
    expect(must(await restoreFile(author, draft, { name: 'copy.txt', fileId: file?.id ?? '' }))).toEqual(file);
    expect((await restoreFile(author, draft, { name: '../x', fileId: file?.id ?? '' })).ok).toBe(false);
    expect((await restoreFile(await desk.person('Somebody Else'), draft, { name: 'x', fileId: file?.id ?? '' })).ok).toBe(false);
  });

  it('that is not what was announced is refused, and nothing of it is kept', async () => {
    const other = randomBytes(1000);
    const { upload } = await begun({ name: 'other.txt', bytes: 1000, sha256: createHash('sha256').update('something else').digest('hex') });
    expect((await put(upload?.id ?? '', 0, other)).status).toBe(200);
    const answer = await end(upload?.id ?? '');
    expect(answer.status).toBe(422);
    expect(((await answer.json()) as { detail: string }).detail).toContain(`expected ${createHash('sha256').update('something else').digest('hex')}`);
    expect(await desk.sql('select 1 from uploads')).toEqual([]);
  });

  it('is nobody else’s business', async () => {
    const { upload } = await begun({ name: 'mine.txt', bytes: 10, sha256: 'a'.repeat(64) });
    actor = await desk.person('E. Stranger');
    expect((await put(upload?.id ?? '', 0, Buffer.alloc(10))).status).toBe(404);
    expect((await end(upload?.id ?? '')).status).toBe(404);
    actor = VISITOR;
    expect((await put(upload?.id ?? '', 0, Buffer.alloc(10))).status).toBe(401);
    actor = author;
    expect((await end(upload?.id ?? '', letGo)).status).toBe(200);
    expect((await end(upload?.id ?? '', letGo)).status).toBe(404);
  });

  it('longer than the limit is refused before a byte is sent', async () => {
    expect((await announce({ ...announced, bytes: 512 * 1024 * 1024 + 1 })).status).toBe(422);
  });

  it('that nobody came back for is cleared away by the worker, bytes and rows', async () => {
    const { upload } = await begun({ name: 'left.txt', bytes: 10, sha256: 'b'.repeat(64) });
    const { upload: young } = await begun({ name: 'young.txt', bytes: 10, sha256: 'c'.repeat(64) });
    for (const id of [upload?.id, young?.id]) expect((await put(id ?? '', 0, Buffer.alloc(10))).status).toBe(200);
    const [key] = await desk.sql<{ storage_key: string }>('select storage_key from upload_parts where upload_id = $1', upload?.id);
    await desk.sql(`update uploads set expires_at = now() - interval '1 minute' where id = $1`, upload?.id);
    const store = createS3Store(desk.store.env);
    await clearUploads({}, { database: desk.worker, store, mail: { SMTP_URL: 'smtp://127.0.0.1:9', MAIL_FROM: 'x@y.example' }, compute: computeHere, signal: new AbortController().signal }, 1);
    expect(await store.head(key?.storage_key ?? '')).toBeUndefined();
    expect((await desk.sql<{ name: string }>('select name from uploads')).map((u) => u.name)).toEqual(['young.txt']);
    expect((await desk.sql('select 1 from upload_parts')).length).toBe(1);
    expect((await put(upload?.id ?? '', 0, Buffer.alloc(10))).status).toBe(404);
  });
});

describe('a finish that comes to nothing', () => {
  it('under a key is told anew each time, and never answered as done', async () => {
    const key = { 'idempotency-key': 'the-same-key-each-time' };
    for (const name of ['wrong.txt', 'wrong.txt']) {
      const { upload } = await begun({ name, bytes: 1000, sha256: hashOf('quite another file') });
      expect((await put(upload?.id ?? '', 0, randomBytes(1000))).status).toBe(200);
      expect((await end(upload?.id ?? '', finish, key)).status).toBe(422);
      const again = await end(upload?.id ?? '', finish, key);
      expect([again.status, again.headers.get('idempotency-replayed')]).toEqual([404, null]);
    }
    expect(await desk.sql(`select 1 from idempotency_keys where key = $1`, key['idempotency-key'])).toEqual([]);
  });

  const oneOf = async (name: string) => {
    const body = randomBytes(1000);
    const { upload } = await begun({ name, bytes: 1000, sha256: hashOf(body) });
    expect((await put(upload?.id ?? '', 0, body)).status).toBe(200);
    return { id: upload?.id ?? '', body };
  };
  /** Something happens while the first part is being read: before its bytes are asked for, or after. */
  const meanwhile = (when: 'before' | 'after', deed: () => Promise<unknown>) => {
    const store = fileStore();
    const get = store.get.bind(store);
    return vi.spyOn(store, 'get').mockImplementationOnce(async (key) => {
      if (when === 'before') await deed();
      const bytes = await get(key);
      if (when === 'after') await deed();
      return bytes;
    });
  };
  const names = async () => must(await getDraft(author, draft)).revision.files.map((f) => f.name);

  it.each(['before', 'after'] as const)('a second one, when the first ends %s the bytes are read, is told of the first', async (when) => {
    const name = `twice-${when}.txt`;
    const { id } = await oneOf(name);
    let first = 0;
    meanwhile(when, async () => void (first = (await end(id)).status));
    const second = await end(id);
    expect([first, second.status]).toEqual([201, 409]);
    expect(await detailOf(second)).toMatch(/^This upload ended while its parts were put together/);
    const file = must(await getDraft(author, draft)).revision.files.find((f) => f.name === name);
    expect(must(await openFile(author, draft, file?.id ?? '')).bytes).toBe(1000);
    for await (const chunk of await must(await openFile(author, draft, file?.id ?? '')).open()) expect((chunk as Buffer).length).toBeGreaterThan(0);
  });

  it('because the upload was let go meanwhile adds no file', async () => {
    const { id } = await oneOf('let-go.txt');
    meanwhile('after', () => end(id, letGo));
    expect((await end(id)).status).toBe(409);
    expect(await names()).not.toContain('let-go.txt');
  });

  it('because a part was sent again can be tried again', async () => {
    const { id, body } = await oneOf('again.txt');
    meanwhile('before', () => put(id, 0, body));
    const answer = await end(id);
    expect([answer.status, await detailOf(answer)]).toEqual([409, 'A part of again.txt was sent again while the parts were put together. Finish the upload again.']);
    expect((await end(id)).status).toBe(201);
  });

  it('because bytes are missing for good lets go of the upload, so that the file can be sent again', async () => {
    const { id, body } = await oneOf('lost.txt');
    const [key] = await desk.sql<{ storage_key: string }>('select storage_key from upload_parts where upload_id = $1', id);
    await fileStore().remove(key?.storage_key ?? '');
    expect((await end(id)).status).toBe(409);
    expect((await begun({ name: 'lost.txt', bytes: 1000, sha256: hashOf(body) })).upload?.arrived).toEqual([]);
  });
});

describe('an announcement', () => {
  const of = (name: string, length = 10) => ({ name, bytes: length, sha256: hashOf(`${name} ${length}`) });

  it('takes the place of one of its name whose time is over, swept or not', async () => {
    const { upload: old } = await begun(of('late.txt'));
    expect((await put(old?.id ?? '', 0, Buffer.alloc(10))).status).toBe(200);
    const [key] = await desk.sql<{ storage_key: string }>('select storage_key from upload_parts where upload_id = $1', old?.id);
    await desk.sql(`update uploads set expires_at = now() - interval '1 minute' where id = $1`, old?.id);
    const { upload } = await begun(of('late.txt'));
    expect(upload).toMatchObject({ arrived: [] });
    expect(upload?.id).not.toBe(old?.id);
    expect(await fileStore().head(key?.storage_key ?? '')).toBeUndefined();
  });

  it('is refused when the files and the uploads on their way are as many as a submission holds; one of a name that is there is not', async () => {
    const full = await draftWithBursts(author);
    const there = must(await getDraft(author, full)).revision.files;
    for (let i = there.length; i < 64; i++) must(await beginUpload(author, full, of(`${i}.txt`)));
    const refused = await beginUpload(author, full, of('one-more.txt'));
    expect(refused).toMatchObject({ ok: false, error: { code: 'limit', sentence: expect.stringMatching(/has 64 files, those on their way among them; it holds at most 64/) as string } });
    expect((await beginUpload(author, full, of('63.txt', 11))).ok).toBe(true);
    expect((await beginUpload(author, full, of(there[0]?.name ?? ''))).ok).toBe(true);
    for (const { id } of must(await listOpenUploads(author, full))) must(await letGoOfUpload(author, full, id));
  });

  it('is refused when what one person has on the way would be more than 2 GiB, over all submissions', async () => {
    const busy = await desk.person('R. Ostrander');
    const [one, two] = [await draftWithBursts(busy), await draftWithBursts(busy)];
    const long = 512 * 1024 * 1024;
    for (const [id, name] of [[one, 'a'], [one, 'b'], [two, 'c'], [two, 'd']] as const) must(await beginUpload(busy, id, of(name, long)));
    expect(await beginUpload(busy, two, of('e', 1))).toMatchObject({ ok: false, error: { code: 'limit', sentence: expect.stringMatching(/^Your unfinished uploads come to 2147483648 bytes/) as string } });
    expect((await beginUpload(busy, two, of('d', long))).ok).toBe(true);
    expect((await beginUpload(busy, two, of('d', long - 1))).ok).toBe(true);
    expect((await beginUpload(busy, two, of('e', 1))).ok).toBe(true);
  });
});

describe('a draft with as many files as it holds', () => {
  it('lets one of them be replaced, at once or part by part, and takes no other', async () => {
    const full = await draftWithBursts(author);
    const of = (name: string, body: string) => ({ name, stream: Readable.from(Buffer.from(body)) });
    const room = 64 - must(await getDraft(author, full)).revision.files.length;
    must(await addFiles(author, full, async (take) => { for (let i = 0; i < room; i++) await take(of(`${i}.txt`, `file ${i}`)); }));
    must(await addFiles(author, full, (take) => take(of('0.txt', 'another'))));
    expect(await addFiles(author, full, (take) => take(of('new.txt', 'new')))).toMatchObject({ ok: false, error: { code: 'limit' } });

    const body = Buffer.from('longer');
    const { upload } = must(await beginUpload(author, full, { name: '1.txt', bytes: body.length, sha256: hashOf(body) }));
    must(await takePart(author, full, { uploadId: upload?.id ?? '', number: 0 }, Readable.from(body)));
    expect(must(await finishUpload(author, full, upload?.id ?? '')).sha256).toBe(hashOf(body));
    expect(must(await getDraft(author, full)).revision.files).toHaveLength(64);
  });
});
