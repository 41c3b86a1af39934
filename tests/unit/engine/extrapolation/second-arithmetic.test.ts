import { describe, expect, it } from 'vitest';
import { limitByWeights, orderByNewton } from '@/lib/engine/extrapolation/order-by-newton';
import { fitInInverseRadius } from '@/lib/engine/extrapolation/radius-fit';
import { fitByReflections } from '@/lib/engine/extrapolation/radius-fit-by-reflections';
import { orderFromRatio, predictedRatio, richardsonValue, type Spacings } from '@/lib/engine/extrapolation/richardson';
import { seededRandom } from '@/tests/support/seeded-random';

const grids: readonly Spacings[] = [[1 / 80, 1 / 96, 1 / 112], [1, 0.5, 0.25], [3, 1, 0.9], [1.1, 1, 0.2]];

describe("Newton's method on the logarithm", () => {
  it.each(grids)('finds the orders that bracketing finds, on %f, %f and %f', (...spacings) => {
    for (const order of [0.05, 0.7, 1, 2, 4, 6.5, 19.9]) {
      const ratio = predictedRatio(order, spacings);
      const bracketed = orderFromRatio(ratio, spacings);
      expect(orderByNewton(ratio, spacings)).toAgreeWith(order, 1e-10);
      expect(bracketed.ok && bracketed.value).toAgreeWith(order, 1e-10);
    }
  });
  it.each([[-1], [0.5], [1e9], [Number.NaN]])('gives no number where the ratio is %f', (ratio) => {
    expect(orderByNewton(ratio, grids[0]!)).toBeNaN();
    expect(orderFromRatio(ratio, grids[0]!).ok).toBe(false);
  });
  it('gives no number for equal spacings', () => expect(orderByNewton(2, [1, 1, 0.5])).toBeNaN());
  it('carries to the same limit as the increment does', () => {
    expect(limitByWeights(5.2, 5.05, 1 / 96, 1 / 112, 2.8)).toAgreeWith(richardsonValue(5.2, 5.05, 1 / 96, 1 / 112, 2.8), 1e-13);
  });
});

describe('reflections of the powers of 1/r', () => {
  it.each([1, 2, 3, 4])('give the constant that orthogonal polynomials give, degree %i', (degree) => {
    const random = seededRandom(11);
    const radii = [60, 80, 100, 120, 150, 200];
    const values = radii.map(() => 1 + 0.01 * random());
    const fit = fitInInverseRadius(radii, values, degree);
    expect(fitByReflections(radii, values, degree)[0]).toAgreeWith(fit.ok ? fit.value.atInfinity : Number.NaN, { relative: 1e-10 });
  });
  it('give no number with too few radii', () => expect(fitByReflections([60, 80], [1, 2], 2)[0]).toBeNaN());
});
