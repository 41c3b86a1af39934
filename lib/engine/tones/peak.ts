import { derivativesAtSamples } from '../radiation/local-calculus';
import { derivativeOf, evaluateSplines, fitSpline, splineBasis } from '../routes/b/banded-spline';
import { interpolatePair } from '../series/local-interpolation';
import type { Tone } from './tone';

/** A curve that varies less than this of its height has no peak (rule 2.10). */
const FLAT = 1e-6;
/** Samples kept on either side of the highest one. */
const MARGIN = 20;

const powerOf = ({ re, im }: Tone): Float64Array => re.map((x, i) => x * x + im[i]! * im[i]!);

/** Index of the largest sample, or null at an end of the record or on a flat curve. */
function highest(power: Float64Array): number | null {
  let [at, top, low] = [0, -Infinity, Infinity];
  for (let i = 0; i < power.length; i++) {
    if (power[i]! > top) [at, top] = [i, power[i]!];
    if (power[i]! < low) low = power[i]!;
  }
  const flat = Math.sqrt(top) - Math.sqrt(low) <= FLAT * Math.sqrt(top);
  return flat || at === 0 || at === power.length - 1 ? null : at;
}

function around(tone: Tone, i: number): Tone {
  const [from, to] = [Math.max(0, i - MARGIN), Math.min(tone.axis.length, i + MARGIN + 1)];
  return { ...tone, axis: tone.axis.subarray(from, to), re: tone.re.subarray(from, to), im: tone.im.subarray(from, to) };
}

/**
 * Zero of a falling function between two times, by bisection.
 * Shape:  one time.
 * Units:  those of the times.
 * Error:  rounding.
 * Fails:  never; without a change of sign it gives an end.
 * Source: definition.
 */
export function fallingZero(f: (t: number) => number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (let pass = 0; pass < 60 && high - low > 0; pass++) {
    const middle = (low + high) / 2;
    if (f(middle) > 0) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** Vertex of the least-squares parabola through five samples around the highest one. */
function parabolaVertex(axis: Float64Array, values: Float64Array, i: number): number {
  const from = Math.max(0, Math.min(i - 2, axis.length - 5));
  const at = (k: number): readonly [number, number] => [axis[from + k]! - axis[i]!, values[from + k]! - values[i]!];
  const s = [0, 0, 0, 0, 0];
  const r = [0, 0, 0];
  for (let k = 0; k < Math.min(5, axis.length); k++) {
    const [t, y] = at(k);
    for (let p = 0; p < 5; p++) s[p] = s[p]! + t ** p;
    for (let p = 0; p < 3; p++) r[p] = r[p]! + y * t ** p;
  }
  const [s0, s1, s2, s3, s4] = s as [number, number, number, number, number];
  const [r0, r1, r2] = r as [number, number, number];
  const slope = s0 * (r1 * s4 - s3 * r2) - r0 * (s1 * s4 - s3 * s2) + s2 * (s1 * r2 - r1 * s2);
  const bend = s0 * (s2 * r2 - r1 * s3) - s1 * (s1 * r2 - r1 * s2) + r0 * (s1 * s3 - s2 * s2);
  return axis[i]! - slope / (2 * bend);
}

/** By a local polynomial of order 8, one of order 6, or the parabola through five samples. */
export type PeakBy = 'polynomial' | 'shorter polynomial' | 'parabola';

/** How a number made of several runs turns its knobs: the parabola's own error differs from run to run by more than is asked. */
export const shorterPeak = 'End weights of order 8 against 6, peak by a polynomial against a shorter one; changes added, half-width over √3.';

/**
 * Route A: time of the largest |H|, where the local polynomial of |H|² has slope zero; by the
 * five-sample parabola of rule 2.10 when that is asked for.
 * Shape:  one time, or null without an interior maximum or on a flat curve.
 * Units:  M.
 * Error:  order 8 in the step; the parabola second order.
 * Fails:  null.
 * Source: settings.md rule 2.10.
 */
export function peakOnSamples(tone: Tone, by: PeakBy = 'polynomial'): number | null {
  const power = powerOf(tone);
  const top = highest(power);
  if (top === null) return null;
  const near = around(tone, top);
  const values = powerOf(near);
  const i = near.axis.indexOf(tone.axis[top]!);
  if (by === 'parabola' || near.axis.length < 9) return parabolaVertex(near.axis, values.map(Math.sqrt), i);
  const order = by === 'polynomial' ? 8 : 6;
  const { slopes } = derivativesAtSamples(near.axis, [values], order + 1);
  const slopeAt = (t: number): number => interpolatePair({ axis: near.axis, first: slopes[0]!, second: values }, { t0: t, dt: 1, n: 1 }, order)[0][0]!;
  return fallingZero(slopeAt, near.axis[i - 1]!, near.axis[i + 1]!);
}

/**
 * Route B: the same time from splines of the real and imaginary part.
 * Shape:  one time, or null without an interior maximum or on a flat curve.
 * Units:  M.
 * Error:  order 7 in the step.
 * Fails:  null.
 * Source: settings.md rule 2.10.
 */
export function peakOnSplines(tone: Tone): number | null {
  const top = highest(powerOf(tone));
  if (top === null) return null;
  const near = around(tone, top);
  const i = near.axis.indexOf(tone.axis[top]!);
  const basis = splineBasis(near.axis);
  const [re, im] = [fitSpline(basis, near.re), fitSpline(basis, near.im)];
  const slopes = [derivativeOf(re), derivativeOf(im)];
  const growth = (t: number): number => {
    const at = Float64Array.of(t);
    const [a, b] = evaluateSplines([re, im], at);
    const [da, db] = evaluateSplines(slopes, at);
    return a![0]! * da![0]! + b![0]! * db![0]!;
  };
  return fallingZero(growth, near.axis[i - 1]!, near.axis[i + 1]!);
}
