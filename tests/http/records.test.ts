import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { GET as badgeRoute } from '@/app/(public)/records/[id]/badge.svg/route';
import { GET as recordRoute } from '@/app/(public)/records/[id]/record.json/route';
import { GET as signatureRoute } from '@/app/(public)/records/[id]/signature.json/route';
import { GET as bundleRoute } from '@/app/(public)/records/[id]/signed-record.json/route';
import { GET as keyRoute } from '@/app/(public)/keys/[file]/route';
import { GET as apiRecordRoute } from '@/app/api/v1/records/[id]/route';
import { GET as listRoute } from '@/app/api/v1/records/route';
import { GET as queueRoute } from '@/app/api/v1/queue/route';
import { enterAtLevelOne, inDeciding, openSigner, personOf, type SignerDesk } from '../support/review-room';
import { must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

vi.mock('next/headers', () => ({ headers: () => Promise.resolve(new Headers()) }));

let desk: ServiceDesk;
let signer: SignerDesk;
let recordId = '';

beforeAll(async () => {
  desk = await openServiceDesk();
  signer = await openSigner(desk);
  const [author, editor, referee] = [await personOf('M. Ondaro', 'saltern'), await personOf('R. Amsel', 'counterfoil', 'editor'), await personOf('H. Brightwater', 'oxbow')];
  const id = await inDeciding(desk, { author, editor, referee });
  must(await enterAtLevelOne(editor, id, 'Two bursts in'));
  const [done] = await signer.run();
  recordId = done?.outcome === 'signed' ? done.recordId : '';
}, 120_000);
afterAll(async () => {
  await signer.close();
  await desk.close();
});

type Route = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;
const get = (route: Route, params: Record<string, string>, headers: Record<string, string> = {}, search = '') =>
  route(new Request(`${ORIGIN}/x${search}`, { headers }), { params: Promise.resolve(params) });
const parts: readonly (readonly [string, Route])[] = [['record.json', recordRoute], ['signature.json', signatureRoute], ['signed-record.json', bundleRoute], ['badge.svg', badgeRoute]];

describe('a published record is served as the bytes that were signed', () => {
  it.each(parts)('%s: to anybody, with a strong ETag, nothing to run and nothing to sniff', async (_name, route) => {
    const answer = await get(route, { id: recordId });
    const bytes = Buffer.from(await answer.arrayBuffer());
    expect(answer.status).toBe(200);
    expect(answer.headers.get('etag')).toBe(`"${createHash('sha256').update(bytes).digest('hex')}"`);
    expect(answer.headers.get('content-length')).toBe(String(bytes.length));
    expect(answer.headers.get('x-content-type-options')).toBe('nosniff');
    expect(answer.headers.get('content-security-policy')).toContain("default-src 'none'");
    const again = await get(route, { id: recordId }, { 'if-none-match': answer.headers.get('etag') ?? '' });
    expect([again.status, (await again.arrayBuffer()).byteLength]).toEqual([304, 0]);
    expect((await get(route, { id: recordId }, { 'if-none-match': '"other"' })).status).toBe(200);
  });

  it('the record is the stored row, byte for byte, under both addresses', async () => {
    const [row] = await desk.sql<{ document: Buffer; document_digest: string }>('select document, document_digest from records where id = $1', recordId);
    const bytes = Buffer.from(await (await get(recordRoute, { id: recordId })).arrayBuffer());
    expect(bytes.equals(row?.document ?? Buffer.alloc(0))).toBe(true);
    expect((await get(apiRecordRoute, { id: recordId })).headers.get('etag')).toBe(`"${row?.document_digest}"`);
  });

  it('the key is served under its id, and what is no key under no id', async () => {
    const answer = await get(keyRoute, { file: `${signer.key.id}.pem` });
    expect(await answer.text()).toBe(signer.key.publicPem);
    expect(signer.key.publicPem).toContain('BEGIN PUBLIC KEY');
    expect((await get(keyRoute, { file: `${'0'.repeat(16)}.pem` })).status).toBe(404);
    expect((await get(keyRoute, { file: '../signing-key.pem' })).status).toBe(404);
  });

  it.each(['aaaa-aaaa', 'AAAA-AAAA', '..', '%00', '3f1d9c1e-8f6b-4a52-9d55-0a7d4a0f6b11', 'x'.repeat(5000)])('an id that is none answers as one that is not there: %s', async (id) => {
    const unknown = await (await get(recordRoute, { id: 'zzzz-zzzz' })).text();
    for (const [, route] of parts) {
      const answer = await get(route, { id });
      expect([answer.status, await answer.text()]).toEqual([404, unknown]);
    }
  });

  it('the register lists it, and refuses a filter it does not know', async () => {
    const rows = (await (await get(listRoute, {}, {}, '?verdict=agrees')).json()) as { items: { id: string }[] };
    expect(rows.items.map((r) => r.id)).toEqual([recordId]);
    expect((await get(listRoute, {}, {}, '?colour=red')).status).toBe(422);
    expect((await get(queueRoute, {})).status).toBe(401);
  });
});

describe('a struck record stays, and its badge says so', () => {
  it('same address, same signed bytes, another picture', async () => {
    const before = Buffer.from(await (await get(recordRoute, { id: recordId })).arrayBuffer());
    const stood = await get(badgeRoute, { id: recordId });
    expect(await stood.text()).toContain('all claims agree · level 1');
    expect(stood.headers.get('cache-control')).toContain('must-revalidate');
    await desk.sql(`insert into record_standings (record_id, standing, reason) values ($1, 'struck', 'The files were those of another run.')`, recordId);
    const struck = await get(badgeRoute, { id: recordId }, { 'if-none-match': stood.headers.get('etag') ?? '' });
    expect(struck.status).toBe(200);
    const svg = await struck.text();
    expect(svg).toContain('<title id="T">Counterfoil: struck</title>');
    expect(svg).not.toMatch(/agree|level/);
    expect(before.equals(Buffer.from(await (await get(recordRoute, { id: recordId })).arrayBuffer()))).toBe(true);
  });
});
