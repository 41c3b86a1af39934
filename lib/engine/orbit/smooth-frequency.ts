import { derivativesAtSamples, quadratureWeights } from '../radiation/local-calculus';
import { interpolatePair } from '../series/local-interpolation';
import { stretchOf, type Tone } from '../tones/tone';
import { frequencyBySplines, panelsOver, splinesOver } from './phase-advance';
import type { Stretch } from './orbit-point';

/** The smooth part of a frequency is a polynomial of this degree. */
const DEGREE = 5;

/** A frequency and its smooth part over a stretch, with the weights of an integral over it. */
export interface SmoothedFrequency {
  readonly t: Float64Array;
  readonly w: Float64Array;
  readonly omega: Float64Array;
  readonly fit: Float64Array;
  /** ω at the beginning of the stretch. */
  readonly atStart: number;
}

/** Legendre polynomials up to the degree at u in [−1, 1]. */
function legendre(u: number): number[] {
  const p = [1, u];
  for (let k = 2; k <= DEGREE; k++) p.push(((2 * k - 1) * u * p[k - 1]! - (k - 1) * p[k - 2]!) / k);
  return p;
}

export interface SampleRule {
  readonly stencil: 9 | 13;
  readonly order: 6 | 8;
}
export const houseRule: SampleRule = { stencil: 13, order: 8 };
const MARGIN = 16;

/**
 * Route A: ω by differences at the samples, its least-squares polynomial in continuous time by projection
 * on Legendre polynomials.
 * Shape:  samples of the stretch and the next one beyond either edge.
 * Units:  times in M; rad/M, > 0 where the mode turns as the house has it or the other way.
 * Error:  of the stencil and of the end weights.
 * Fails:  not finite where the series vanishes.
 * Source: Q29; settings.md section 5 (`eccentricity`).
 */
export function smoothedOnSamples(whole: Tone, { from, to }: Stretch, { stencil, order }: SampleRule = houseRule): SmoothedFrequency & { readonly noiseGain: Float64Array } {
  const near = stretchOf(whole, from, to, MARGIN);
  const { slopes, noiseGain: gain } = derivativesAtSamples(near.axis, [near.re, near.im], stencil, near.isEven);
  const [dre, dim] = slopes as [Float64Array, Float64Array];
  // The sums take no sample further out than the next: there the polynomial runs away.
  const first = Math.max(0, near.axis.findIndex((t) => t > from) - 1);
  const last = near.axis.findLastIndex((t) => t < to) + 2;
  const cut = (values: Float64Array): Float64Array => values.subarray(first, last);
  const turning = cut(near.axis.map((_, i) => (near.im[i]! * dre[i]! - near.re[i]! * dim[i]!) / (near.re[i]! ** 2 + near.im[i]! ** 2)));
  const [axis, noiseGain] = [cut(near.axis), cut(gain)];
  const after = quadratureWeights(axis, to, order, near.isEven);
  const w = quadratureWeights(axis, from, order, near.isEven).map((x, i) => x - after[i]!);
  const sense = Math.sign(turning.reduce((sum, x, i) => sum + w[i]! * x, 0));
  const omega = turning.map((x) => sense * x);
  const half = (to - from) / 2;
  const basis = Array.from(axis, (t) => legendre((t - from) / half - 1));
  const shares = Array.from({ length: DEGREE + 1 }, (_, k) => ((2 * k + 1) / (2 * half)) * omega.reduce((sum, x, i) => (w[i] === 0 ? sum : sum + w[i]! * x * basis[i]![k]!), 0));
  const fit = axis.map((_, i) => shares.reduce((sum, c, k) => sum + c * basis[i]![k]!, 0));
  const atStart = interpolatePair({ axis, first: omega, second: noiseGain }, { t0: from, dt: 1, n: 1 }, 8)[0][0]!;
  return { t: axis, w, omega, fit, atStart, noiseGain };
}

/**
 * Route B: ω = −ℑ(Ḣ/H) of splines on Gauss panels, its polynomial by orthogonalising the powers of time there.
 * Shape:  one value a node.
 * Units:  as route A.
 * Error:  of the spline's derivative.
 * Fails:  as route A.
 * Source: as route A; modified Gram–Schmidt (common practice).
 */
export function smoothedOnPanels(whole: Tone, stretch: Stretch): SmoothedFrequency {
  const { tone, splines } = splinesOver(whole, stretch);
  const { t, w } = panelsOver(tone, stretch);
  const turning = frequencyBySplines(splines, t);
  const sense = Math.sign(turning.reduce((sum, x, i) => sum + w[i]! * x, 0));
  const omega = turning.map((x) => sense * x);
  const middle = (stretch.from + stretch.to) / 2;
  const along = (p: Float64Array, q: Float64Array): number => p.reduce((sum, x, i) => sum + w[i]! * x * q[i]!, 0);
  const done: Float64Array[] = [];
  const left = omega.slice();
  for (let k = 0; k <= DEGREE; k++) {
    const power = t.map((x) => ((x - middle) / (stretch.to - middle)) ** k);
    for (const p of done) {
      const share = along(power, p);
      power.forEach((x, i) => (power[i] = x - share * p[i]!));
    }
    const size = Math.sqrt(along(power, power));
    const unit = power.map((x) => x / size);
    const share = along(left, unit);
    left.forEach((x, i) => (left[i] = x - share * unit[i]!));
    done.push(unit);
  }
  const atStart = sense * frequencyBySplines(splines, Float64Array.of(stretch.from))[0]!;
  return { t, w, omega, fit: omega.map((x, i) => x - left[i]!), atStart };
}

/**
 * √2·rms[(ω − ω_fit)/(2ω_fit)] over the stretch.
 * Shape:  one number.
 * Units:  dimensionless.
 * Error:  of its inputs.
 * Fails:  NaN where the smooth part is not positive.
 * Source: settings.md section 5.
 */
export function eccentricityOf({ w, omega, fit }: SmoothedFrequency): number {
  let [sum, length] = [0, 0];
  for (let i = 0; i < w.length; i++) {
    if (w[i] === 0) continue;
    if (!(fit[i]! > 0)) return Number.NaN;
    sum += w[i]! * ((omega[i]! - fit[i]!) / (2 * fit[i]!)) ** 2;
    length += w[i]!;
  }
  return Math.sqrt((2 * sum) / length);
}
