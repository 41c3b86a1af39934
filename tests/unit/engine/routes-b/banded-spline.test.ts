import { describe, expect, it } from 'vitest';
import { antiderivativeOf, derivativeOf, evaluateSplines, fitSpline, splineBasis } from '@/lib/engine/routes/b/banded-spline';
import { seededRandom } from '../../../support/seeded-random';

const scattered = (n: number): Float64Array => {
  const random = seededRandom(5);
  let t = 0;
  return Float64Array.from({ length: n }, () => (t += 0.5 + random()));
};

const between = (sites: Float64Array): Float64Array => sites.subarray(1).map((x, i) => (2 * x + sites[i]!) / 3);

describe('the degree-7 spline', () => {
  const sites = scattered(40);
  const centre = sites[20]!;
  const polynomial = (x: number): number => 1 + (x - centre) - 3e-3 * (x - centre) ** 3 + 1e-6 * (x - centre) ** 7;
  const slope = (x: number): number => 1 - 9e-3 * (x - centre) ** 2 + 7e-6 * (x - centre) ** 6;
  const spline = fitSpline(splineBasis(sites), sites.map(polynomial));
  const points = between(sites);

  it('reproduces polynomials of degree 7 on uneven sites, up to the ends', () => {
    const [values] = evaluateSplines([spline], points);
    points.forEach((x, i) => expect(values![i]).toAgreeWith(polynomial(x), { absolute: 1e-7 * Math.abs(polynomial(sites[0]!)) }));
  });

  it('differentiates and integrates them', () => {
    const [slopes] = evaluateSplines([derivativeOf(spline)], points);
    const [again] = evaluateSplines([derivativeOf(antiderivativeOf(spline))], points);
    const scale = Math.abs(slope(sites[0]!));
    points.forEach((x, i) => {
      expect(slopes![i]).toAgreeWith(slope(x), { absolute: 1e-7 * scale });
      expect(again![i]).toAgreeWith(polynomial(x), { absolute: 1e-7 * Math.abs(polynomial(sites[0]!)) });
    });
    const [start] = evaluateSplines([antiderivativeOf(spline)], sites.subarray(0, 1));
    expect(start![0]).toAgreeWith(0, 1e-12);
  });

  it('gains eight orders: half the step, 1/256 of the error', () => {
    const errorAt = (n: number): number => {
      const axis = Float64Array.from({ length: n + 1 }, (_, i) => (20 * i) / n);
      const wave = fitSpline(splineBasis(axis), axis.map((x) => Math.sin(2 * x)));
      const inner = between(axis).filter((x) => x > 7 && x < 13);
      const [values] = evaluateSplines([wave], inner);
      return Math.max(...inner.map((x, i) => Math.abs(values![i]! - Math.sin(2 * x))));
    };
    const order = Math.log2(errorAt(80) / errorAt(160));
    expect(order).toBeGreaterThan(7.5);
    expect(order).toBeLessThan(8.8);
  });

  it.each([2, 3, 4, 5, 7, 8])('passes through %i samples, however few', (n) => {
    const axis = Float64Array.from({ length: n }, (_, i) => i * i + i);
    const samples = axis.map((x) => Math.cos(x));
    const [values] = evaluateSplines([fitSpline(splineBasis(axis), samples)], axis);
    samples.forEach((v, i) => expect(values![i]).toAgreeWith(v, 1e-12));
  });
});
