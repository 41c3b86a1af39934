import type { ModeProduct } from './mode-products';

type Series = { readonly re: Float64Array; readonly im: Float64Array };

/** One left factor with all its partners that go to the same rates: rate = Σ over samples of ℜ or ℑ of X_a (Σ_b c_b Y_b)*. */
interface Bundle {
  readonly a: number;
  readonly partners: readonly { readonly b: number; readonly c: number }[];
  /** Places in the list of rates; null where that half of the product is not wanted. */
  readonly toReal: number | null;
  readonly toImaginary: number | null;
}

/** Samples done at a time: the modes of one block stay in the cache. */
const BLOCK = 512;

const sameAs = (p: Bundle, q: Bundle): boolean => p.partners.length === q.partners.length && p.partners.every(({ b, c }, i) => q.partners[i]!.b === b && q.partners[i]!.c === c);

/** Products by their left factor; two rates that take the real and the imaginary half of the same sums share them. */
function bundlesOf(components: readonly (readonly ModeProduct[])[]): Bundle[] {
  const found = new Map<string, Bundle & { readonly partners: { b: number; c: number }[] }>();
  components.forEach((products, place) => {
    for (const { a, b, re, im } of products) {
      for (const [half, c] of [['re', re], ['im', -im]] as const) {
        if (c === 0) continue;
        const key = `${a} ${place} ${half}`;
        const bundle = found.get(key) ?? { a, partners: [], toReal: half === 're' ? place : null, toImaginary: half === 'im' ? place : null };
        bundle.partners.push({ b, c });
        found.set(key, bundle);
      }
    }
  });
  const merged: Bundle[] = [];
  for (const bundle of found.values()) {
    const twin = merged.findIndex((other) => other.a === bundle.a && (bundle.toReal === null ? other.toImaginary : other.toReal) === null && sameAs(other, bundle));
    if (twin < 0) merged.push(bundle);
    else merged[twin] = { ...merged[twin]!, toReal: merged[twin]!.toReal ?? bundle.toReal, toImaginary: merged[twin]!.toImaginary ?? bundle.toImaginary };
  }
  return merged;
}

/** Σ c_b Y_b over one block, in two buffers. */
function addPartners({ partners }: Bundle, right: readonly Series[], from: number, n: number, sumRe: Float64Array, sumIm: Float64Array): void {
  const [p, q, r] = partners;
  if (partners.length > 3 || p === undefined) return addAny(partners, right, from, n, sumRe, sumIm);
  const { re: pr, im: pi } = right[p.b]!;
  const { re: qr, im: qi } = right[(q ?? p).b]!;
  const { re: rr, im: ri } = right[(r ?? p).b]!;
  const [c, d, e] = [p.c, q?.c ?? 0, r?.c ?? 0];
  if (q === undefined) for (let i = 0; i < n; i++) {
    sumRe[i] = c * pr[from + i]!;
    sumIm[i] = c * pi[from + i]!;
  } else if (r === undefined) for (let i = 0; i < n; i++) {
    sumRe[i] = c * pr[from + i]! + d * qr[from + i]!;
    sumIm[i] = c * pi[from + i]! + d * qi[from + i]!;
  } else for (let i = 0; i < n; i++) {
    sumRe[i] = c * pr[from + i]! + d * qr[from + i]! + e * rr[from + i]!;
    sumIm[i] = c * pi[from + i]! + d * qi[from + i]! + e * ri[from + i]!;
  }
}

function addAny(partners: Bundle['partners'], right: readonly Series[], from: number, n: number, sumRe: Float64Array, sumIm: Float64Array): void {
  sumRe.fill(0);
  sumIm.fill(0);
  for (const { b, c } of partners) {
    const { re, im } = right[b]!;
    for (let i = 0; i < n; i++) {
      sumRe[i]! += c * re[from + i]!;
      sumIm[i]! += c * im[from + i]!;
    }
  }
}

function addReal({ re, im }: Series, from: number, n: number, sumRe: Float64Array, sumIm: Float64Array, rate: Float64Array): void {
  for (let i = 0; i < n; i++) rate[from + i]! += re[from + i]! * sumRe[i]! + im[from + i]! * sumIm[i]!;
}

function addImaginary({ re, im }: Series, from: number, n: number, sumRe: Float64Array, sumIm: Float64Array, rate: Float64Array): void {
  for (let i = 0; i < n; i++) rate[from + i]! += im[from + i]! * sumRe[i]! - re[from + i]! * sumIm[i]!;
}

function addBoth({ re, im }: Series, from: number, n: number, sumRe: Float64Array, sumIm: Float64Array, real: Float64Array, imaginary: Float64Array): void {
  for (let i = 0; i < n; i++) {
    const x = re[from + i]!;
    const y = im[from + i]!;
    const u = sumRe[i]!;
    const v = sumIm[i]!;
    real[from + i]! += x * u + y * v;
    imaginary[from + i]! += y * u - x * v;
  }
}

/**
 * Several rates at every sample, in one walk over the modes.
 * Shape:  one list of products a rate; one number a sample of the modes.
 * Units:  those of the coefficients; the modes are dimensionless or r·h/M.
 * Error:  rounding.
 * Fails:  never; a list without products gives zeros.
 * Source: definition of a product; Σ_b c_b X_a Y_b* = X_a (Σ_b c_b* Y_b)*.
 */
export function ratesInBlocks(components: readonly (readonly ModeProduct[])[], left: readonly Series[], right: readonly Series[], samples: number): Float64Array[] {
  const rates = components.map(() => new Float64Array(samples));
  const bundles = bundlesOf(components);
  const [sumRe, sumIm] = [new Float64Array(BLOCK), new Float64Array(BLOCK)];
  for (let from = 0; from < samples; from += BLOCK) {
    const n = Math.min(BLOCK, samples - from);
    for (const bundle of bundles) {
      const { a, toReal, toImaginary } = bundle;
      addPartners(bundle, right, from, n, sumRe, sumIm);
      if (toReal !== null && toImaginary !== null) addBoth(left[a]!, from, n, sumRe, sumIm, rates[toReal]!, rates[toImaginary]!);
      else if (toReal !== null) addReal(left[a]!, from, n, sumRe, sumIm, rates[toReal]!);
      else if (toImaginary !== null) addImaginary(left[a]!, from, n, sumRe, sumIm, rates[toImaginary]!);
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
