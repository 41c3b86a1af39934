import Papa from 'papaparse';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { GET as feedRoute } from '@/app/(public)/register/feed.atom/route';
import { GET as csvRoute } from '@/app/(public)/register/records.csv/route';
import { VISITOR, type SignedInActor } from '@/lib/policy/actor';
import { readRegister } from '@/lib/services/records/read-register';
import { plantRecord, stand } from '../support/planted-records';
import { inDeciding, personOf } from '../support/review-room';
import { must, openServiceDesk, ORIGIN, type ServiceDesk } from '../support/service-desk';

vi.mock('next/headers', () => ({ headers: () => Promise.resolve(new Headers()) }));

/** What a spreadsheet would run, what XML cannot hold, and what looks like markup. */
const HOSTILE = ['=1+1', '+cmd', '-2+3', '@SUM(A1)', '\t=1', '\r=1', '=1\n=2', '  =1', '＝1', '<script>alert(1)</script>', ']]>', '&amp;', 'a\u0001b\uffff', '"quoted", and; more', 'π ≤ 3'];
const point = { at: { totalMassMsun: 60 }, claimed: -0.5, printed: '-0.5', value: -0.4999, expandedUncertainty: null, tolerance: 0.005, apart: 0.0001, verdict: 'agrees', routes: { A: -0.4999, B: -0.4999 } };
const bound = { ...point, claimed: { above: 0.98 }, printed: '=HYPERLINK("x")', value: 1e-300, tolerance: null, verdict: 'unsettled' };

let desk: ServiceDesk;
let owner: SignedInActor;
beforeAll(async () => {
  desk = await openServiceDesk();
  owner = await desk.person('T. Marrable');
  for (const [i, title] of HOSTILE.entries())
    await plantRecord(desk, owner.userId, { id: `0000-00${String(i).padStart(2, '0')}`, title, authors: [title, 'K. Dovrel'], enteredAt: `2026-01-${String(i + 1).padStart(2, '0')}T00:00:00Z` });
  await plantRecord(desk, owner.userId, { id: '9999-zzzz', title: 'Two claims', enteredAt: '2026-05-01T00:00:00Z', claims: [{ quantity: 'snr', noise: 'attached', points: [point, bound] }, { quantity: 'match', verdict: 'differs' }] });
}, 120_000);
afterAll(() => desk.close());

type Route = (request: Request, context: { params: Promise<Record<string, string>> }) => Promise<Response>;
const get = (route: Route, search = '', headers: Record<string, string> = {}) => route(new Request(`${ORIGIN}/x${search}`, { headers }), { params: Promise.resolve({}) });
const rowsOf = async (search = '') => {
  const text = await (await get(csvRoute, search)).text();
  return { text, rows: Papa.parse<Record<string, string>>(text, { header: true, skipEmptyLines: true }).data };
};
const unescape = (xml: string): string => xml.replace(/&lt;/g, '<').replace(/&gt;/g, '>').replace(/&quot;/g, '"').replace(/&#39;/g, "'").replace(/&amp;/g, '&');

describe('the register as a table', () => {
  it('has no cell that a spreadsheet would run, and loses no letter of one', async () => {
    const { text, rows } = await rowsOf();
    const cells = Papa.parse<string[]>(text).data.flat();
    const numbers = /^-?\d+(\.\d+)?(e[-+]?\d+)?$/;
    expect(cells.filter((cell) => /^[\s\u0000-\u001f]*[=+\-@＝＋－＠]|^[\t\r\n]/.test(cell) && !numbers.test(cell))).toEqual([]);
    const titles = rows.map((row) => row['title']);
    for (const title of HOSTILE) expect(titles).toContain(/^[\s]*[=+\-@＝]|^[\t\r]/.test(title) ? `'${title}` : title);
  });

  it('gives numbers as numbers, what is unknown as nothing, and each point of the claims that fit', async () => {
    const { rows } = await rowsOf('?quantity=snr');
    expect(rows).toMatchObject([
      { record: '9999-zzzz', claim: 'C1', quantity: 'snr', at: 'totalMassMsun=60', claimed: '-0.5', claimed_is: 'value', printed: "'-0.5", recomputed: '-0.4999', U: '', tolerance: '0.005', verdict: 'agrees', noise: 'attached', entered: '2026-05-01', url: `${ORIGIN}/records/9999-zzzz` },
      { claimed: '0.98', claimed_is: 'above', printed: `'=HYPERLINK("x")`, recomputed: '1e-300', tolerance: '', verdict: 'unsettled' },
    ]);
    expect((await rowsOf('?text=two+claims')).rows).toHaveLength(3);
    expect((await rowsOf('?text=nothing+like+it')).text).toMatch(/^record,revision,[\w,]+url\r\n$/);
  });
});

describe('the register as a feed', () => {
  const entriesOf = (xml: string) => [...xml.matchAll(/<entry>[\s\S]*?<\/entry>/g)].map(([entry]) => ({
    id: /<id>(.*?)<\/id>/.exec(entry)?.[1] ?? '',
    title: unescape(/<title>([\s\S]*?)<\/title>/.exec(entry)?.[1] ?? ''),
    updated: /<updated>(.*?)<\/updated>/.exec(entry)?.[1] ?? '',
    authors: [...entry.matchAll(/<author><name>([\s\S]*?)<\/name><\/author>/g)].length,
    summary: /<summary type="text">([\s\S]*?)<\/summary>/.exec(entry)?.[1] ?? '',
  }));

  it('names each record by its own address, with its authors, and holds any title as text', async () => {
    const answer = await get(feedRoute);
    expect(answer.headers.get('content-type')).toBe('application/atom+xml; charset=utf-8');
    const xml = await answer.text();
    expect(xml).not.toMatch(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\uffff]|<script|]]>/);
    const entries = entriesOf(xml);
    expect(entries).toHaveLength(HOSTILE.length + 1);
    expect(entries[0]).toEqual({ id: `${ORIGIN}/records/9999-zzzz`, title: 'Two claims', updated: '2026-05-01T00:00:00.000Z', authors: 1, summary: 'Entered at level 1. C1, optimal snr: agrees; C2, match: differs.' });
    for (const title of HOSTILE) expect(entries.map((e) => e.title)).toContain(title.replace(/[\u0001\uffff]/g, '\ufffd'));
  });

  it('honours the filters, and says under which address it can be fetched again', async () => {
    const xml = await (await get(feedRoute, '?quantity=snr&verdict=agrees')).text();
    expect(entriesOf(xml).map((e) => e.title)).toEqual(['Two claims']);
    expect(xml).toContain(`<link rel="self" type="application/atom+xml" href="${ORIGIN}/register/feed.atom?quantity=snr&amp;verdict=agrees"/>`);
    expect(xml).toContain(`<id>${ORIGIN}/register/feed.atom?quantity=snr&amp;verdict=agrees</id>`);
  });
});

