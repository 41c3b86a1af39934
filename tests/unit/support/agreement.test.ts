import { describe, expect, it } from 'vitest';
import { seededRandom } from '../../support/seeded-random';

describe('toAgreeWith', () => {
  it('passes within the tolerance and fails beyond it', () => {
    expect(1.05).toAgreeWith(1, 0.05000001);
    expect(1.06).not.toAgreeWith(1, 0.05);
    expect(101).toAgreeWith(100, { relative: 0.01 });
    expect(() => expect(102).toAgreeWith(100, { relative: 0.01 })).toThrow('they lie 2 apart');
  });

  it.each([NaN, Infinity, -Infinity, undefined, null, '1'])('throws on %s, negated or not', (odd) => {
    expect(() => expect(odd).toAgreeWith(1, 1)).toThrow('finite');
    expect(() => expect(odd).not.toAgreeWith(1, 1)).toThrow('finite');
    expect(() => expect(1).toAgreeWith(odd as number, 1)).toThrow('finite');
  });

  it('throws on a tolerance that is missing, negative or not finite', () => {
    expect(() => expect(1).toAgreeWith(1, {})).toThrow('needs an absolute or a relative');
    expect(() => expect(1).toAgreeWith(1, -1)).toThrow('zero or more');
    expect(() => expect(1).toAgreeWith(1, NaN)).toThrow('finite');
  });
});

describe('seededRandom', () => {
  const draws = (seed: number): number[] => Array.from({ length: 2000 }, seededRandom(seed));

  it('repeats itself for a seed, and not for another', () => {
    expect(draws(7)).toEqual(draws(7));
    expect(draws(7)).not.toEqual(draws(8));
  });

  it('is uniform on [0, 1): mean 1/2 and variance 1/12 within four standard errors', () => {
    const values = draws(1);
    const mean = values.reduce((sum, x) => sum + x, 0) / values.length;
    const variance = values.reduce((sum, x) => sum + (x - mean) ** 2, 0) / values.length;
    expect(values.every((x) => x >= 0 && x < 1)).toBe(true);
    expect(mean).toAgreeWith(0.5, 4 * Math.sqrt(1 / 12 / values.length));
    expect(variance).toAgreeWith(1 / 12, 4 * Math.sqrt(1 / 180 / values.length));
  });
});
