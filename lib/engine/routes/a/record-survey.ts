import { isFinelySampled, MOST_TURN_SINE_SQUARED, type ComplexSeries } from '@/lib/engine/series/polar';

/** What one pass over a record's samples tells. */
export interface RecordSurvey {
  /** Largest |dh/dt| over 2π times the peak: about the frequency where the signal is strongest, in cycles per unit of the axis. */
  readonly fastest: number;
  readonly isFine: () => boolean;
}

/** A step shorter than this share of the modulus cannot turn the phase by more than a fine record may. */
const SURELY_FINE = 0.9 * MOST_TURN_SINE_SQUARED;
/** Rounding of a quotient that is only formed when it can be the largest. */
const ROUNDING = 1 - 1e-12;

/**
 * Surveys a complex series in one pass: a million samples are read once, not four times.
 * Shape:  axis, re and im are parallel.
 * Units:  the axis's own.
 * Error:  none: samples that the pass cannot be sure of are looked at again by the definition itself.
 * Fails:  never; zero series have fastest 0.
 * Source: |Δh| ≥ |h| sin of the angle between neighbours.
 */
export function surveyRecord(axis: Float64Array, { re, im }: ComplexSeries): RecordSurvey {
  const n = axis.length;
  let t = axis[0]!;
  let a = re[0]!;
  let b = im[0]!;
  let top = a * a + b * b;
  let rateTop = 0;
  let from = n;
  let to = 0;
  for (let i = 1; i < n; i++) {
    const s = axis[i]!;
    const c = re[i]!;
    const d = im[i]!;
    const dt = s - t;
    const moved = (c - a) * (c - a) + (d - b) * (d - b);
    const size = c * c + d * d;
    if (moved > rateTop * dt * dt * ROUNDING) rateTop = Math.max(rateTop, moved / (dt * dt));
    if (size > top) top = size;
    if (moved > SURELY_FINE * size) {
      if (from === n) from = i;
      to = i + 1;
    }
    t = s;
    a = c;
    b = d;
  }
  // A copy: accumulators that a closure holds would be boxed at every sample.
  const doubtful = { from, to, top };
  return {
    fastest: top > 0 ? Math.sqrt(rateTop / top) / (2 * Math.PI) : 0,
    isFine: () => doubtful.from >= doubtful.to || isFinelySampled({ re, im }, doubtful),
  };
}

/** The same rate of a real series, whose phase nobody asks for. */
export function fastestOfReal(axis: Float64Array, x: Float64Array): number {
  let top = x[0]! * x[0]!;
  let rateTop = 0;
  for (let i = 1; i < axis.length; i++) {
    const dt = axis[i]! - axis[i - 1]!;
    const dx = x[i]! - x[i - 1]!;
    if (dx * dx > rateTop * dt * dt * ROUNDING) rateTop = Math.max(rateTop, (dx * dx) / (dt * dt));
    if (x[i]! * x[i]! > top) top = x[i]! * x[i]!;
  }
  return top > 0 ? Math.sqrt(rateTop / top) / (2 * Math.PI) : 0;
}
