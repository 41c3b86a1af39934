import { describe, expect, it } from 'vitest';
import { alignPair, type AlignmentSettings, type PairRoute } from '@/lib/engine/alignment/alignment';
import { coarserPair, housePair, pairOnSamples } from '@/lib/engine/alignment/pair-on-samples';
import { pairOnSplines } from '@/lib/engine/alignment/pair-on-splines';
import type { Tone } from '@/lib/engine/tones/tone';
import { evenTimes, modeFrom } from '../golden/energy-signals';

/** A chirp with a ripple, so that no polynomial is exact; b is a moved by a time between samples. */
const SHIFT = 1.2345;
const TURN = 0.7;
const phase = (t: number): number => 0.2 * t + 2e-3 * t * t + 0.3 * Math.sin(0.45 * t);
const tone = (step: number, by: number, turn: number): Tone => {
  const axis = evenTimes(-40, 60, step);
  const { re, im } = modeFrom(axis, 2, 2, (t) => {
    const size = 1 + 0.3 * Math.sin(0.4 * (t - by));
    return [size * Math.cos(phase(t - by) + turn), -size * Math.sin(phase(t - by) + turn)];
  });
  return { axis, re, im, isEven: true, mode: [2, 2] };
};
const settings: AlignmentSettings = { alignment: 'window', window: [-20.3, 30.7], at: 'peak' };

function shiftBy(make: (a: Tone, b: Tone) => PairRoute, step: number): number {
  const aligned = alignPair(make(tone(step, 0, 0), tone(step, SHIFT, TURN)), settings);
  if ('because' in aligned) throw new Error(aligned.because);
  return aligned.timeShiftM;
}
const orders = (make: (a: Tone, b: Tone) => PairRoute): number[] =>
  [1, 0.5].map((step) => Math.log2(Math.abs(shiftBy(make, step) - SHIFT) / Math.abs(shiftBy(make, step / 2) - SHIFT)));

describe('the shift that lays one record over another', () => {
  it('converges with order 8 in route A, and 6 with its knobs turned down', () => {
    for (const p of orders((a, b) => pairOnSamples(a, b, housePair))) expect(p).toBeGreaterThan(6.5);
    for (const p of orders((a, b) => pairOnSamples(a, b, coarserPair))) expect(p).toBeGreaterThan(4.5);
  });
  it('converges with at least order 6 in route B', () => {
    for (const p of orders(pairOnSplines)) expect(p).toBeGreaterThan(5.5);
  });
  it('has one limit by both', () => {
    expect(shiftBy((a, b) => pairOnSamples(a, b, housePair), 0.125)).toAgreeWith(SHIFT, 1e-8);
    expect(shiftBy(pairOnSplines, 0.125)).toAgreeWith(SHIFT, 1e-8);
  });
});
