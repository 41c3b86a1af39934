import { passesOf, type Pass } from './flux-passes';
import type { ModeProduct } from './mode-products';

type Series = { readonly re: Float64Array; readonly im: Float64Array };

/** Samples done at a time: the modes of one block stay in the cache. */
const BLOCK = 512;

/** Three partners for two rates. */
function addBoth({ re, im }: Series, { partners: [p, q, r], real, imaginary }: Pass, right: readonly Series[], from: number, to: number, toReal: Float64Array, toImaginary: Float64Array): void {
  const { re: pr, im: pi } = right[p]!;
  const { re: qr, im: qi } = right[q]!;
  const { re: rr, im: ri } = right[r]!;
  const [a, b, c] = [real[0]!, real[1]!, real[2]!];
  const [d, e, f] = [imaginary[0]!, imaginary[1]!, imaginary[2]!];
  for (let i = from; i < to; i++) {
    const x = re[i]!;
    const y = im[i]!;
    const p1 = pr[i]!;
    const p2 = pi[i]!;
    const q1 = qr[i]!;
    const q2 = qi[i]!;
    const r1 = rr[i]!;
    const r2 = ri[i]!;
    toReal[i]! += x * (a * p1 + b * q1 + c * r1) + y * (a * p2 + b * q2 + c * r2);
    toImaginary[i]! += y * (d * p1 + e * q1 + f * r1) - x * (d * p2 + e * q2 + f * r2);
  }
}

/** Two partners for one rate: x·(a p₁ + b q₁) ± y·(a p₂ + b q₂), where ℑ X Y* = ℜ (−iX) Y*. */
function addOne(x: Float64Array, y: Float64Array, p: Series, q: Series, taken: Float64Array, sign: 1 | -1, from: number, to: number, rate: Float64Array): void {
  const { re: pr, im: pi } = p;
  const { re: qr, im: qi } = q;
  const [a, b] = [taken[0]!, taken[1]!];
  const [c, d] = [sign * a, sign * b];
  for (let i = from; i < to; i++) rate[i]! += x[i]! * (a * pr[i]! + b * qr[i]!) + y[i]! * (c * pi[i]! + d * qi[i]!);
}

/**
 * Several rates at every sample, in one walk over the modes.
 * Shape:  one list of products a rate; one number a sample of the modes.
 * Units:  those of the coefficients; the modes are dimensionless or r·h/M.
 * Error:  rounding.
 * Fails:  never; a list without products gives zeros.
 * Source: definition of a product.
 */
export function ratesInBlocks(components: readonly (readonly ModeProduct[])[], left: readonly Series[], right: readonly Series[], samples: number): Float64Array[] {
  const rates = components.map(() => new Float64Array(samples));
  const passes = passesOf(components, left === right);
  for (let from = 0; from < samples; from += BLOCK) {
    const to = Math.min(samples, from + BLOCK);
    for (const pass of passes) {
      const { toReal, toImaginary } = pass;
      const { re, im } = left[pass.a]!;
      const [p, q] = [right[pass.partners[0]]!, right[pass.partners[1]]!];
      if (toReal !== null && toImaginary !== null) addBoth(left[pass.a]!, pass, right, from, to, rates[toReal]!, rates[toImaginary]!);
      else if (toReal !== null) addOne(re, im, p, q, pass.real, 1, from, to, rates[toReal]!);
      else if (toImaginary !== null) addOne(im, re, p, q, pass.imaginary, -1, from, to, rates[toImaginary]!);
    }
  }
  return rates;
}

/**
 * Σ |X|² over modes at every sample, times a factor.
 * Shape:  one number a sample.
 * Units:  those of the modes, squared.
 * Error:  rounding.
 * Fails:  never.
 * Source: definition.
 */
export function powerInBlocks(modes: readonly Series[], factor: number, samples: number): Float64Array {
  const sum = new Float64Array(samples);
  for (let from = 0; from < samples; from += BLOCK) {
    const to = Math.min(samples, from + BLOCK);
    for (const { re, im } of modes) for (let i = from; i < to; i++) sum[i]! += factor * (re[i]! * re[i]! + im[i]! * im[i]!);
  }
  return sum;
}
