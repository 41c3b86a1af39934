import { describe, expect, it } from 'vitest';
import { fitInInverseRadius } from '@/lib/engine/extrapolation/radius-fit';
import { seededRandom } from '@/tests/support/seeded-random';

const radii = [60, 80, 100, 120, 150, 200];

function fit(values: readonly number[], degree: number, at = radii) {
  const found = fitInInverseRadius(at, values, degree);
  if (!found.ok) throw new Error(found.error);
  return found.value;
}

describe('a polynomial in 1/r', () => {
  it.each([1, 2, 3, 4])('of degree %i gives back its own constant, and no scatter', (degree) => {
    const values = radii.map((r) => 0.04 + Array.from({ length: degree }, (_, k) => (k + 1) / r ** (k + 1)).reduce((p, q) => p + q, 0));
    const found = fit(values, degree);
    expect(found.atInfinity).toBeCloseTo(0.04, 12);
    expect(found.scatter).toBeLessThan(1e-14);
  });

  it('is a straight line through two points, and a mean at degree 0', () => {
    expect(fit([3, 2], 1, [50, 100])).toEqual({ atInfinity: 1, previousOrder: 2.5, scatter: null });
    expect(fit([1, 2, 6], 0, [50, 60, 70])).toMatchObject({ atInfinity: 3, previousOrder: null });
  });

  it('agrees with the normal equations of a straight line on scattered values', () => {
    const random = seededRandom(3);
    const values = radii.map(() => random());
    const xs = radii.map((r) => 1 / r);
    const [n, sx, sy] = [6, xs.reduce((p, q) => p + q), values.reduce((p, q) => p + q)];
    const [sxx, sxy] = [xs.reduce((p, q) => p + q * q, 0), xs.reduce((p, q, i) => p + q * values[i]!, 0)];
    const found = fit(values, 1);
    expect(found.atInfinity).toBeCloseTo((sxx * sy - sx * sxy) / (n * sxx - sx * sx), 10);
    expect(found.previousOrder).toBeCloseTo(sy / n, 12);
  });

  it('does not depend on the order or unit of the radii', () => {
    const values = radii.map((r) => 1 + 3 / r + 1 / r ** 3);
    const turned = fit([...values].reverse(), 2, [...radii].reverse().map((r) => 1e6 * r));
    expect(turned.atInfinity).toBeCloseTo(fit(values, 2).atInfinity, 12);
  });

  it('says what is missing', () => {
    expect(fitInInverseRadius([60, 60, 80], [1, 1, 2], 2)).toMatchObject({ ok: false, error: expect.stringContaining('3 different radii; there are 2') as string });
    expect(fitInInverseRadius([60, 0], [1, 1], 1).ok).toBe(false);
    expect(fitInInverseRadius([60, 80], [1, Number.NaN], 1).ok).toBe(false);
  });
});
