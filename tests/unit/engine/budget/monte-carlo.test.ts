import { describe, expect, it } from 'vitest';
import { monteCarloInterval, type Spread } from '@/lib/engine/budget/monte-carlo';
import { studentFactor } from '@/lib/engine/budget/student';

const open = { low: null, high: null };
const normal = (u: number, degreesOfFreedom?: number): Spread => ({ u, shape: 'normal', ...(degreesOfFreedom === undefined ? {} : { degreesOfFreedom }) });
const rectangular = (u: number): Spread => ({ u, shape: 'rectangular' });
const width = ({ low, high }: { low: number; high: number }): number => high - low;

describe('an interval by draws', () => {
  it('of a normal spread is 2 · 1.96 u wide and holds the value in its middle', () => {
    const found = monteCarloInterval(10, [normal(1)], open)!;
    expect(Math.abs(width(found) - 3.92)).toBeLessThan(0.08);
    expect(Math.abs((found.low + found.high) / 2 - 10)).toBeLessThan(0.2);
  });

  it('of a rectangular spread is 95 % of its width', () => {
    const found = monteCarloInterval(0, [rectangular(1)], open)!;
    expect(Math.abs(width(found) - 0.95 * 2 * Math.sqrt(3))).toBeLessThan(0.02);
  });

  it('of two equal rectangles is that of a triangle', () => {
    // Closed form: JCGM 101, 9.2.3; |x| < 2a(1 − √0.05) for half-width a each.
    const found = monteCarloInterval(0, [rectangular(1), rectangular(1)], open)!;
    expect(Math.abs(width(found) - 4 * Math.sqrt(3) * (1 - Math.sqrt(0.05)))).toBeLessThan(0.1);
  });

  it('of a size that four degrees of freedom estimate is that of Student', () => {
    const found = monteCarloInterval(0, [normal(1, 4)], open)!;
    expect(Math.abs(width(found) / (2 * studentFactor(4, 0.95)) - 1)).toBeLessThan(0.05);
  });

  it('at a bound begins there: half a normal distribution holds 95 % below 1.96 u', () => {
    const found = monteCarloInterval(0, [normal(1e-3)], { low: 0, high: 1 })!;
    expect(found.low).toBe(0);
    expect(Math.abs(found.high / 1.96e-3 - 1)).toBeLessThan(0.03);
    expect(monteCarloInterval(1, [normal(1e-3)], { low: 0, high: 1 })!.high).toBe(1);
  });

  it('near a bound is not symmetric and stays inside', () => {
    const found = monteCarloInterval(1e-3, [normal(1e-3)], { low: 0, high: 1 })!;
    expect(found.low).toBeGreaterThanOrEqual(0);
    expect(found.high - 1e-3).toBeGreaterThan(1.5 * (1e-3 - found.low));
  });

  it('is the same on every call, and none where nothing can fall inside or something is unknown', () => {
    expect(monteCarloInterval(3, [normal(1), rectangular(2)], open)).toEqual(monteCarloInterval(3, [normal(1), rectangular(2)], open));
    expect(monteCarloInterval(5, [rectangular(0.1)], { low: 0, high: 1 })).toBeNull();
    expect(monteCarloInterval(5, [normal(Number.NaN)], open)).toBeNull();
  });
});
