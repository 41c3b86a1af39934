import { createHash, randomBytes } from 'node:crypto';
import { Readable } from 'node:stream';
import { afterAll, beforeAll, beforeEach, describe, expect, it, vi } from 'vitest';
import { BlobWriter, TextReader, ZipWriter } from '@zip.js/zip.js';
import { ListObjectsV2Command, S3Client } from '@aws-sdk/client-s3';
import { ok } from '@/lib/kernel/result';
import { VISITOR, type Actor, type SignedInActor } from '@/lib/policy/actor';
import { discardStaged } from '@/lib/services/files/stage-file';
import { fileStore } from '@/lib/services/files/file-store';
import { getDraft } from '@/lib/services/submissions/get-draft';
import type { FileView } from '@/lib/services/submissions/submission-view';
import { POST as createSubmission } from '@/app/api/v1/submissions/route';
import { POST as upload } from '@/app/api/v1/submissions/[id]/files/route';
import { GET as download } from '@/app/api/v1/submissions/[id]/files/[fileId]/route';
import { burstFiles, burstSheet } from '../support/burst-sheet';
import { draftWithBursts, must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

/** Who is signed in; sign-in itself has its own tests. */
let actor: Actor = VISITOR;
vi.mock('@/lib/auth/current-actor', () => ({ currentActor: () => Promise.resolve(ok(actor)) }));

let desk: ServiceDesk;
let author: SignedInActor;
let draft: string;

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await desk.person('T. Marrable');
  draft = await draftWithBursts(author);
});
beforeEach(() => void (actor = author));
afterAll(() => desk.close());

const BOUNDARY = 'counterfoil-boundary';
const head = (field: string, name: string): string => `--${BOUNDARY}\r\nContent-Disposition: form-data; name="${field}"; filename="${name}"\r\nContent-Type: application/octet-stream\r\n\r\n`;

/** A body that is made while it is read, so that what is measured is the reader. */
function multipart(...parts: readonly { field?: string; name: string; chunks: Iterable<Buffer> }[]): ReadableStream<Uint8Array> {
  const source = function* (): Generator<Buffer> {
    for (const { field = 'file', name, chunks } of parts) {
      yield Buffer.from(head(field, name));
      yield* chunks;
      yield Buffer.from('\r\n');
    }
    yield Buffer.from(`--${BOUNDARY}--\r\n`);
  };
  return Readable.toWeb(Readable.from(source(), { objectMode: false, highWaterMark: 64 * 1024 })) as ReadableStream<Uint8Array>;
}

const send = (body: ReadableStream<Uint8Array>, handler: typeof upload, id = draft, extra: RequestInit = {}): Promise<Response> =>
  handler(new Request(`${ORIGIN}/upload`, { method: 'POST', headers: { origin: ORIGIN, 'content-type': `multipart/form-data; boundary=${BOUNDARY}` }, body, duplex: 'half', ...extra } as RequestInit), { params: Promise.resolve(handler === upload ? { id } : ({} as { id: string })) });

function* repeated(chunk: Buffer, times: number): Generator<Buffer> {
  for (let i = 0; i < times; i++) yield chunk;
}
const hashOf = (chunks: Iterable<Buffer>): string => {
  const hash = createHash('sha256');
  for (const chunk of chunks) hash.update(chunk);
  return hash.digest('hex');
};

