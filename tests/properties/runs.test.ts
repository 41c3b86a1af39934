import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { convergenceOrder } from '@/lib/engine/quantities/convergence-order';
import { extrapolatedValue } from '@/lib/engine/quantities/extrapolated-value';
import { radiusExtrapolation } from '@/lib/engine/quantities/radius-extrapolation';
import { atRadius, measureSeries, runOf } from '../golden/run-signals';

const SOME = { numRuns: 4, seed: 7 };
const order = fc.double({ min: 0.5, max: 8, noNaN: true });
const factor = fc.double({ min: 0.05, max: 20, noNaN: true });
const ratio = fc.double({ min: 1.08, max: 2.5, noNaN: true });
const routes = ['A', 'B'] as const;

const reach = (quantity: typeof convergenceOrder, series: readonly Waveform[], settings = {}) => measureSeries(quantity, series, settings).points[0]!;

describe('runs whose phase and amplitude are off by one power of the spacing', () => {
  it('have that order by both routes, whatever the spacings and their unit, and in whatever order they stand', () => {
    fc.assert(
      fc.property(order, ratio, ratio, factor, (p, r, s, unit) => {
        const [h1, h2, h3] = [r * s, s, 1];
        const runs = [h2, h3, h1].map((h) => runOf({ phaseRad: 0.2 * (h / h1) ** p, amplitude: 0.01 * (h / h1) ** p }, { name: `h${h}`, resolution: unit * h }, 1));
        for (const observable of ['amplitude', 'phase-at-peak'] as const) {
          const { routes: by } = reach(convergenceOrder, runs, { observable });
          for (const route of routes) expect(by[route]).toAgreeWith(p, 2e-4);
        }
      }),
      SOME,
    );
  });
  it('tend to the amplitude without error, whatever their common factor', () => {
    fc.assert(
      fc.property(order, factor, (p, size) => {
        const at = (h: number): Waveform => runOf({ phaseRad: 0, amplitude: size * (1 + 0.01 * h ** p) - 1 }, { name: `h${h}`, resolution: h }, 1);
        const { routes: by } = reach(extrapolatedValue, [1, 0.8, 0.6].map(at), { observable: 'amplitude-at-peak' });
        for (const route of routes) expect(by[route]).toAgreeWith(size * 0.3270350226016691, { relative: 2e-6 });
      }),
      SOME,
    );
  });
});

describe('radii', () => {
  it('that are isotropic give the limit that their areal ones give', () => {
    fc.assert(
      fc.property(fc.double({ min: 1.2, max: 3, noNaN: true }), (spread) => {
        const stated = [0, 1, 2, 3].map((k) => 60 * spread ** (k / 2));
        const areal = stated.map((r) => r * (1 + 1 / (2 * r)) ** 2);
        const settings = { observable: 'amplitude-at-peak' } as const;
        const isotropic = reach(radiusExtrapolation, stated.map((r, i) => atRadius(r, areal[i]!, { radiusType: 'isotropic' })), settings);
        const plain = reach(radiusExtrapolation, areal.map((r) => atRadius(r, r)), settings);
        for (const route of routes) expect(isotropic.routes[route]).toAgreeWith(plain.routes[route]!, { relative: 1e-11 });
      }),
      SOME,
    );
  });
});
