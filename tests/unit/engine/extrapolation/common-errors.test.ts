import { describe, expect, it } from 'vitest';
import type { DeclaredSettings, Observable } from '@/lib/engine/contract/settings';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { convergenceOrder } from '@/lib/engine/quantities/convergence-order';
import { extrapolatedValue } from '@/lib/engine/quantities/extrapolated-value';
import { evenTimes, modeFrom, modeSet } from '@/tests/golden/energy-signals';
import { measureSeries } from '@/tests/golden/run-signals';

/** A chirp whose final frequency and decay are off by a part. */
function runAt(off: number, name: string, resolution: number, stepM: number): Waveform {
  const axis = evenTimes(-400, 150, stepM);
  const [omega, gamma] = [0.55 * (1 + off), 0.085 * (1 + off)];
  const of22 = modeFrom(axis, 2, 2, (t) => {
    const size = 0.3 * Math.exp((-gamma * (Math.hypot(t, 8) + t)) / 2) * (0.3 + 0.7 / (1 + Math.exp(-(t + 40) / 20)));
    const phase = 0.1 * t + (omega - 0.1) * 10 * (Math.log1p(Math.exp(-Math.abs(t + 15) / 10)) + Math.max(0, (t + 15) / 10));
    return [size * Math.cos(phase), -size * Math.sin(phase)];
  });
  return { ...modeSet(axis, [of22, { l: 2, m: -2, re: of22.re, im: of22.im.map((x) => -x) }]), series: 'U', name, resolution };
}

const family = (steps: readonly [number, number, number]): Waveform[] => [80, 96, 112].map((n, i) => runAt(2e-3 * (80 / n) ** 4, `n${n}`, 1 / n, steps[i]!));
const families: readonly (readonly [string, Waveform[]])[] = [
  ['the same step', family([0.5, 0.5, 0.5])],
  ['a step of its own', family([0.5, 0.42, 0.36])],
];

/** Order and limit of the exact numbers (independent derivation: mpmath at 40 digits over the closed form); U that independent errors would give is hundreds to millions of times the most allowed here. */
const truth: readonly (readonly [Observable, DeclaredSettings, number, number, most: number])[] = [
  ['ringdown-frequency', { window: [40, 90] }, 3.9999892690667, 0.5490533473036624, 1e-6],
  ['ringdown-damping', { window: [40, 90] }, 3.9999897401172, 0.08404227368366018, 1e-6],
  ['cycles', { window: [-350, 60] }, 4, 11.8972280041179, 1e-6],
  ['phase-at-peak', {}, 3.9967109300844, 42.42096022766705, 1e-3],
  ['amplitude-at-peak', {}, 3.9977688298767, 0.2332256975328058, 1e-4],
  ['radiated-energy', {}, 4.0005775354282, 0.0118039927481084, 1e-3],
];

describe.each(families)('of runs that each have %s', (_, series) => {
  it.each(truth)('order and limit of %s lie within U by both routes, and U of the order is small', (observable, settings, order, limit, most) => {
    for (const [quantity, exact] of [[convergenceOrder, order], [extrapolatedValue, limit]] as const) {
      const [point] = measureSeries(quantity, series, { observable, ...settings }).points;
      const U = point!.expandedUncertainty!;
      for (const route of ['A', 'B'] as const) expect(Math.abs(point!.routes[route]! - exact)).toBeLessThan(U);
      if (quantity === convergenceOrder) expect(U).toBeLessThan(most);
    }
  });
});

it('printed digits of different files stay independent', () => {
  const printed = families[0]![1].map((run) => ({ ...run, significantDigits: 6 }));
  const { budget } = measureSeries(convergenceOrder, printed, { observable: 'ringdown-frequency', window: [40, 90] });
  const of = (id: string) => budget.find((line) => line.id === id)!;
  expect(of('rounding').u).toBeGreaterThan(100 * of('E01').u!);
  expect(of('E01').note).toContain('Turned in all runs at once');
});