describe('an upload', () => {
  it('of 11 MB comes back bit for bit, as an attachment and nothing else', async () => {
    const bytes = randomBytes(11 * 1024 * 1024 + 17);
    const answer = await send(multipart({ name: 'modes.txt', chunks: [bytes] }), upload);
    expect(answer.status).toBe(201);
    const [file] = (await answer.json()) as FileView[];
    expect([file?.bytes, file?.sha256]).toEqual([bytes.length, hashOf([bytes])]);
    const back = await download(new Request(`${ORIGIN}/x`), { params: Promise.resolve({ id: draft, fileId: file?.id ?? '' }) });
    expect(back.headers.get('content-disposition')).toMatch(/^attachment; filename="modes.txt"/);
    expect(back.headers.get('content-type')).toBe('application/octet-stream');
    expect(back.headers.get('x-content-type-options')).toBe('nosniff');
    expect(hashOf([Buffer.from(await back.arrayBuffer())])).toBe(file?.sha256);
  });

  it('of 200 MB is hashed on the way and takes less than 100 MB of memory', async () => {
    const chunk = randomBytes(1024 * 1024);
    globalThis.gc?.();
    const before = process.memoryUsage().rss;
    let most = before;
    const watch = setInterval(() => (most = Math.max(most, process.memoryUsage().rss)), 20);
    const answer = await send(multipart({ name: 'long.txt', chunks: repeated(chunk, 200) }), upload);
    clearInterval(watch);
    const [file] = (await answer.json()) as FileView[];
    expect([file?.bytes, file?.sha256]).toEqual([200 * chunk.length, hashOf(repeated(chunk, 200))]);
    expect((most - before) / 2 ** 20).toBeLessThan(100);
  }, 120_000);

  it('of several files keeps each under its path', async () => {
    const answer = await send(multipart({ name: 'data/one.txt', chunks: [Buffer.from('1\n')] }, { name: 'data/two.txt', chunks: [Buffer.from('2\n')] }), upload);
    expect(((await answer.json()) as FileView[]).map((f) => f.name)).toEqual(['data/one.txt', 'data/two.txt']);
  });

  it('with a path that climbs out is refused, and so is a body that ends early', async () => {
    expect((await send(multipart({ name: '../../x.txt', chunks: [Buffer.from('x')] }), upload)).status).toBe(422);
    const half = Readable.toWeb(Readable.from([Buffer.from(head('file', 'half.txt')), Buffer.alloc(100_000)])) as ReadableStream<Uint8Array>;
    const answer = await send(half, upload);
    expect([answer.status, ((await answer.json()) as { detail: string }).detail]).toEqual([422, expect.stringMatching(/ended early/)]);
    expect(must(await getDraft(author, draft)).revision.files.map((f) => f.name)).not.toContain('half.txt');
  });

  it('whose sender goes away is let go, with nothing kept', async () => {
    const before = await desk.sql('select count(*)::int as n from stored_files');
    const dying = new ReadableStream<Uint8Array>({
      start: (c) => c.enqueue(Buffer.from(head('file', 'gone.txt'))),
      pull: (c) => c.error(new Error('aborted')),
    });
    expect((await send(dying, upload)).status).toBe(422);
    expect(await desk.sql('select count(*)::int as n from stored_files')).toEqual(before);
  });

  it('by somebody else is not found, and not a byte of it is read', async () => {
    actor = await desk.person('L. Quennell');
    let read = 0;
    const body = new ReadableStream<Uint8Array>({ pull: (c) => (read++ > 1000 ? c.close() : c.enqueue(Buffer.alloc(1000))) }, { highWaterMark: 0 });
    expect((await send(body, upload)).status).toBe(404);
    expect(read).toBeLessThan(5);
  });
});

describe('a claim-sheet folder', () => {
  const claim = JSON.stringify(burstSheet());
  const parts = () => Object.entries(burstFiles()).map(([name, text]) => ({ name, chunks: [Buffer.from(text)] }));
  const create = (body: ReadableStream<Uint8Array>) => send(body, createSubmission);

  it('becomes a draft with its sheet and files', async () => {
    const answer = await create(multipart(...parts(), { field: 'claim', name: 'claim.json', chunks: [Buffer.from(claim)] }));
    expect(answer.status).toBe(201);
    const { revision } = must(await getDraft(author, ((await answer.json()) as { id: string }).id));
    expect(revision.sheet).toEqual(burstSheet());
    expect(revision.files.map((f) => f.name)).toEqual(['a.txt', 'b.txt', 'psd.txt']);
  });

  it('as one archive is the same', async () => {
    const zip = new ZipWriter(new BlobWriter());
    await zip.add('bursts/claim.json', new TextReader(claim));
    for (const [name, text] of Object.entries(burstFiles())) await zip.add(`bursts/${name}`, new TextReader(text));
    const bytes = Buffer.from(await (await zip.close()).arrayBuffer());
    const answer = await create(multipart({ name: 'bursts.zip', chunks: [bytes] }));
    expect(answer.status).toBe(201);
    const { revision } = must(await getDraft(author, ((await answer.json()) as { id: string }).id));
    expect(revision.files.map((f) => [f.name, f.sha256])).toEqual(Object.entries(burstFiles()).map(([name, text]) => [name, hashOf([Buffer.from(text)])]));
  });

  it('without a sheet, with one that is no JSON, or with a path that climbs out leaves nothing', async () => {
    const before = await desk.sql('select (select count(*)::int from submissions) s, (select count(*)::int from stored_files) f');
    expect((await create(multipart(...parts()))).status).toBe(422);
    expect((await create(multipart(...parts(), { field: 'claim', name: 'claim.json', chunks: [Buffer.from('{"format":')] }))).status).toBe(422);
    expect((await create(multipart({ name: '../x', chunks: [Buffer.from('x')] }, { field: 'claim', name: 'claim.json', chunks: [Buffer.from(claim)] }))).status).toBe(422);
    expect((await create(multipart({ name: 'broken.zip', chunks: [Buffer.from('PK nothing')] }))).status).toBe(422);
    expect(await desk.sql('select (select count(*)::int from submissions) s, (select count(*)::int from stored_files) f')).toEqual(before);
  });
});