/** Each change of standing comes after the one before. */
let months = 0;
const nextMonth = (): string => `2027-${String((months += 1)).padStart(2, '0')}-01T00:00:00Z`;

const FILES: readonly (readonly [string, Route])[] = [['records.csv', csvRoute], ['feed.atom', feedRoute]];

describe.each(FILES)('%s', (_name, route) => {
  it('is not sent again to who holds it, and is after a record was struck', async () => {
    const first = await get(route, '?text=two');
    const etag = first.headers.get('etag') ?? '';
    const body = await first.text();
    expect(etag).toMatch(/^"[0-9a-f]{64}"$/);
    const again = await get(route, '?text=two', { 'if-none-match': etag });
    expect([again.status, await again.text()]).toEqual([304, '']);
    expect((await get(route, '?text=two', { 'if-modified-since': first.headers.get('last-modified') ?? '' })).status).toBe(304);
    expect((await get(route, '?text=two', { 'if-none-match': '"other"', 'if-modified-since': first.headers.get('last-modified') ?? '' })).status).toBe(200);
    expect((await get(route, '?text=one', { 'if-none-match': etag })).status).toBe(200);
    await stand(desk, '9999-zzzz', 'struck', nextMonth(), 'Other files <than> stated.');
    const after = await get(route, '?text=two', { 'if-none-match': etag });
    expect(after.status).toBe(200);
    const changed = await after.text();
    expect(changed).not.toBe(body);
    expect(changed.toLowerCase()).toContain('struck');
    expect(Date.parse(after.headers.get('last-modified') ?? '')).toBeGreaterThan(Date.parse(first.headers.get('last-modified') ?? ''));
    await stand(desk, '9999-zzzz', 'entered', nextMonth());
  });

  it.each(['?quantity=mach', '?verdict=failed', '?from=yesterday', '?colour=red', '?quantity=match&quantity=snr', '?noise=G9'])('refuses what it does not understand, and says what: %s', async (search) => {
    const answer = await get(route, search);
    expect([answer.status, answer.headers.get('content-type')]).toEqual([422, 'application/problem+json']);
    expect(((await answer.json()) as { problems: { saw: string }[] }).problems[0]?.saw).toBeTruthy();
  });
});

describe('work that is not entered', () => {
  it('changes no byte of the table or the feed, no count and no search', async () => {
    const seen = async () => {
      const register = must(await readRegister(VISITOR, { text: 'bursts' }));
      return [await (await get(csvRoute)).text(), await (await get(feedRoute)).text(), (await get(csvRoute)).headers.get('etag'), (await get(feedRoute)).headers.get('last-modified'), register.total, register.everything, register.choices];
    };
    const before = await seen();
    await inDeciding(desk, { author: owner, editor: await personOf('R. Amsel', 'counterfoil', 'editor'), referee: await personOf('H. Brightwater', 'oxbow') });
    expect(await desk.sql(`select 1 from submissions where state = 'deciding'`)).toHaveLength(1);
    expect(await seen()).toEqual(before);
  }, 120_000);
});
