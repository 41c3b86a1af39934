import { ENERGY_FACTOR } from './energy-on-samples';
import { squared, type SampledRadiation } from './news-on-samples';

export interface StartBurst {
  /** Energy above the smooth flux, as a fraction of M. */
  readonly energy: number;
  /** Share of the whole record's energy. */
  readonly share: number;
  readonly arrivalM: number;
  readonly spreadM: number;
  /** When it is over. */
  readonly endM: number;
}

/** V09 looks at min(0.1 T, 2r + 150 M); without an extraction radius r counts as 0. */
const LONGEST_M = 150;
/** Smaller excesses are eccentricity or the fit's own error. */
const LEAST_SHARE = 1e-3;
const LEAST_OVER_BASE = 0.25;

function totalPower({ axis, news }: SampledRadiation): Float64Array {
  const total = new Float64Array(axis.length);
  for (const power of news.map(squared)) for (let i = 0; i < total.length; i++) total[i] = total[i]! + power[i]!;
  return total;
}

/** Straight line through ln F over [from, to], read at any time; null when there is no flux to fit. */
function logLine(axis: Float64Array, flux: Float64Array, from: number, to: number): ((t: number) => number) | null {
  let [n, st, sy, stt, sty] = [0, 0, 0, 0, 0];
  for (let i = 0; i < axis.length; i++) {
    if (axis[i]! < from || axis[i]! > to || !(flux[i]! > 0)) continue;
    const [t, y] = [axis[i]! - from, Math.log(flux[i]!)];
    [n, st, sy, stt, sty] = [n + 1, st + t, sy + y, stt + t * t, sty + t * y];
  }
  const spread = n * stt - st * st;
  if (n < 8 || !(spread > 0)) return null;
  const slope = (n * sty - st * sy) / spread;
  const base = (sy - slope * st) / n;
  return (t) => Math.exp(base + slope * (t - from));
}

/**
 * Looks for start-up radiation: flux in the first part of the record that rises above the smooth
 * growth seen after it (a straight line in ln Ė over the next two windows, carried back).
 * Shape:  null when there is none.
 * Units:  times in M, energies as fractions of M.
 * Error:  the curvature of ln Ė makes the excess wrong by a few per cent of the smooth energy; hence the thresholds.
 * Fails:  null for records too short to fit.
 * Source: domain reference V09; the rule is ours.
 */
export function startBurst(radiation: SampledRadiation): StartBurst | null {
  const { axis } = radiation;
  const first = axis[0]!;
  const length = Math.min(0.1 * (axis[axis.length - 1]! - first), LONGEST_M);
  const flux = totalPower(radiation);
  const smooth = logLine(axis, flux, first + length, first + 3 * length);
  if (smooth === null) return null;
  let [total, base, excess, moment, second] = [0, 0, 0, 0, 0];
  for (let i = 0; i < axis.length; i++) {
    const step = ENERGY_FACTOR * ((axis[Math.min(i + 1, axis.length - 1)]! - axis[Math.max(i - 1, 0)]!) / 2);
    total += step * flux[i]!;
    const t = axis[i]! - first;
    if (t > length) continue;
    const expected = smooth(axis[i]!);
    const above = step * Math.max(0, flux[i]! - expected);
    [base, excess, moment, second] = [base + step * expected, excess + above, moment + above * t, second + above * t * t];
  }
  if (!(excess > LEAST_SHARE * total && excess > LEAST_OVER_BASE * base)) return null;
  const arrival = moment / excess;
  const spread = Math.sqrt(Math.max(0, second / excess - arrival * arrival));
  return { energy: excess, share: excess / total, arrivalM: first + arrival, spreadM: spread, endM: first + length };
}
