import type { Response } from '@/lib/engine/contract/settings';
import type { BinWeights } from './bin-weights';
import type { Spectrum } from './spectrum';

/**
 * The weighted product of two spectra as a function of the shift of b:
 * c(x) = Σ_j plus_j e^{2πi(first+j)x} + Σ_j minus_j e^{−2πi(first+j)x}, x in cycles per bin.
 */
export interface CrossSpectrum {
  readonly first: number;
  readonly n: number;
  readonly plusRe: Float64Array;
  readonly plusIm: Float64Array;
  /** Only with both polarisations at once; else null. */
  readonly minusRe: Float64Array | null;
  readonly minusIm: Float64Array | null;
  readonly normA: number;
  readonly normB: number;
}

export interface Channel {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const real = new WeakMap<Spectrum, Map<string, Channel>>();

const factorsOf = (response: Exclude<Response, 'complex'>): { plus: number; cross: number } =>
  response === 'plus' ? { plus: 1, cross: 0 } : response === 'cross' ? { plus: 0, cross: 1 } : response;

/** F₊h̃₊ + F×h̃× = ½[(F₊ + iF×) Z + (F₊ − iF×) Y]. */
export function realResponse(s: Spectrum, response: Exclude<Response, 'complex'>): Channel {
  const { plus, cross } = factorsOf(response);
  const key = `${plus},${cross}`;
  const known = real.get(s)?.get(key);
  if (known) return known;
  const n = s.zRe.length;
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  const { zRe, zIm, yRe, yIm } = s;
  for (let k = 0; k < n; k++) {
    const a = zRe[k]!;
    const b = zIm[k]!;
    const c = yRe[k]!;
    const d = yIm[k]!;
    re[k] = 0.5 * (plus * (a + c) + cross * (d - b));
    im[k] = 0.5 * (plus * (b + d) + cross * (a - c));
  }
  const made = { re, im };
  const byResponse = real.get(s) ?? new Map<string, Channel>();
  byResponse.set(key, made);
  real.set(s, byResponse);
  return made;
}

/** Real responses have one channel; `complex` has Z, whose shift is e^{+}, and Y, whose shift is e^{−}. */
export function channelsOf(s: Spectrum, response: Response): { readonly plus: Channel; readonly minus: Channel | null } {
  if (response !== 'complex') return { plus: realResponse(s, response), minus: null };
  return { plus: { re: s.zRe, im: s.zIm }, minus: { re: s.yRe, im: s.yIm } };
}

/** A sweep forms one cross spectrum a mass and is done with it before the next: four buffers serve them all. */
const buffers: Float64Array[] = [];
function bufferOf(which: 0 | 1 | 2 | 3, n: number): Float64Array {
  let buffer = buffers[which];
  if (buffer === undefined || buffer.length < n) buffers[which] = buffer = new Float64Array(Math.ceil(1.25 * n));
  return buffer.subarray(0, n);
}

interface Product {
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly aa: number;
  readonly bb: number;
}

/** a b* V, and the two norms, in one pass: the loop that a sweep repeats for every mass. */
function product(a: Channel, b: Channel, weights: BinWeights, conjugated: boolean): Product {
  const { first, values } = weights;
  const n = values.length;
  const re = bufferOf(conjugated ? 2 : 0, n);
  const im = bufferOf(conjugated ? 3 : 1, n);
  const { re: aRe, im: aIm } = a;
  const { re: bRe, im: bIm } = b;
  const sign = conjugated ? -1 : 1;
  let aa = 0;
  let bb = 0;
  for (let j = 0; j < n; j++) {
    const v = values[j]!;
    const k = first + j;
    const ar = aRe[k]!;
    const ai = aIm[k]!;
    const br = bRe[k]!;
    const bi = bIm[k]!;
    aa += v * (ar * ar + ai * ai);
    bb += v * (br * br + bi * bi);
    re[j] = v * (ar * br + ai * bi);
    im[j] = sign * v * (ai * br - ar * bi);
  }
  return { re, im, aa, bb };
}

/**
 * Weighted cross spectrum of two waveforms on common bins.
 * Shape:  both spectra share the bins in Hz; arrays as long as the weights, valid until the next call.
 * Units:  spectra's own amplitude; norms are Σ V|a|² and Σ V|b|² without the factor 4 df.
 * Error:  rounding.
 * Fails:  never.
 * Source: ⟨a|b⟩ = 4 Re ∫ ã b̃* / S df; for both polarisations the two-sided form.
 */
export function crossSpectrum(a: Spectrum, b: Spectrum, response: Response, weights: BinWeights): CrossSpectrum {
  const [ca, cb] = [channelsOf(a, response), channelsOf(b, response)];
  const plus = product(ca.plus, cb.plus, weights, false);
  const base = { first: weights.first, n: weights.values.length, plusRe: plus.re, plusIm: plus.im };
  if (ca.minus === null || cb.minus === null) return { ...base, minusRe: null, minusIm: null, normA: plus.aa, normB: plus.bb };
  // Z(−f) Z_b(−f)* = Y_a* Y_b: the conjugate of Y_a Y_b*.
  const minus = product(ca.minus, cb.minus, weights, true);
  return { ...base, minusRe: minus.re, minusIm: minus.im, normA: plus.aa + minus.aa, normB: plus.bb + minus.bb };
}

/** Σ V |·|² of one channel. */
export function power(channel: Channel, weights: BinWeights): number {
  const { first, values } = weights;
  const { re, im } = channel;
  let sum = 0;
  for (let j = 0; j < values.length; j++) {
    const x = re[first + j]!;
    const y = im[first + j]!;
    sum += values[j]! * (x * x + y * y);
  }
  return sum;
}
