import { describe, expect, it } from 'vitest';
import { mismatchBound } from '@/lib/engine/budget/metric-bound';
import { completeMeasurement } from '@/lib/engine/budget/complete-measurement';
import type { MeasureRequest } from '@/lib/engine/contract/quantity';
import type { Measurement } from '@/lib/engine/contract/measurement';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { quantities } from '@/lib/engine/quantities/registry';
import { seededRandom } from '@/tests/support/seeded-random';
import { binary, curve } from '@/tests/support/detector-claims';

describe('the metric bound', () => {
  it('of 0.0111 for waveforms known to 1e-4 and exactly is 0.0091 to 0.0133', () => {
    // Domain reference 5.1, the printed example.
    const { low, high } = mismatchBound(0.0111, [1e-4, 0]);
    expect(low).toBeCloseTo(0.0091, 4);
    expect(high).toBeCloseTo(0.0133, 4);
  });

  it('begins at zero where the waveforms are known less well than they differ', () => {
    expect(mismatchBound(1e-6, [1e-4])).toEqual({ low: 0, high: expect.closeTo(1.21e-4, 8) as number });
    expect(mismatchBound(0.01, [])).toEqual({ low: expect.closeTo(0.01, 12) as number, high: expect.closeTo(0.01, 12) as number });
  });

  it('ends where a mismatch ends: at 2, and at 1 for waveforms that are turned against each other', () => {
    expect(mismatchBound(0.5, [0.4, 0.4]).high).toBe(2);
    expect(mismatchBound(0.5, [0.4, 0.4], 1)).toEqual({ low: 0, high: 1 });
    expect(mismatchBound(1.0000001, [], 1)).toEqual({ low: 1, high: 1 });
    expect(mismatchBound(0.5, [Number.NaN]).high).toBeNaN();
  });

  it('holds for any four unit vectors', () => {
    const random = seededRandom(5);
    const unit = (): number[] => {
      const v = Array.from({ length: 4 }, () => random() - 0.5);
      const norm = Math.hypot(...v);
      return v.map((x) => x / norm);
    };
    const near = (v: readonly number[], by: number): number[] => {
      const w = v.map((x) => x + by * (random() - 0.5));
      const norm = Math.hypot(...w);
      return w.map((x) => x / norm);
    };
    const mismatch = (v: readonly number[], w: readonly number[]): number => v.reduce((sum, x, i) => sum + (x - w[i]!) ** 2, 0) / 2;
    for (let i = 0; i < 500; i++) {
      const [a, b] = [unit(), unit()];
      const [seenA, seenB] = [near(a, random()), near(b, random())];
      const { low, high } = mismatchBound(mismatch(seenA, seenB), [mismatch(a, seenA), mismatch(b, seenB)]);
      expect(mismatch(a, b)).toBeGreaterThanOrEqual(low - 1e-12);
      expect(mismatch(a, b)).toBeLessThanOrEqual(high + 1e-12);
    }
  });
});

const quiet = { onProgress: () => undefined, cancelled: () => false };
const settings = { totalMassMsun: 100, fLowHz: 60 };
const run = (name: string, series: string, resolution: number, massRatio: number): Waveform => ({ ...binary(name, { massRatio, modes: ['22'], mOmega0: 0.07, stepM: 1 }), series, resolution });

function completed(quantity: string, a: Waveform, b: Waveform, relatives: MeasureRequest['inputs']['relatives']): Measurement {
  const measuring = quantities.get(quantity)!;
  const request: MeasureRequest = { claimId: 'C', inputs: { of: { a, b }, noise: curve('G2'), ...(relatives ? { relatives } : {}) }, settings, over: null, claimed: [null], withFigures: false };
  return completeMeasurement(measuring, request, measuring.measure(request, quiet), quiet);
}

