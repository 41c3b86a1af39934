import { describe, expect, it } from 'vitest';
import type { Claimed } from '@/lib/claims/claimed';
import { totalOf, withShares } from '@/lib/engine/budget/total';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import { coverageOf, type Coverage } from '@/lib/verdicts/coverage';
import { seededRandom } from '@/tests/support/seeded-random';

const random = seededRandom(41);
const open = { low: null, high: null };
const IDS = ['E01', 'E03', 'E05', 'E06', 'E09', 'E15'];
const between = (low: number, high: number): number => low + (high - low) * random();

const lines = (): BudgetLine[] =>
  IDS.filter(() => random() < 0.7).map((id) => ({ id, component: id, group: id === 'E01' ? 'computation' : 'coverage', u: 10 ** between(-6, -1), note: '', ...(random() < 0.4 ? { degreesOfFreedom: Math.ceil(between(1, 20)) } : {}) }));
const stating = (uncertainty: number): Claimed => ({ kind: 'value', value: 10, uncertainty, digits: null, printed: '10' });
const weighed = (budget: readonly BudgetLine[], claimed: Claimed): Coverage => coverageOf(claimed, 10, budget, totalOf(10, budget, open));

const budgets = Array.from({ length: 300 }, lines).filter((budget) => budget.length > 0);

describe('whatever the budget', () => {
  it('one line that is not known is named, and makes coverage unknown however large the stated uncertainty', () => {
    for (const budget of budgets) {
      const withHole = [...budget.slice(1), { ...budget[0]!, component: 'the hole', u: random() < 0.5 ? null : Number.NaN }];
      expect(weighed(withHole, stating(1e6))).toEqual({ state: 'unknown', missing: ['the hole'] });
    }
  });

  it('what is understated by the known lines alone stays so with any size of the unknown one, by no smaller factor', () => {
    for (const budget of budgets) {
      const hole: BudgetLine = { ...budget[0]!, component: 'the hole', u: null };
      const least = weighed([...budget, hole], stating(0.7 * totalOf(10, budget, open).u!));
      expect(least).toMatchObject({ state: 'understated', missing: ['the hole'] });
      expect(weighed([...budget, hole], stating(0.9 * totalOf(10, budget, open).u!)).state).toBe('unknown');
      for (const power of [-8, -2, 1]) {
        const { degreesOfFreedom: _, ...filled } = { ...hole, u: 10 ** power };
        const whole = weighed([...budget, filled], stating(0.7 * totalOf(10, budget, open).u!));
        expect(whole.state).toBe('understated');
        expect(whole.factor!).toBeGreaterThanOrEqual(least.factor! * 0.995);
      }
    }
  });

  it('a line that is not known counts as nothing in no total: the known part is that of the others, and named as a part', () => {
    for (const budget of budgets) {
      const withHole: BudgetLine[] = [...budget, { id: 'E07', component: 'the hole', group: 'coverage', u: null, note: '' }];
      expect(totalOf(10, withHole, open)).toEqual({ ...totalOf(10, budget, open), missing: ['the hole'] });
      expect(withShares(withHole).at(-1)!.share).toBeNull();
    }
    expect(totalOf(10, [{ id: 'E07', component: 'the hole', group: 'coverage', u: null, note: '' }], open)).toMatchObject({ u: null, expanded: null, missing: ['the hole'] });
  });

  it('covered and understated part at four fifths of what the data allow, and the factor leads back to it', () => {
    for (const budget of budgets) {
      const allowed = totalOf(10, budget, open).expanded!;
      expect(weighed(budget, stating(0.8001 * allowed / 2))).toEqual({ state: 'covered' });
      const small = weighed(budget, stating(0.7 * allowed / 2));
      expect(small.state).toBe('understated');
      expect(small.factor).toBeCloseTo(1 / 0.7, 2);
    }
  });

  it('stating more never uncovers, a larger component never covers', () => {
    for (const budget of budgets) {
      const stated = 10 ** between(-6, 0);
      if (weighed(budget, stating(stated)).state === 'covered') expect(weighed(budget, stating(2 * stated)).state).toBe('covered');
      // The same number of degrees of freedom each, or a larger certain part could buy a smaller factor.
      const plain = budget.map(({ degreesOfFreedom: _, ...line }) => line);
      const grown = plain.map((line, i) => (i === 0 ? { ...line, u: 3 * line.u! } : line));
      if (weighed(plain, stating(stated)).state === 'understated') expect(weighed(grown, stating(stated)).state).toBe('understated');
    }
  });

  it('few degrees of freedom widen what the data allow', () => {
    for (const budget of budgets) {
      const certain = budget.map(({ degreesOfFreedom: _, ...line }) => line);
      expect(totalOf(10, budget, open).expanded!).toBeGreaterThanOrEqual(totalOf(10, certain, open).expanded! * (1 - 1e-12));
    }
  });

  it('a bound is covered only where all that the data allow lies on its side', () => {
    for (const budget of budgets) {
      const { expanded } = totalOf(10, budget, open);
      const above = (bound: number): Claimed => ({ kind: 'above', bound, printed: `> ${bound}` });
      expect(weighed(budget, above(10 - 1.01 * expanded!)).state).toBe('covered');
      expect(weighed(budget, above(10 - 0.99 * expanded!)).state).toBe('understated');
    }
  });
});

describe('near a physical bound', () => {
  const budget: BudgetLine[] = [{ id: 'E05', component: 'E05', group: 'coverage', u: 1e-3, note: '' }];
  const total = totalOf(1e-4, budget, { low: 0, high: 1 });

  it('the interval is not symmetric and stays inside', () => {
    expect(total.interval!.low).toBe(0);
    expect(total.interval!.high).toBeGreaterThan(1.5e-3);
  });

  it('decides a bound that k·u alone would not', () => {
    const below: Claimed = { kind: 'above', bound: 0, printed: '> 0' };
    expect(coverageOf(below, 1e-4, budget, total).state).toBe('covered');
    expect(coverageOf(below, 1e-4, budget, { u: total.u, expanded: total.expanded }).state).toBe('understated');
  });

  it('is drawn from the shape that a line gives, so that a bound reaches no further than it is wide', () => {
    const wide = { low: 0, high: 1 };
    const of = (shape: BudgetLine['shape']) => totalOf(0.02, [{ ...budget[0]!, u: 0.01, ...(shape ? { shape } : {}) }], wide).interval!;
    expect(of('rectangular').high).toBeLessThan(0.02 + 0.01 * Math.sqrt(3));
    expect(of('normal').high).toBeGreaterThan(0.02 + 0.01 * Math.sqrt(3));
    expect(of(undefined)).toEqual(of('normal'));
  });

  it('is not asked for far from any bound', () => {
    expect(totalOf(0.5, budget, { low: 0, high: 1 }).interval).toBeUndefined();
    expect(totalOf(0.5, [{ ...budget[0]!, u: 0 }], { low: 0, high: 0.5 }).interval).toBeUndefined();
  });
});
