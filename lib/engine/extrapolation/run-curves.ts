import type { Tone } from '../tones/tone';

/** Coarsest first. */
export type ThreeTones = readonly [coarsest: Tone, middle: Tone, finest: Tone];

/** Differences of neighbouring runs over time: coarsest less middle, middle less finest. */
type Both = readonly [Float64Array, Float64Array];

export interface RunCurves {
  readonly t: Float64Array;
  /** Adding up to one: a sum with them is a mean over the interval. */
  readonly w: Float64Array;
  readonly phase: Both;
  readonly amplitude: Both;
  /** |H − H′|. */
  readonly complex: Both;
  /** Amplitude of the finest run. */
  readonly finest: Float64Array;
}

export type Curve = 'phase' | 'amplitude' | 'complex';
export const curveNames: readonly Curve[] = ['phase', 'amplitude', 'complex'];

/** The interval ends where the finest run falls below this share of its peak. */
export const SHARE_OF_PEAK = 0.1;

/**
 * Square root of the mean square over the interval.
 * Shape:  one number.
 * Units:  those of the curve.
 * Error:  that of the weights.
 * Fails:  never.
 * Source: definition.
 */
export function rootMeanSquare(w: Float64Array, curve: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < w.length; i++) sum += w[i]! * curve[i]! * curve[i]!;
  return Math.sqrt(Math.max(0, sum));
}

/**
 * Phase or amplitude: whichever differs more between the two coarsest runs, by rms, the amplitude relative to the finest run.
 * Shape:  one of the two.
 * Units:  rad against a ratio.
 * Error:  none of its own.
 * Fails:  never.
 * Source: settings.md section 6 (`dominant`).
 */
export function dominantCurve({ w, phase, amplitude, finest }: RunCurves): 'phase' | 'amplitude' {
  const relative = amplitude[0].map((x, i) => x / finest[i]!);
  return rootMeanSquare(w, phase[0]) >= rootMeanSquare(w, relative) ? 'phase' : 'amplitude';
}
