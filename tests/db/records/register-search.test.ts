import fc from 'fast-check';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { database } from '@/db/client';
import { listRegister } from '@/db/reads/records/register';
import { VISITOR } from '@/lib/policy/actor';
import { readRegister } from '@/lib/services/records/read-register';
import type { AddressParams } from '@/lib/services/records/register-query';
import { plantRecord, stand } from '../../support/planted-records';
import { must, openServiceDesk, type ServiceDesk } from '../../support/service-desk';

let desk: ServiceDesk;
beforeAll(async () => {
  desk = await openServiceDesk();
  const { userId } = await desk.person('T. Marrable');
  const plant = (record: Parameters<typeof plantRecord>[2]) => plantRecord(desk, userId, record);
  await plant({ id: '1111-aaaa', title: 'Precessing spins seen by one detector', authors: ['B. Will', 'E. Tansley-Mbeki'], statement: 'The remnant recoils.', enteredAt: '2026-01-10T08:00:00Z', claims: [{ quantity: 'match', verdict: 'agrees' }, { quantity: 'snr', verdict: 'differs', noise: 'attached' }] });
  await plant({ id: '2222-bbbb', title: 'Recoil of a remnant', authors: ['K. Dovrel'], statement: 'Spin is left out.', enteredAt: '2026-02-20T23:59:59Z', claims: [{ quantity: 'radiated-energy', verdict: 'unsettled', noise: 'none' }] });
  await plant({ id: '3333-cccc', title: 'Aligned binaries and their loudness', authors: ['K. Dovrel', 'T. Marrable'], enteredAt: '2026-03-05T12:00:00Z', claims: [{ quantity: 'snr-ratio', verdict: 'agrees', noise: 'SB' }, { quantity: 'match', verdict: 'differs' }] });
  // Two at the very same instant: only their ids tell them apart.
  await plant({ id: '4444-dddd', title: 'zeta', enteredAt: '2026-03-05T12:00:00Z' });
  await plant({ id: '5555-eeee', title: 'Beta', enteredAt: '2026-03-06T12:00:00.000123Z' });
  await stand(desk, '5555-eeee', 'struck', '2026-04-01T00:00:00Z', 'The files were those of another run.');
}, 120_000);
afterAll(() => desk.close());

const read = async (params: AddressParams, size?: number) => must(await readRegister(VISITOR, params, size));
const found = async (params: AddressParams) => (await read(params)).rows.map((row) => row.id.slice(0, 4));

describe('words', () => {
  it('are found by their stem in title, statement and quantity, and as they are in a name or an id', async () => {
    expect(await found({ text: 'spin' })).toEqual(['1111', '2222']);
    expect(await found({ text: 'binary' })).toEqual(['3333']);
    expect(await found({ text: 'radiated energy' })).toEqual(['2222']);
    expect(await found({ text: 'tansley-mbeki' })).toEqual(['1111']);
    expect(await found({ text: 'will' })).toEqual(['1111']);
    expect(await found({ text: '3333-CCCC' })).toEqual(['3333']);
  });

  it('in a title weigh more than in a statement', async () => {
    expect(await found({ text: 'recoil' })).toEqual(['2222', '1111']);
    expect(await found({ text: 'recoil', sort: 'oldest' })).toEqual(['1111', '2222']);
  });

  it('may be a phrase, an alternative or left out', async () => {
    expect(await found({ text: '"remnant recoils"' })).toEqual(['1111']);
    expect((await found({ text: 'loudness or recoil' })).sort()).toEqual(['1111', '2222', '3333']);
    expect(await found({ text: 'recoil -spins' })).toEqual([]);
    expect(await found({ text: 'dovrel -recoil' })).toEqual(['3333']);
  });

  it('that are none are said to be none', async () => {
    for (const text of ['&|!', '""', '-', '()'])
      expect((await read({ text })).problems.map((p) => p.code), text).toEqual(['register/no-words']);
  });

  it.each([`'; drop table records; --`, '%', '\\', `a' | 'b`, '<->', ':*', 'a:*b', '((((', '"open', '\u0000', 'a\u0000b', '\ud800', '🙂', '${7*7}', 'x'.repeat(5000), ' or or or ', '-'.repeat(200), '\u202espin', String.raw`\u0000`])('of a hostile hand break nothing: %j', async (text) => {
    const view = await read({ text });
    expect(view.everything).toBe(5);
    expect(view.total).toBe(view.rows.length);
  });
});

describe('any text that the search field takes', () => {
  it('is a search that the database answers', async () => {
    const signs = fc.constantFrom('-', '"', ' ', 'or', 'OR', 'a', 'spin', '(', ')', ':*', '&', '|', '!', "'", '<->', '\\', '*', 'é', '--', '- -');
    await fc.assert(
      fc.asyncProperty(fc.oneof(fc.array(signs, { maxLength: 120 }).map((parts) => parts.join('')), fc.string({ unit: 'binary', maxLength: 220 })), async (text) => {
        const view = await read({ text });
        expect(view.total).toBe(view.rows.length);
      }),
      { numRuns: 300, seed: 20260514 },
    );
  }, 60_000);
});

