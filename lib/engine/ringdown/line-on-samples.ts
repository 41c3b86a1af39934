import { quadratureWeights } from '../radiation/local-calculus';
import { polarOf } from '../series/polar';
import { stretchOf, type Tone } from '../tones/tone';

/** What a mode does in the window: H ≈ A e^{−(iω+γ)(t − centre)}. */
export interface RingdownLine {
  /** rad/M; its sign is the sense of rotation (house rotation > 0). */
  readonly omega: number;
  /** 1/M, > 0 when the mode decays. */
  readonly gamma: number;
}

/** Samples beyond the window that its end weights may use. */
const MARGIN = 8;

export interface WindowSamples {
  readonly tone: Tone;
  readonly weights: Float64Array;
  /** Times counted from the middle of the window. */
  readonly times: Float64Array;
  readonly length: number;
}

/** Samples of the window with the weights of an integral between its exact edges. */
export function windowSamples(whole: Tone, from: number, to: number, order: 4 | 6 | 8): WindowSamples {
  const tone = stretchOf(whole, from, to, MARGIN);
  const after = quadratureWeights(tone.axis, to, order, tone.isEven);
  const weights = quadratureWeights(tone.axis, from, order, tone.isEven).map((w, i) => w - after[i]!);
  return { tone, weights, times: tone.axis.map((t) => t - (from + to) / 2), length: to - from };
}

/**
 * Route A: straight lines through the unwrapped phase and ln|H| over the window, every moment of it
 * counting alike (least squares in continuous time).
 * Shape:  two slopes.
 * Units:  times in M; rad/M and 1/M.
 * Error:  quadrature of the stated order in the step.
 * Fails:  slopes are not finite where the series vanishes within the window.
 * Source: Q18; settings.md section 5 (ringdown).
 */
export function lineOnSamples(whole: Tone, from: number, to: number, order: 4 | 6 | 8 = 8): RingdownLine {
  const { tone, weights, times, length } = windowSamples(whole, from, to, order);
  const { amplitude, phase } = polarOf(tone);
  const slopeOf = (valueAt: (i: number) => number): number => {
    const middle = valueAt(times.length >> 1);
    let sum = 0;
    for (let i = 0; i < times.length; i++) if (weights[i] !== 0) sum += weights[i]! * times[i]! * (valueAt(i) - middle);
    return sum / (length ** 3 / 12);
  };
  return { omega: -slopeOf((i) => phase[i]!), gamma: -slopeOf((i) => Math.log(amplitude[i]!)) };
}

/** Standard deviation of either slope for samples that are each off by a relative `slip`. */
export function slopeScatter(whole: Tone, from: number, to: number, slip: number): number {
  const { weights, times, length } = windowSamples(whole, from, to, 8);
  let sum = 0;
  for (let i = 0; i < times.length; i++) sum += (weights[i]! * times[i]!) ** 2;
  return (slip * Math.sqrt(sum)) / (length ** 3 / 12);
}