describe('the store', () => {
  async function keys(): Promise<string[]> {
    const { S3_ENDPOINT: endpoint, S3_BUCKET: Bucket, S3_ACCESS_KEY_ID: accessKeyId, S3_SECRET_ACCESS_KEY: secretAccessKey } = desk.store.env;
    const client = new S3Client({ endpoint, region: 'us-east-1', forcePathStyle: true, credentials: { accessKeyId, secretAccessKey } });
    const { Contents = [] } = await client.send(new ListObjectsV2Command({ Bucket, Prefix: 'uploads/' }));
    client.destroy();
    return Contents.map((object) => object.Key ?? '').sort();
  }

  it('keeps one object of two equal files that came at once, for a draft and for a new folder', async () => {
    const before = await keys();
    const twins = (bytes: Buffer) => [{ name: 'one.txt', chunks: [bytes] }, { name: 'other.txt', chunks: [bytes] }];
    expect((await send(multipart(...twins(randomBytes(500))), upload)).status).toBe(201);
    expect((await keys()).length).toBe(before.length + 1);
    expect((await send(multipart(...twins(randomBytes(500)), { field: 'claim', name: 'claim.json', chunks: [Buffer.from(JSON.stringify(burstSheet()))] }), createSubmission)).status).toBe(201);
    expect((await keys()).length).toBe(before.length + 2);
  });

  it('never loses an object that a row points at, also where two rows keep equal bytes under two keys', async () => {
    const bytes = randomBytes(300);
    const sha256 = hashOf([bytes]);
    const pair = [await draftWithBursts(author), await draftWithBursts(author)];
    // As two requests leave it that staged the same bytes before either was recorded.
    for (const [i, id] of pair.entries()) {
      await fileStore().put(`uploads/twin-${i}`, Readable.from(bytes));
      await desk.sql('insert into stored_files (submission_id, sha256, bytes, storage_key, original_name, uploaded_by) values ($1, $2, 300, $3, $4, $5)', id, sha256, `uploads/twin-${i}`, 'twin.txt', author.userId);
    }
    for (const i of [0, 1]) await discardStaged([{ name: 'third.txt', sha256, bytes: 300, storageKey: `uploads/twin-${i}` }]);
    for (const i of [0, 1]) expect(await fileStore().head(`uploads/twin-${i}`)).toEqual({ bytes: 300 });
  });
});

describe('an archive', () => {
  it('of more than a thousand folders is refused, however few its files; some folders are not', async () => {
    const zipOf = async (folders: number) => {
      const zip = new ZipWriter(new BlobWriter());
      await zip.add('claim.json', new TextReader(JSON.stringify(burstSheet())));
      for (let i = 0; i < folders; i++) await zip.add(`empty/${i}/`, undefined, { directory: true });
      return Buffer.from(await (await zip.close()).arrayBuffer());
    };
    const sendZip = async (folders: number) => send(multipart({ name: 'folders.zip', chunks: [await zipOf(folders)] }), createSubmission);
    expect((await sendZip(100)).status).toBe(201);
    const answer = await sendZip(1000);
    expect([answer.status, ((await answer.json()) as { detail: string }).detail]).toEqual([422, 'The archive lists more than 1000 files and folders. Pack the files alone.']);
  });
});