describe('filters', () => {
  it('ask quantity, verdict and noise curve of one and the same claim', async () => {
    expect(await found({ quantity: 'match', verdict: 'agrees' })).toEqual(['5555', '4444', '1111']);
    expect(await found({ quantity: 'match', verdict: 'differs' })).toEqual(['3333']);
    expect(await found({ quantity: 'match', noise: 'SB' })).toEqual([]);
    expect(await found({ noise: 'attached' })).toEqual(['1111']);
    expect(await found({ noise: 'none' })).toEqual(['2222']);
  });

  it('take whole UTC days, both ends included', async () => {
    expect(await found({ from: '2026-02-20', to: '2026-02-20' })).toEqual(['2222']);
    expect(await found({ to: '2026-02-19' })).toEqual(['1111']);
    expect(await found({ from: '2026-03-06' })).toEqual(['5555']);
  });

  it('know the standing of today, and keep the struck in the register', async () => {
    expect(await found({ standing: 'struck' })).toEqual(['5555']);
    expect(await found({ standing: 'entered' })).not.toContain('5555');
    expect((await read({})).total).toBe(5);
  });

  it.each([
    [{ quantity: 'mach' }, 'register/unknown-value'],
    [{ verdict: 'failed' }, 'register/unknown-value'],
    [{ noise: 'G9' }, 'register/unknown-value'],
    [{ standing: 'gone' }, 'register/unknown-value'],
    [{ sort: 'random' }, 'register/unknown-value'],
    [{ sort: 'relevance' }, 'register/nothing-to-rank'],
    [{ from: '2026-02-30' }, 'register/not-a-day'],
    [{ from: '0000-01-01' }, 'register/not-a-day'],
    [{ from: '2026-03-01', to: '2026-01-01' }, 'register/days-reversed'],
    [{ page: '0' }, 'register/not-a-page'],
    [{ page: '1e3' }, 'register/not-a-page'],
    [{ page: '9' }, 'register/no-such-page'],
    [{ quantity: ['match', 'snr'] }, 'register/given-twice'],
  ] as const)('that are not understood are said: %j', async (params, code) => {
    expect((await read(params as unknown as AddressParams)).problems.map((p) => p.code)).toEqual([code]);
  });
});

describe('order and pages', () => {
  it('sort by entry, by title without regard to capitals, and the other way', async () => {
    expect(await found({})).toEqual(['5555', '4444', '3333', '2222', '1111']);
    expect(await found({ sort: 'oldest' })).toEqual(['1111', '2222', '3333', '4444', '5555']);
    expect(await found({ sort: 'title' })).toEqual(['3333', '5555', '1111', '2222', '4444']);
  });

  it.each(['newest', 'oldest', 'title'])('show every record once over the pages, in the order %s', async (sort) => {
    const whole = await found({ sort });
    const pages = [1, 2, 3].map((page) => read({ sort, page: String(page) }, 2));
    const seen = (await Promise.all(pages)).flatMap((view) => view.rows.map((row) => row.id.slice(0, 4)));
    expect(seen).toEqual(whole);
    expect((await pages[0])?.pages).toBe(3);
  });

  it('go on after a record, whatever was entered since, even within one instant', async () => {
    const seen: string[] = [];
    for (let after: string | undefined; seen.length < 6; after = seen.at(-1)) {
      const [next] = await listRegister(database(), {}, 'newest', { limit: 1, after });
      if (!next) break;
      seen.push(next.id);
    }
    expect(seen.map((id) => id.slice(0, 4))).toEqual(['5555', '4444', '3333', '2222', '1111']);
  });
});

describe('the index of the register', () => {
  it('is made by the entry itself and can be written by no role', async () => {
    for (const table of ['register_entries', 'register_claims'])
      for (const right of ['INSERT', 'UPDATE', 'DELETE', 'TRUNCATE'])
        expect(await desk.sql(`select r from unnest(array['counterfoil_web', 'counterfoil_worker', 'counterfoil_signer']) r where has_table_privilege(r, $1, $2)`, table, right)).toEqual([]);
  });

  it('answers words from its tree of words, not by reading every record', async () => {
    await desk.sql('set enable_seqscan = off');
    const plan = await desk.sql<{ 'QUERY PLAN': string }>(`explain select record_id from register_entries where search @@ websearch_to_tsquery('english', 'spin')`);
    expect(plan.map((line) => line['QUERY PLAN']).join('\n')).toContain('register_entries_search_idx');
  });
});
