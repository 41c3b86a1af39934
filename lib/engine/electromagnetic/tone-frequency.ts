import { derivativesAtSamples } from '../radiation/local-calculus';
import { derivativeOf, evaluateSplines, fitSpline, splineBasis } from '../routes/b/banded-spline';
import { interpolatePair } from '../series/local-interpolation';
import { polarOf } from '../series/polar';
import { stretchOf, type Tone } from '../tones/tone';

/** Samples kept on either side of the time that is asked for. */
const MARGIN = 40;

/** How a slope is taken: points of the difference and of the interpolation. */
export interface SlopeNumerics {
  readonly stencil: 7 | 9;
  readonly interpolation: 6 | 8;
}

/**
 * Route A: frequency of a tone at a time, from the unwrapped phase of its samples.
 * Shape:  one number, negative for the other sense of rotation, with what a relative slip of each sample does to it.
 * Units:  M and rad/M.
 * Error:  order 8 in the step.
 * Fails:  not finite where the series vanishes.
 * Source: definition, ω = −d arg H/dt.
 */
export function frequencyOnSamples(whole: Tone, t: number, { stencil, interpolation }: SlopeNumerics = { stencil: 9, interpolation: 8 }): { readonly omega: number; readonly gain: number } {
  const tone = stretchOf(whole, t, t, MARGIN);
  const { phase } = polarOf(tone);
  const { slopes, noiseGain } = derivativesAtSamples(tone.axis, [phase], stencil);
  const [slope] = interpolatePair({ axis: tone.axis, first: slopes[0]!, second: phase }, { t0: t, dt: 1, n: 1 }, interpolation);
  return { omega: -slope[0]!, gain: noiseGain[noiseGain.length >> 1]! };
}

/**
 * Route B: the same from splines of the real and imaginary part, −Im(Ḣ/H); no phase is unwrapped.
 * Shape:  one number.
 * Units:  M and rad/M.
 * Error:  order 6 in the step.
 * Fails:  not finite where the series vanishes.
 * Source: definition.
 */
export function frequencyOnSplines(whole: Tone, t: number): number {
  const tone = stretchOf(whole, t, t, MARGIN);
  const basis = splineBasis(tone.axis);
  const values = [fitSpline(basis, tone.re), fitSpline(basis, tone.im)];
  const at = Float64Array.of(t);
  const [re, im] = evaluateSplines(values, at).map((v) => v[0]!) as [number, number];
  const [dre, dim] = evaluateSplines(values.map(derivativeOf), at).map((v) => v[0]!) as [number, number];
  return -(re * dim - im * dre) / (re * re + im * im);
}

/** Below this share of the peak a phase is noise. */
const AUDIBLE = 1e-3;

/**
 * The frequency at every sample that can be heard.
 * Shape:  parallel to the tone's axis; null elsewhere.
 * Units:  rad/M.
 * Error:  for eyes alone.
 * Fails:  never.
 * Source: definition.
 */
export function frequencyTrack(tone: Tone): (number | null)[] {
  const { amplitude, phase } = polarOf(tone);
  const top = amplitude.reduce((a, b) => Math.max(a, b), 0);
  const { slopes } = derivativesAtSamples(tone.axis, [phase], 9, tone.isEven);
  return Array.from(amplitude, (a, i) => (a > AUDIBLE * top ? Math.abs(slopes[0]![i]!) : null));
}
