import { interpolatePair, type UniformGrid } from './local-interpolation';

export interface ComplexSeries {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface PolarSeries {
  readonly amplitude: Float64Array;
  /** Unwrapped, in rad. */
  readonly phase: Float64Array;
}

/**
 * Amplitude and unwrapped phase of a complex series.
 * Shape:  re and im are parallel; so are amplitude and phase.
 * Units:  amplitude as the series, phase in rad.
 * Error:  rounding; turns are counted right where the phase moves by less than half a cycle a sample (see `isFinelySampled`).
 * Fails:  never; where the amplitude is 0 the phase stays as it was.
 * Source: definition; unwrapping as in common practice.
 */
export function polarOf({ re, im }: ComplexSeries): PolarSeries {
  const n = re.length;
  const amplitude = new Float64Array(n);
  const phase = new Float64Array(n);
  let turns = 0;
  let last = 0;
  for (let i = 0; i < n; i++) {
    const a = Math.hypot(re[i]!, im[i]!);
    const p = a > 0 ? Math.atan2(im[i]!, re[i]!) : last;
    if (p - last > Math.PI) turns -= 2 * Math.PI;
    else if (p - last < -Math.PI) turns += 2 * Math.PI;
    last = p;
    amplitude[i] = a;
    phase[i] = p + turns;
  }
  return { amplitude, phase };
}

/** Below this, real and imaginary parts bend too fast for a local polynomial; amplitude and phase do not. */
const FINE_SAMPLES_A_CYCLE = 20;
export const MOST_TURN_SINE_SQUARED = Math.sin((2 * Math.PI) / FINE_SAMPLES_A_CYCLE) ** 2;

/** Samples to look at, and the largest |h|² of the whole series, where another pass has found them. */
export interface Look {
  readonly from: number;
  readonly to: number;
  readonly top: number;
}

function largestPower({ re, im }: ComplexSeries): number {
  let top = 0;
  for (let i = 0; i < re.length; i++) top = Math.max(top, re[i]! * re[i]! + im[i]! * im[i]!);
  return top;
}

/**
 * Does the phase move by less than a twentieth of a cycle from sample to sample, wherever the series is not negligible?
 * Shape:  re and im are parallel; a truth value comes back.
 * Units:  none: only ratios enter.
 * Error:  samples under 1e-3 of the largest modulus are passed over.
 * Fails:  never.
 * Source: our threshold; the angle from cross and dot product of neighbours.
 */
export function isFinelySampled(series: ComplexSeries, look: Look = { from: 1, to: series.re.length, top: largestPower(series) }): boolean {
  const { re, im } = series;
  const least = 1e-6 * look.top;
  for (let i = Math.max(1, look.from); i < look.to; i++) {
    const [a, b, c, d] = [re[i - 1]!, im[i - 1]!, re[i]!, im[i]!];
    const [p, q] = [a * a + b * b, c * c + d * d];
    if (p < least || q < least) continue;
    const cross = a * d - b * c;
    if (a * c + b * d <= 0 || cross * cross > MOST_TURN_SINE_SQUARED * p * q) return false;
  }
  return true;
}

/** Where the amplitude varies more than this within a stencil it may be passing near zero, and the phase jumps. */
const LEAST_RATIO = 0.3;

/**
 * A complex series on a uniform grid, through amplitude and phase where the amplitude stays away from zero, through re and im elsewhere.
 * Shape:  axis, series and polar form are parallel.
 * Units:  those of the inputs.
 * Error:  order as given, in amplitude and phase: about 1e-10 of the peak at 8 samples a cycle of a smooth chirp.
 * Fails:  never.
 * Source: common practice.
 */
export function interpolateThroughPolar(
  axis: Float64Array,
  series: ComplexSeries,
  polar: PolarSeries,
  grid: UniformGrid,
  order: number,
): ComplexSeries {
  const [amplitude, phase] = interpolatePair({ axis, first: polar.amplitude, second: polar.phase }, grid, order);
  const [re, im] = interpolatePair({ axis, first: series.re, second: series.im }, grid, order);
  const half = order >> 1;
  let i = 0;
  for (let k = 0; k < grid.n; k++) {
    const t = grid.t0 + k * grid.dt;
    while (i < axis.length - 2 && axis[i + 1]! <= t) i++;
    if (nearZero(polar.amplitude, i - half + 1, order)) continue;
    re[k] = amplitude[k]! * Math.cos(phase[k]!);
    im[k] = amplitude[k]! * Math.sin(phase[k]!);
  }
  return { re, im };
}

function nearZero(amplitude: Float64Array, from: number, order: number): boolean {
  let low = Infinity;
  let high = 0;
  for (let j = Math.max(0, from); j < Math.min(amplitude.length, from + order); j++) {
    low = Math.min(low, amplitude[j]!);
    high = Math.max(high, amplitude[j]!);
  }
  return low < LEAST_RATIO * high;
}
