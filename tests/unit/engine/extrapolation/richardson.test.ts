import { describe, expect, it } from 'vitest';
import { orderFromRatio, orderOfValues, predictedRatio, richardsonValue, type Spacings } from '@/lib/engine/extrapolation/richardson';

const spacings: Spacings = [1 / 80, 1 / 96, 1 / 112];

describe('ratios of differences between 80, 96 and 112 points per unit', () => {
  // Domain reference Q20, computed there with other software to four digits.
  it.each([[4, 2.333], [3, 1.966], [2, 1.658], [6, 3.291]])('order %i shrinks them by %f', (order, ratio) => {
    expect(predictedRatio(order, spacings)).toBeCloseTo(ratio, 3);
    const found = orderFromRatio(ratio, spacings);
    expect(found.ok && Math.abs(found.value - order)).toBeLessThan(2e-3);
  });
});

describe('three values with an error of one power', () => {
  it.each([0.1, 1, 2, 4, 7.3, 19])('give back order %f and the limit', (order) => {
    const [x1, x2, x3] = spacings.map((h) => 5 - 3 * (80 * h) ** order) as [number, number, number];
    const found = orderOfValues([x1, x2, x3], spacings);
    if (!found.ok) throw new Error(found.error);
    expect(found.value).toBeCloseTo(order, 9);
    expect(richardsonValue(x2, x3, spacings[1], spacings[2], found.value)).toBeCloseTo(5, 9);
  });
});

describe('what has no order says why', () => {
  it.each<[string, [number, number, number], Spacings, RegExp]>([
    ['differences that change their sign', [1, 2, 1.5], spacings, /one direction/],
    ['differences that grow', [1, 1.1, 1.5], spacings, /too little/],
    ['a coarse run from elsewhere', [1e9, 1.1, 1], spacings, /too much/],
    ['two equal runs', [1, 2, 2], spacings, /do not differ/],
    ['equal spacings', [1, 2, 3], [1, 1, 0.5], /three different/],
    ['something that is not a number', [1, Number.NaN, 3], spacings, /do not differ/],
  ])('%s', (_, values, given, reason) => {
    const found = orderOfValues(values, given);
    expect(found.ok).toBe(false);
    expect(!found.ok && found.error).toMatch(reason);
  });
});
