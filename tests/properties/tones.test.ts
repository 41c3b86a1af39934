import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { amplitudeDifference } from '@/lib/engine/quantities/amplitude-difference';
import { phaseDifference } from '@/lib/engine/quantities/phase-difference';
import { ringdownDamping } from '@/lib/engine/quantities/ringdown-damping';
import { ringdownFrequency } from '@/lib/engine/quantities/ringdown-frequency';
import { evenTimes, modeFrom, modeSet } from '../golden/energy-signals';
import { swellAndRing, toneBy } from '../golden/tone-signals';

const routes = ['A', 'B'] as const;
const SOME = { numRuns: 12, seed: 5 };
const shift = fc.double({ min: -40, max: 40, noNaN: true });
const turn = fc.double({ min: -3, max: 3, noNaN: true });
const factor = fc.double({ min: 0.01, max: 50, noNaN: true });

describe('a ringdown', () => {
  const ring = (by: number, phase: number, size: number): Waveform => {
    const axis = evenTimes(-120, 120, 0.5);
    return modeSet(axis, [modeFrom(axis, 2, 2, (t) => swellAndRing(size, 0.55, 0.085, 4, phase)(t - by))]);
  };
  it('does not depend on where the peak falls between samples, on a constant phase or on a factor', () => {
    const [omega, gamma] = [ringdownFrequency, ringdownDamping].map((quantity) => toneBy('A', quantity, { a: ring(0, 0, 0.3) }));
    fc.assert(
      fc.property(shift, turn, factor, (by, phase, size) => {
        for (const route of routes) {
          expect(toneBy(route, ringdownFrequency, { a: ring(by, phase, size) })).toAgreeWith(omega!, { relative: 1e-7 });
          expect(toneBy(route, ringdownDamping, { a: ring(by, phase, size) })).toAgreeWith(gamma!, { relative: 1e-7 });
        }
      }),
      SOME,
    );
  });
});

describe('two records laid over each other', () => {
  const drift = (t: number): number => (t > 160 ? 3e-7 * (t - 160) ** 3 : 0);
  const chirp = (by: number, phase: number, size: number, apart: number): Waveform => {
    const axis = evenTimes(-60, 360, 0.5);
    return modeSet(axis, [
      modeFrom(axis, 2, 2, (t) => {
        const u = t - by;
        const [a, p] = [size / Math.cosh((u - 240) / 80), 0.1 * u + 4e-4 * u * u + phase + apart * drift(u)];
        return [a * Math.cos(p), -a * Math.sin(p)];
      }),
    ]);
  };
  const a = chirp(0, 0, 0.3, 0);
  const settings = { window: [20, 150] as const };

  it('leave the same phase and amplitude whatever the zero of time, the constant phase and a common factor', () => {
    fc.assert(
      fc.property(shift, turn, factor, (by, phase, size) => {
        const pair = { a: chirp(0, 0, 0.3 * size, 0), b: chirp(by, phase, 0.303 * size, 1) };
        for (const route of routes) {
          expect(toneBy(route, phaseDifference, pair, settings)).toAgreeWith(drift(240), 1e-6);
          expect(toneBy(route, amplitudeDifference, pair, settings)).toAgreeWith(0.01, 1e-6);
        }
      }),
      SOME,
    );
  });
  it('change sign, and only that, when they change places without alignment', () => {
    const b = chirp(0, 0.2, 0.33, 1);
    const plain = { alignment: 'none', at: { timeM: 230.7 } } as const;
    for (const route of routes) {
      expect(toneBy(route, phaseDifference, { a: b, b: a }, plain)).toAgreeWith(-toneBy(route, phaseDifference, { a, b }, plain), 1e-10);
      expect(1 + toneBy(route, amplitudeDifference, { a: b, b: a }, plain)).toAgreeWith(1 / (1 + toneBy(route, amplitudeDifference, { a, b }, plain)), 1e-9);
    }
  });
  it('leave nothing between a record and itself', () => {
    for (const route of routes) for (const quantity of [phaseDifference, amplitudeDifference]) expect(toneBy(route, quantity, { a, b: { ...a, name: 'B' } })).toAgreeWith(0, 1e-10);
  });
});