describe('a match between runs of two simulations', () => {
  const [a, coarseA] = [run('A', 'UA', 1, 1), run('A2', 'UA', 2, 1.1)];
  const [b, coarseB] = [run('B', 'UB', 1, 1.5), run('B2', 'UB', 2, 1.55)];
  const both = new Map([['A', [coarseA]], ['B', [coarseB]]]);
  const found = completed('match', a, b, both);
  const mismatchOf = (p: Waveform, q: Waveform): number => completed('mismatch', p, q, undefined).points[0]!.value!;

  it('is bounded by the mismatches of each with its own other run, under the same mass, band and noise', () => {
    const { metricBound } = found;
    const expected = mismatchBound(1 - found.points[0]!.value!, [mismatchOf(a, coarseA), mismatchOf(b, coarseB)]);
    expect(metricBound!.low).toBeCloseTo(1 - expected.high, 9);
    expect(metricBound!.high).toBeCloseTo(1 - expected.low, 9);
    expect(metricBound!.missing).toEqual(['radius of A', 'radius of B']);
  });

  it('carries the width of the bound over 2√3 as its truncation error, and no radius', () => {
    const line = (id: string) => found.budget.find((each) => each.id === id)!;
    expect(line('E05').u).toBeCloseTo((found.metricBound!.high! - found.metricBound!.low!) / (2 * Math.sqrt(3)), 9);
    expect(line('E05').note).toContain('A bound, not a standard uncertainty');
    expect(line('E05').shape).toBe('rectangular');
    expect(line('E06')).toMatchObject({ u: null, share: null });
  });

  it('is not available where one waveform has no other run: what is known of the other is the least to allow for', () => {
    const one = completed('match', a, b, new Map([['A', [coarseA]]]));
    expect(one.budget.find(({ id }) => id === 'E05')).toMatchObject({ u: null, note: 'Not available: no other resolution of B.' });
    expect(one.metricBound!.low).not.toBeNull();
    expect(one.metricBound!.missing).toContain('resolution of B');
    const none = completed('match', a, b, undefined);
    expect(none.metricBound).toEqual({ low: null, high: null, knownTo: [], missing: ['resolution of A', 'resolution of B', 'radius of A', 'radius of B'] });
  });

  it('stays among the numbers a match and an overlap can be, however badly the waveforms are known', () => {
    const backwards = (given: Waveform, name: string): Waveform => ({ ...given, name, resolution: 2, content: { kind: 'modes', modes: given.content.kind === 'modes' ? given.content.modes.map(({ l, m, re, im }) => ({ l, m, re: re.toReversed(), im: im.toReversed() })) : [] } });
    const unknown = new Map([['A', [backwards(a, 'A2')]], ['B', [backwards(b, 'B2')]]]);
    const slack = (bound: Measurement['metricBound']): number => bound!.knownTo.reduce((sum, { mismatch }) => sum + Math.sqrt(mismatch), 0);
    const match = completed('match', a, b, unknown);
    expect((Math.sqrt(1 - match.points[0]!.value!) + slack(match.metricBound)) ** 2).toBeGreaterThan(1);
    expect(match.metricBound).toMatchObject({ low: 0, high: 1 });
    expect(match.budget.find(({ id }) => id === 'E05')!.u).toBeCloseTo(1 / (2 * Math.sqrt(3)), 12);
    const overlap = completed('overlap', a, b, unknown);
    expect((Math.sqrt(1 - overlap.points[0]!.value!) + slack(overlap.metricBound)) ** 2).toBeGreaterThan(2);
    expect(overlap.metricBound!.low).toBe(-1);
  });

  it('leaves value, U and routes as they were', () => {
    const plain = quantities.get('match')!.measure({ claimId: 'C', inputs: { of: { a, b }, noise: curve('G2') }, settings, over: null, claimed: [null], withFigures: false }, quiet);
    expect(found.points).toEqual(plain.points);
  });

  it('bounds a distinguishability SNR by the same two mismatches', () => {
    const distinguishable = completed('distinguishability-snr', a, b, both);
    const bound = distinguishable.metricBound!;
    const at = mismatchBound(distinguishable.points[0]!.components!.mismatch!, bound.knownTo.map(({ mismatch }) => mismatch));
    expect(bound.low).toBeCloseTo(Math.sqrt(1 / (2 * at.high)), 6);
    expect(bound.high).toBeCloseTo(Math.sqrt(1 / (2 * at.low)), 6);
  });
});
