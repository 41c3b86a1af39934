import { describe, expect, it } from 'vitest';
import { parseClaimed, type Claimed } from '@/lib/claims/claimed';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import { totalOf } from '@/lib/engine/budget/total';
import { coverageOf as coverageBy } from '@/lib/verdicts/coverage';
import { remarksOf as remarksBy, type WeighedPoint } from '@/lib/verdicts/remarks';
import type { VerdictWord } from '@/lib/verdicts/verdict';

function claimed(raw: unknown): Claimed {
  const parsed = parseClaimed(raw);
  if (!parsed.ok) throw new Error(parsed.error.saw);
  return parsed.value;
}
const open = { low: null, high: null };
const coverageOf = (of: Claimed, value: number | null, budget: readonly BudgetLine[], range = open) => coverageBy(of, value, budget, totalOf(value, budget, range));
const remarksOf = (points: readonly WeighedPoint[], budget: readonly BudgetLine[]) => remarksBy(points, budget, totalOf(1, budget, open));
const line = (component: string, u: number | null): BudgetLine => ({ component, id: 'E00', group: 'coverage', u, note: '' });

describe('coverage', () => {
  it('is unknown, naming what is missing, where what is known could be covered', () => {
    expect(coverageOf(claimed('0.998(1)'), 0.998, [line('quadrature', 1e-9), line('resolution', null), line('radius', null)])).toEqual({ state: 'unknown', missing: ['resolution', 'radius'] });
    expect(coverageOf(claimed('0.998(1)'), 0.998, [line('resolution', Number.NaN)])).toEqual({ state: 'unknown', missing: ['resolution'] });
  });

  it('is understated all the same where a stated uncertainty or a bound fails by the known lines alone, by k = 2', () => {
    const known: BudgetLine = { ...line('resolution', 0.536), degreesOfFreedom: 2 };
    expect(coverageOf(claimed('75.39(18)'), 75.4, [known, line('radius', null)])).toEqual({ state: 'understated', factor: 2.98, missing: ['radius'] });
    expect(coverageOf(claimed('75.39(45)'), 75.4, [known, line('radius', null)])).toEqual({ state: 'unknown', missing: ['radius'] });
    expect(coverageOf(claimed({ above: 75 }), 75.4, [known, line('radius', null)])).toEqual({ state: 'understated', missing: ['radius'] });
    expect(coverageOf(claimed({ above: 74 }), 75.4, [known, line('radius', null)])).toEqual({ state: 'unknown', missing: ['radius'] });
  });

  it('does not take digits for a statement that could fail while a component is missing', () => {
    expect(coverageOf(claimed('75.39'), 75.4, [line('resolution', 0.5), line('radius', null)])).toEqual({ state: 'unknown', missing: ['radius'] });
  });

  it('is unknown when nothing was recomputed: an empty budget is not a perfect one', () => {
    expect(coverageOf(claimed('0.998(1)'), null, [])).toMatchObject({ state: 'unknown' });
    expect(coverageOf(claimed('0.998(1)'), 0.998, [])).toMatchObject({ state: 'unknown' });
  });

  it('adds all lines in quadrature and allows a fifth', () => {
    const budget = [line('taper', 0.3), line('resolution', 0.4)];
    expect(coverageOf(claimed('10.0(5)'), 10, budget)).toEqual({ state: 'covered' });
    expect(coverageOf(claimed('10.0(4)'), 10, budget)).toEqual({ state: 'covered' });
    expect(coverageOf(claimed('10.0(3)'), 10, budget)).toEqual({ state: 'understated', factor: 1.67 });
  });

  it('takes the printed digits for the stated uncertainty when none is given', () => {
    expect(coverageOf(claimed('10.0'), 10, [line('taper', 0.02)])).toEqual({ state: 'covered' });
    expect(coverageOf(claimed('10.0'), 10, [line('taper', 0.2)])).toEqual({ state: 'understated', factor: 6.93 });
  });

  it('of an exact number without uncertainty is unknown: nothing was stated', () => {
    expect(coverageOf(claimed(10), 10, [line('taper', 0.2)])).toEqual({ state: 'unknown', missing: ['stated uncertainty'] });
  });

  it('of a bound asks whether it holds with everything the data allow', () => {
    expect(coverageOf(claimed({ above: 9 }), 10, [line('taper', 0.4)])).toEqual({ state: 'covered' });
    expect(coverageOf(claimed({ above: 9.5 }), 10, [line('taper', 0.4)])).toEqual({ state: 'understated' });
  });
});

describe('remarks', () => {
  const point = (raw: unknown, word: VerdictWord, at: Record<string, number> = {}, uncertainty = 1e-3, remarks?: string[]) => ({
    claimed: claimed(raw), word,
    measured: { at, value: 1, routes: { A: 1, B: 1 }, expandedUncertainty: uncertainty, ...(remarks ? { remarks } : {}) },
  });

  it('say when a claim carries more than one digit beyond what U supports', () => {
    expect(remarksOf([point('0.988942', 'agrees', {}, 3e-4)], [])).toEqual(['digits overstated: 0.988942 carries 6 decimals; an uncertainty of at least 0.0003 supports at most 5 decimals']);
    expect(remarksOf([point('0.98894', 'agrees', {}, 3e-4)], [])).toEqual([]);
    expect(remarksOf([point(0.98894212, 'agrees', {}, 3e-4)], [])).toEqual([]);
    expect(remarksOf([point('0.988942', 'differs', {}, 3e-4)], [])).toEqual([]);
  });

  it('use the whole budget for that, or what is known of it as a lower bound', () => {
    const fine = point('0.98894', 'agrees', {}, 3e-4);
    expect(remarksOf([fine], [line('taper', 0.01)])).toEqual(['digits overstated: 0.98894 carries 5 decimals; an uncertainty of 0.02 supports 3 decimals']);
    expect(remarksOf([fine], [line('taper', 0.01), line('resolution', null)])).toEqual(['digits overstated: 0.98894 carries 5 decimals; an uncertainty of at least 0.02 supports at most 3 decimals']);
    expect(remarksOf([fine], [line('taper', 1e-5), line('resolution', null)])).toEqual([]);
  });

  it('say which part of a sweep holds', () => {
    const words: VerdictWord[] = ['agrees', 'agrees', 'agrees', 'differs', 'agrees', 'unsettled'];
    const points = words.map((word, i) => point(1, word, { totalMassMsun: 20 * (i + 1) }));
    expect(remarksOf(points, [])).toEqual(['narrower scope: holds at 4 of 6 points (totalMassMsun 20 to 60, 100)']);
    expect(remarksOf(points.slice(0, 3), [])).toEqual([]);
    expect(remarksOf(points.slice(3, 4), [])).toEqual([]);
  });

  it('pass on what the measurement says of its points, once', () => {
    expect(remarksOf([point(1, 'agrees', {}, 0, ['lower bound only']), point(1, 'agrees', {}, 0, ['lower bound only'])], [])).toEqual(['lower bound only']);
  });
});
