import { standardOf } from '../budget/half-width';
import { quadratureWeights } from './local-calculus';
import { weightedSum, type ModeProduct } from './mode-products';
import type { SampledRadiation } from './news-on-samples';
import type { RadiationRecord } from './radiation-record';

/**
 * Standard deviation of a printed number relative to itself: half a unit of its last digit, rectangular.
 * Shape:  one number.
 * Units:  relative.
 * Error:  an upper bound: a mantissa of 9.9 is printed ten times finer than one of 1.
 * Fails:  never.
 * Source: JCGM 100:2008, 4.3.7.
 */
export const relativeSlip = (digits: number): number => standardOf(0.5 * 10 ** (1 - digits));

interface Gradient {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** How the rate answers to each factor: Σ c·Y* for the left one of mode j, its mirror for the right one. */
function gradients(products: readonly ModeProduct[], left: SampledRadiation['news'], right: SampledRadiation['news'], j: number, samples: number): { left: Gradient; right: Gradient } {
  const make = (): Gradient => ({ re: new Float64Array(samples), im: new Float64Array(samples) });
  const [ofLeft, ofRight] = [make(), make()];
  for (const { a, b, re, im } of products) {
    if (a === j) {
      const y = right[b]!;
      for (let i = 0; i < samples; i++) {
        ofLeft.re[i] = ofLeft.re[i]! + re * y.re[i]! + im * y.im[i]!;
        ofLeft.im[i] = ofLeft.im[i]! + im * y.re[i]! - re * y.im[i]!;
      }
    }
    if (b === j) {
      const x = left[a]!;
      for (let i = 0; i < samples; i++) {
        ofRight.re[i] = ofRight.re[i]! + re * x.re[i]! - im * x.im[i]!;
        ofRight.im[i] = ofRight.im[i]! - im * x.re[i]! - re * x.im[i]!;
      }
    }
  }
  return { left: ofLeft, right: ofRight };
}

/** Where nothing was differentiated a slip is a common relative error, which bounds the whole from above. */
function commonSlip(products: readonly ModeProduct[], { news, strain }: SampledRadiation, weights: Float64Array, relative: number): number {
  let bound = 0;
  for (const { a, b, re, im } of products) {
    const [x, y] = [(strain ?? news)[a]!, news[b]!];
    const sizes = x.re.map((_, i) => Math.hypot(x.re[i]!, x.im[i]!) * Math.hypot(y.re[i]!, y.im[i]!));
    bound += Math.hypot(re, im) * Math.abs(weightedSum(weights, sizes));
  }
  return 2 * relative * bound;
}

/**
 * What the rounding of the input does to the integral of a rate. Samples are each off by up to half a
 * unit of their last printed digit; differences carry that into Ḣ with the stencil's own gain,
 * independently from sample to sample.
 * Shape:  one number; digits null for binary doubles.
 * Units:  those of the integral (standard uncertainty).
 * Error:  an estimate on the large side.
 * Fails:  never; zero where nothing was printed.
 * Source: JCGM 100:2008, propagation of independent inputs.
 */
export function roundingOfIntegral(products: readonly ModeProduct[], record: RadiationRecord, radiation: SampledRadiation, startM: number, digits: number | null): number {
  if (digits === null) return 0;
  const relative = relativeSlip(digits);
  const { axis, isEven, news, strain, noiseGain } = radiation;
  const weights = quadratureWeights(axis, startM, 8, isEven);
  if (noiseGain === null) return commonSlip(products, radiation, weights, relative);
  let [variance, bias] = [0, 0];
  record.modes.forEach(({ re, im }, j) => {
    const own = products.filter(({ a, b }) => a === j || b === j);
    if (own.length === 0) return;
    const gradient = gradients(own, strain ?? news, news, j, axis.length);
    const self = strain === null ? own.filter(({ a, b }) => a === b).reduce((sum, product) => sum + Math.abs(product.re), 0) : 0;
    for (let i = 0; i < weights.length; i++) {
      const slip = relative * Math.hypot(re[i]!, im[i]!);
      const slope = slip * noiseGain[i]!;
      const [l, r] = [gradient.left, gradient.right];
      const w = weights[i]!;
      // In H·Ḣ* a central difference leaves its own sample out, so the two slips are independent.
      const both = strain === null ? slope * slope * ((l.re[i]! + r.re[i]!) ** 2 + (l.im[i]! + r.im[i]!) ** 2) : slip * slip * (l.re[i]! ** 2 + l.im[i]! ** 2) + slope * slope * (r.re[i]! ** 2 + r.im[i]! ** 2);
      variance += w * w * both;
      bias += 2 * Math.abs(w) * self * slope * slope;
    }
  });
  return Math.sqrt(variance) + bias;
}
