import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { Readable } from 'node:stream';
import { gunzipSync, gzipSync } from 'node:zlib';
import { afterAll, beforeAll, expect, it, vi } from 'vitest';
import { ok } from '@/lib/kernel/result';
import { VISITOR, type Actor, type SignedInActor } from '@/lib/policy/actor';
import { BLANKED } from '@/lib/formats/blank-identity';
import { addFile } from '@/lib/services/files/add-file';
import { draftDecision } from '@/lib/services/decisions/draft-decision';
import { handInReport } from '@/lib/services/reviews/hand-in-report';
import { checkDraft } from '@/lib/services/submissions/check-draft';
import { answerFinding } from '@/lib/services/submissions/answer-finding';
import { createDraft } from '@/lib/services/submissions/create-draft';
import { getReview } from '@/lib/services/submissions/get-lodged';
import { getDraft } from '@/lib/services/submissions/get-draft';
import { lodgeSubmission } from '@/lib/services/submissions/lodge-submission';
import { updateDraft } from '@/lib/services/submissions/update-draft';
import { GET as download } from '@/app/api/v1/submissions/[id]/files/[fileId]/route';
import { burstFiles, burstSheet } from '../support/burst-sheet';
import { enterAtLevelOne, openSigner, personOf, REPORT, withReferee } from '../support/review-room';
import { must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

let actor: Actor = VISITOR;
vi.mock('@/lib/auth/current-actor', () => ({ currentActor: () => Promise.resolve(ok(actor)) }));

const [named, written] = ['# run 7 of /home/ada/runs, thinned by 4', '# contact: ada@example.org'];
const { 'a.txt': a = '', 'b.txt': b = '', 'psd.txt': curve = '' } = burstFiles();
const files = new Map<string, Buffer>([
  ['a.txt', Buffer.from(`${named}\n${a}`)],
  ['b.txt', gzipSync(`${written}\n${b}`)],
  ['psd.txt', Buffer.from(curve)],
  ['whose.h5', readFileSync('tests/unit/formats/fixtures/whose.h5')],
]);
const original = (name: string): Buffer => files.get(name) ?? Buffer.alloc(0);
const sha256 = (bytes: Buffer): string => createHash('sha256').update(bytes).digest('hex');

let desk: ServiceDesk;
let id: string;
let author: SignedInActor;
let editor: SignedInActor;
let referee: SignedInActor;

async function lodged(): Promise<string> {
  const sheet = burstSheet();
  const draft = must(await createDraft(author, { title: sheet.title })).id;
  for (const [name, bytes] of files) must(await addFile(author, draft, { name, stream: Readable.from(bytes) }));
  const { waveforms, noise, claims } = sheet as unknown as { waveforms: never; noise: never; claims: never };
  must(await updateDraft(author, draft, { version: 1, title: sheet.title, statement: sheet.statement, sheet: { waveforms, noise, claims } }));
  must(await checkDraft(author, draft));
  await desk.runAll();
  const { check } = must(await getDraft(author, draft));
  for (const { code, where, text } of (check !== null && 'result' in check.run ? (check.run.result?.claims ?? []) : []).flatMap(({ findings }) => findings).filter((f) => f.code === 'formats/hidden-identity')) {
    expect(text).toContain('In the copy that referees download this is blanked');
    must(await answerFinding(author, draft, { code, where, text, answer: 'It may stay on the record.' }));
  }
  must(await lodgeSubmission(author, draft));
  await desk.runAll();
  return draft;
}

beforeAll(async () => {
  desk = await openServiceDesk();
  author = await personOf('T. Marrable', 'larkfield');
  editor = await personOf('R. Amsel', 'counterfoil', 'editor');
  referee = await personOf('S. Vasterling', 'saltern');
  id = await lodged();
  await withReferee(id, editor, referee);
}, 60_000);
afterAll(() => desk.close());

async function read(who: Actor, name: string): Promise<{ readonly response: Response; readonly bytes: Buffer }> {
  const fileId = must(await getReview(author, id)).revision.files.find((file) => file.name === name)?.id ?? '';
  actor = who;
  const response = await download(new Request(`${ORIGIN}/file`, { headers: { origin: ORIGIN } }), { params: Promise.resolve({ id, fileId }) });
  return { response, bytes: Buffer.from(await response.arrayBuffer()) };
}
const note = (name: string): string => `for referees; comments that say whose a text file is are blanked; original sha-256 ${sha256(original(name))}`;

it('a referee downloads text with the line blanked that says whose it is, as long and with every number in its place', async () => {
  const { response, bytes } = await read(referee, 'a.txt');
  expect(response.status).toBe(200);
  expect(bytes.toString()).toBe(`#${` ${BLANKED}`.padEnd(named.length - 1)}\n${a}`);
  expect([response.headers.get('counterfoil-copy'), response.headers.get('etag')]).toEqual([note('a.txt'), `"${sha256(original('a.txt'))}-referee"`]);
});

it('what was packed comes packed, and blanked inside', async () => {
  const { bytes } = await read(referee, 'b.txt');
  expect(gunzipSync(bytes).toString()).toBe(`#${'x'.repeat(written.length - 1)}\n${b}`);
});

it('text without such a line and arrays come byte for byte', async () => {
  for (const name of ['psd.txt', 'whose.h5']) expect((await read(referee, name)).bytes.equals(original(name)), name).toBe(true);
});

it('authors and the editor download what was attached, with its own digest', async () => {
  for (const who of [author, editor]) {
    for (const name of files.keys()) {
      const { response, bytes } = await read(who, name);
      expect(bytes.equals(original(name)), name).toBe(true);
      expect([response.headers.get('counterfoil-copy'), response.headers.get('etag')]).toEqual([null, `"${sha256(original(name))}"`]);
    }
  }
});

it('with the record everybody, the referee too, downloads what was attached', async () => {
  must(await handInReport(referee, id, REPORT));
  must(await enterAtLevelOne(editor, id, must(await draftDecision(editor, id)).signingWords));
  const signer = await openSigner(desk);
  await signer.run().finally(() => signer.close());
  for (const who of [referee, VISITOR]) {
    const { response, bytes } = await read(who, 'a.txt');
    expect([response.status, bytes.equals(original('a.txt')), response.headers.get('counterfoil-copy')]).toEqual([200, true, null]);
  }
});
