import { describe, expect, it } from 'vitest';
import { combine, sharedCorrelation, type Term } from '@/lib/engine/budget/combine';
import { coverageFactor, studentFactor } from '@/lib/engine/budget/student';
import { seededRandom } from '@/tests/support/seeded-random';

describe("Student's factor", () => {
  // JCGM 100:2008, table G.2, columns 95,45 % and 99 %; from memory.
  it.each([[1, 13.97], [2, 4.53], [3, 3.31], [4, 2.87], [5, 2.65], [6, 2.52], [7, 2.43], [8, 2.37], [9, 2.32], [10, 2.28], [12, 2.23], [16, 2.17], [20, 2.13], [25, 2.11], [50, 2.05]])(
    'of %i degrees of freedom is %f at 95.45 %%', (freedom, k) => expect(studentFactor(freedom)).toBeCloseTo(k, 2),
  );
  it.each([[1, 63.66], [2, 9.92], [5, 4.03], [16, 2.92], [100, 2.626]])('of %i degrees of freedom is %f at 99 %%', (freedom, k) => expect(Math.abs(studentFactor(freedom, 0.99) - k)).toBeLessThan(0.006));

  it('is the tangent of an angle at one degree of freedom, in closed form at two', () => {
    expect(studentFactor(1, 0.9)).toBeCloseTo(Math.tan(0.45 * Math.PI), 8);
    expect(studentFactor(2, 0.9)).toBeCloseTo(Math.sqrt(2) * 0.9 / Math.sqrt(1 - 0.81), 8);
  });

  it('becomes two where there are thirty, and is asked for whole numbers below', () => {
    expect(coverageFactor(Infinity)).toBe(2);
    expect(coverageFactor(30)).toBe(2);
    expect(coverageFactor(16.7)).toBe(studentFactor(16));
    expect(coverageFactor(0.4)).toBe(studentFactor(1));
  });
});

describe('the calibration of an end gauge', () => {
  // JCGM 100:2008, H.1 (numbers from memory): comparison of a 50 mm gauge block, in nm.
  const terms: Term[] = [{ u: 25, degreesOfFreedom: 18 }, { u: 9.7, degreesOfFreedom: 25.6 }, { u: 2.9, degreesOfFreedom: 50 }, { u: 16.6, degreesOfFreedom: 2 }];
  const found = combine(terms);

  it('has a combined uncertainty of 32 nm', () => expect(Math.round(found.u)).toBe(32));
  it('has 16 effective degrees of freedom', () => expect(Math.floor(found.degreesOfFreedom)).toBe(16));
  it('has an expanded uncertainty of 93 nm at 99 %', () => expect(Math.abs(studentFactor(16, 0.99) * found.u - 93)).toBeLessThan(1));
  it('takes most of its variance from the standard', () => expect(found.shares[0]).toBeCloseTo(25 ** 2 / 1003, 2));
  it('has the degrees of freedom of its own comparison', () => {
    expect(combine([{ u: 5.8, degreesOfFreedom: 24 }, { u: 3.9, degreesOfFreedom: 5 }, { u: 6.7, degreesOfFreedom: 8 }])).toMatchObject({
      u: expect.closeTo(9.7, 1) as number, degreesOfFreedom: expect.closeTo(25.6, 0) as number,
    });
  });
});

describe('correlations', () => {
  it('of one add sizes with their signs, of zero squares', () => {
    const pair = [{ u: 3 }, { u: 4 }];
    expect(combine(pair).u).toBeCloseTo(5, 12);
    expect(combine(pair, () => 1).u).toBeCloseTo(7, 12);
    expect(combine([{ u: 3 }, { u: -4 }], () => 1).u).toBeCloseTo(1, 12);
    expect(combine([{ u: 3 }, { u: -3 }], () => 1)).toMatchObject({ u: 0, expanded: 0 });
  });

  it('of ten resistors known against one standard (JCGM 100, 5.2.2, example): ten times as uncertain, not √10', () => {
    const resistors = Array.from({ length: 10 }, () => ({ u: 0.1 }));
    expect(combine(resistors, () => 1).u).toBeCloseTo(1, 12);
    expect(combine(resistors).u).toBeCloseTo(0.32, 2);
  });

  it('are one between the same component of the same simulation, and nothing else', () => {
    const shared = sharedCorrelation([{ id: 'E05', from: 'U' }, { id: 'E05', from: 'U' }, { id: 'E05', from: 'D' }, { id: 'E06', from: 'U' }, { id: 'E13', from: 'U' }, { id: 'E13', from: 'U' }]);
    expect([shared(0, 1), shared(0, 2), shared(0, 3), shared(4, 5)]).toEqual([1, 0, 0, 0]);
  });

  it('leave the degrees of freedom of a group those of its least known member', () => {
    expect(combine([{ u: 1, degreesOfFreedom: 2 }, { u: 1 }], () => 1).degreesOfFreedom).toBeCloseTo(2, 12);
    expect(combine([{ u: 1, degreesOfFreedom: 2 }, { u: 1, degreesOfFreedom: 2 }]).degreesOfFreedom).toBeCloseTo(4, 12);
  });
});

describe('of any budget', () => {
  const random = seededRandom(7);
  const budgets = Array.from({ length: 200 }, () => Array.from({ length: 1 + Math.floor(6 * random()) }, (): Term => ({ u: 10 ** (6 * random() - 3), degreesOfFreedom: random() < 0.5 ? undefined : 1 + 40 * random() })));

  it('shares add up to one', () => {
    for (const terms of budgets) expect(combine(terms).shares.reduce((p, q) => p + q)).toBeCloseTo(1, 12);
  });
  it('the whole is at least the largest part and at most the sum', () => {
    for (const terms of budgets) {
      const { u } = combine(terms);
      expect(u).toBeGreaterThanOrEqual(Math.max(...terms.map((term) => term.u)) * (1 - 1e-12));
      expect(u).toBeLessThanOrEqual(terms.reduce((sum, term) => sum + term.u, 0) * (1 + 1e-12));
    }
  });
  it('degrees of freedom lie between the fewest and their sum', () => {
    for (const terms of budgets) {
      const freedoms = terms.map((term) => term.degreesOfFreedom ?? Infinity);
      const { degreesOfFreedom } = combine(terms);
      expect(degreesOfFreedom).toBeGreaterThanOrEqual(Math.min(...freedoms) * (1 - 1e-9));
      expect(degreesOfFreedom).toBeLessThanOrEqual(freedoms.reduce((p, q) => p + q) * (1 + 1e-9));
    }
  });
  it('one term that is not a number leaves none', () => {
    expect(combine([{ u: 1 }, { u: Number.NaN }])).toMatchObject({ u: Number.NaN, expanded: Number.NaN });
  });
  it('nothing uncertain is zero', () => {
    expect(combine([])).toMatchObject({ u: 0, expanded: 0, shares: [] });
    expect(combine([{ u: 0, degreesOfFreedom: 2 }]).expanded).toBe(0);
  });
});
