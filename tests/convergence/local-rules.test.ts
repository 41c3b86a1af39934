import { describe, expect, it } from 'vitest';
import { derivativesAtSamples, quadratureWeights } from '@/lib/engine/radiation/local-calculus';
import { edgeRule } from '@/lib/engine/series/edge-weights';
import { interpolatePair } from '@/lib/engine/series/local-interpolation';

/** Halve the step and measure how much faster the error falls: the order of a rule is what it does, not what its comment says. */
const f = (t: number): number => Math.exp(Math.sin(t));
const slope = (t: number): number => Math.cos(t) * f(t);
const FROM = 0.3;
const TO = 4.1;

/** Steps that alternate in length, so that no order comes from the evenness of a grid. */
const unevenAxis = (n: number): Float64Array => Float64Array.from({ length: n + 1 }, (_, i) => FROM + ((TO - FROM) * (i + 0.2 * Math.sin((Math.PI * 4 * i) / n))) / n);
const sampled = (axis: Float64Array): Float64Array => Float64Array.from(axis, f);

function orderBetween(errorAt: (n: number) => number, n: number): number {
  return Math.log2(errorAt(n) / errorAt(2 * n));
}

const largest = (values: Iterable<number>): number => Math.max(...[...values].map(Math.abs));

describe('local interpolation', () => {
  it.each([[4, 3.5], [6, 5.5], [8, 7.2]])('through %d points falls with an order of at least %d', (points, least) => {
    const errorAt = (n: number): number => {
      const axis = unevenAxis(n);
      const y = sampled(axis);
      const grid = { t0: FROM, dt: (TO - FROM) / 997, n: 997 };
      const [got] = interpolatePair({ axis, first: y, second: y }, grid, points);
      return largest(Array.from({ length: grid.n }, (_, i) => got[i]! - f(grid.t0 + i * grid.dt)));
    };
    expect(orderBetween(errorAt, 24)).toBeGreaterThan(least);
  });
});

describe('local differences', () => {
  it.each([[5, 3.5], [7, 5.4], [9, 7]])('through %d samples fall with an order of at least %d', (points, least) => {
    const errorAt = (n: number): number => {
      const axis = unevenAxis(n);
      const [got] = derivativesAtSamples(axis, [sampled(axis)], points).slopes;
      return largest(Array.from(axis, (t, i) => got![i]! - slope(t)));
    };
    expect(orderBetween(errorAt, 96)).toBeGreaterThan(least);
  });
});

describe('local quadrature', () => {
  const exact = (): number => {
    const n = 200_000;
    let sum = 0;
    for (let i = 0; i < n; i++) sum += f(FROM + ((i + 0.5) * (TO - FROM)) / n);
    return (sum * (TO - FROM)) / n;
  };
  const reference = exact();

  it.each([[4, 3.4], [6, 5.2]] as const)('through %d samples falls with an order of at least %d', (points, least) => {
    const errorAt = (n: number): number => {
      const axis = unevenAxis(n);
      const weights = quadratureWeights(axis, FROM, points);
      const y = sampled(axis);
      return Math.abs(weights.reduce((sum, w, i) => sum + w * y[i]!, 0) - reference);
    };
    expect(orderBetween(errorAt, 16)).toBeGreaterThan(least);
  });
});

describe('fractional end weights', () => {
  it.each([[4, 3.5], [6, 5.5], [8, 7.2]])('of order %d fall with at least %d as the bins close up around an edge between them', (order, least) => {
    const edge = 0.123;
    const bell = (x: number): number => Math.exp(-x * x);
    const exact = (): number => {
      const n = 400_000;
      const to = 7;
      let sum = 0;
      for (let i = 0; i < n; i++) sum += bell(edge + ((i + 0.5) * (to - edge)) / n);
      return (sum * (to - edge)) / n;
    };
    const reference = exact();
    const errorAt = (n: number): number => {
      const h = 1 / n;
      const first = Math.ceil(edge / h);
      const weights = new Float64Array(order);
      edgeRule(order, -(order >> 1)).weightsAt(first - edge / h, weights);
      let sum = 0;
      for (let k = first; k * h < 7; k++) sum += bell(k * h);
      weights.forEach((w, j) => (sum += w * bell((first - (order >> 1) + j) * h)));
      return Math.abs(sum * h - reference);
    };
    const overall = Math.log2(errorAt(3) / errorAt(12)) / 2;
    expect(overall).toBeGreaterThan(least);
  });
});
