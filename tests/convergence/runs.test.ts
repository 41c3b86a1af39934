import { describe, expect, it } from 'vitest';
import { convergenceOrder } from '@/lib/engine/quantities/convergence-order';
import { extrapolatedValue } from '@/lib/engine/quantities/extrapolated-value';
import { measureSeries, mixedError, runOf } from '../golden/run-signals';

/** Closed forms (see the golden test of the same signal). */
const LIMIT = 67.23442316568632;
const ORDER = 2.7971166184658367;
const at = (stepM: number) => [80, 96, 112].map((n) => runOf(mixedError(1 / n), { name: `n${n}`, resolution: 1 / n }, stepM));

describe('the limit of a phase as the samples grow denser', () => {
  const steps = [1.6, 0.8] as const;
  const found = steps.map((step) => measureSeries(extrapolatedValue, at(step), { observable: 'phase-at-peak' }).points[0]!);

  it.each(['A', 'B'] as const)('route %s gains at least six orders in the step', (route) => {
    const [coarse, fine] = found.map(({ routes }) => Math.abs(routes[route]! - LIMIT));
    expect(Math.log2(coarse! / fine!)).toBeGreaterThan(6);
  });
  it('lies within its own uncertainty', () => found.forEach(({ value, expandedUncertainty }) => expect(value).toAgreeWith(LIMIT, expandedUncertainty!)));
});

describe('the order of curves as the samples grow denser', () => {
  it('stays within its own uncertainty, and the routes within each other’s', () => {
    for (const step of [1.6, 0.8]) {
      const { value, routes, expandedUncertainty } = measureSeries(convergenceOrder, at(step)).points[0]!;
      expect(value).toAgreeWith(ORDER, Math.max(3 * expandedUncertainty!, 1e-8));
      expect(routes.B).toAgreeWith(value!, Math.max(3 * expandedUncertainty!, 1e-8));
    }
  });
});
