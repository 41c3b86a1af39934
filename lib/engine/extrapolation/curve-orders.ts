import { relativeSlip } from '../radiation/input-rounding';
import { err, type Result } from '@/lib/kernel/result';
import { curvesOnSamples, endOnSamples, houseCurves, type CurveNumerics } from './curves-on-samples';
import { curvesOnSplines, endOnSplines } from './curves-on-splines';
import type { FollowedRun } from './followed-runs';
import { orderByNewton } from './order-by-newton';
import { LARGEST_ORDER, orderFromRatio, predictedRatio, type Spacings } from './richardson';
import { curveNames, dominantCurve, rootMeanSquare, type Curve, type RunCurves, type ThreeTones } from './run-curves';

export type ThreeRuns = readonly [coarsest: FollowedRun, middle: FollowedRun, finest: FollowedRun];

/** Where three runs are compared; `to` is null where the finest run itself says it. */
export interface Interval {
  readonly from: number;
  readonly to: number | null;
  /** End of the shortest record. */
  readonly last: number;
}

const tonesOf = (runs: ThreeRuns, which: 'A' | 'B' | 'coarse'): ThreeTones => runs.map(({ tones }) => tones[which]) as unknown as ThreeTones;

/** Curves of route A over the interval. */
export function curvesByRouteA(runs: ThreeRuns, { from, to, last }: Interval, numerics: CurveNumerics = houseCurves, which: 'A' | 'coarse' = 'A'): RunCurves {
  const tones = tonesOf(runs, which);
  return curvesOnSamples(tones, from, to ?? endOnSamples(tones[2], from, last, numerics), numerics);
}

/** Order of one curve by route B. */
export function orderByRouteB(runs: ThreeRuns, { from, to, last }: Interval, curve: Curve, spacings: Spacings): number {
  const tones = tonesOf(runs, 'B');
  const curves = curvesOnSplines(tones, from, to ?? endOnSplines(tones[2], from, last));
  const [coarse, fine] = differencesOf(curves, curve);
  return orderByNewton(coarse / fine, spacings);
}

/** Root mean square of a curve's differences: coarsest less middle, middle less finest. */
export const differencesOf = (curves: RunCurves, curve: Curve): readonly [number, number] => [rootMeanSquare(curves.w, curves[curve][0]), rootMeanSquare(curves.w, curves[curve][1])];

export const orderOfCurve = (curves: RunCurves, curve: Curve, spacings: Spacings): Result<number, string> => {
  const [coarse, fine] = differencesOf(curves, curve);
  return orderFromRatio(coarse / fine, spacings);
};

/** Which curve `dominant` stands for. */
export const curveNamed = (observable: 'dominant' | Curve, curves: RunCurves): Curve => (observable === 'dominant' ? dominantCurve(curves) : observable);

/** Below this no difference of binary doubles is trusted. */
const DOUBLE_SLIP = 1e-12;

/** Standard deviation of a difference of two printed samples, relative to them. */
export function slipOf(runs: ThreeRuns): number {
  const digits = runs.flatMap(({ waveform: { significantDigits } }) => (significantDigits === null ? [] : [significantDigits]));
  return digits.length === 0 ? DOUBLE_SLIP : Math.max(DOUBLE_SLIP, Math.SQRT2 * relativeSlip(Math.min(...digits)));
}

/** What rounding alone makes of a curve's difference, by rms. */
export const noiseOf = (curves: RunCurves, curve: Curve, slip: number): number => (curve === 'phase' ? slip : slip * rootMeanSquare(curves.w, curves.finest));

/** Differences have to stand out of the rounding by this factor. */
const ABOVE_NOISE = 3;

/**
 * The order of one curve, or why there is none.
 * Shape:  one number.
 * Units:  none.
 * Error:  that of the curves.
 * Fails:  with the reason, as the end of a sentence that begins with the runs.
 * Source: settings.md section 6.
 */
export function soundOrder(curves: RunCurves, curve: Curve, spacings: Spacings, slip: number): Result<number, string> {
  const [, fine] = differencesOf(curves, curve);
  if (!(fine > ABOVE_NOISE * noiseOf(curves, curve, slip))) return err('do not differ by more than their rounding');
  return orderOfCurve(curves, curve, spacings);
}

/** All three, null where there is none. */
export function ordersOf(curves: RunCurves, spacings: Spacings, slip: number): Record<Curve, number | null> {
  const orders = curveNames.map((curve) => {
    const found = soundOrder(curves, curve, spacings, slip);
    return [curve, found.ok ? found.value : null] as const;
  });
  return Object.fromEntries(orders) as Record<Curve, number | null>;
}

export interface Pointwise {
  readonly median: number | null;
  /** Distance of the quartiles. */
  readonly range: number | null;
  /** At each time of the curves; null where differences are rounding or no order shrinks them so. */
  readonly orders: readonly (number | null)[];
}

const FEWEST = 16;
const POINT_ABOVE_NOISE = 10;

/** The order that shrinks differences by a ratio; the nearest end of 0…20 where none does. */
function nearestOrder(ratio: number, spacings: Spacings): number {
  const found = orderFromRatio(ratio, spacings);
  return found.ok ? found.value : ratio > predictedRatio(LARGEST_ORDER, spacings) ? LARGEST_ORDER : 0;
}

const quantile = (sorted: readonly number[], share: number): number => sorted[Math.round(share * (sorted.length - 1))]!;

/**
 * The order at each time by itself, where the differences stand out of the rounding: a check, never a route. Differences that
 * change sign from one pair of runs to the next have no order and count as the lowest.
 * Shape:  median, distance of the quartiles, and one order a time.
 * Units:  none.
 * Error:  that of the curves at single times.
 * Fails:  nulls where fewer than sixteen times remain.
 * Source: Q20 (pointwise scaling).
 */
export function pointwiseOrders({ phase, amplitude, complex, finest }: RunCurves, curve: Curve, spacings: Spacings, slip: number): Pointwise {
  const [coarse, fine] = { phase, amplitude, complex }[curve];
  const ratios = Array.from(fine, (d, i) => (Math.abs(d) > POINT_ABOVE_NOISE * slip * (curve === 'phase' ? 1 : finest[i]!) ? coarse[i]! / d : null));
  const sorted = ratios.filter((ratio) => ratio !== null).sort((p, q) => p - q);
  const orders = ratios.map((ratio) => {
    const found = ratio === null ? null : orderFromRatio(ratio, spacings);
    return found?.ok ? found.value : null;
  });
  if (sorted.length < FEWEST) return { median: null, range: null, orders };
  const median = orderFromRatio(quantile(sorted, 0.5), spacings);
  const [low, high] = [0.25, 0.75].map((share) => nearestOrder(quantile(sorted, share), spacings)) as [number, number];
  return { median: median.ok ? median.value : null, range: high - low, orders };
}
