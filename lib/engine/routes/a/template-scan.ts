import type { Side } from '@/lib/engine/contract/route';
import type { CrossSpectrum } from './cross-spectrum';
import { findLag } from './lag-search';
import { massSlice, type MassSlice } from './mass-slice';
import { matchBounds, type MatchBounds } from './pair-bound';
import type { PackedSide } from './packed-side';
import { promising } from './promising-masses';
import { signalSource, type SignalSource } from './signal-source';
import type { BankRequest, PackedBank, TemplateBank } from './template-bank';

/** Matches of one signal with every template at every factor: rough ones, and sharp ones where asked. */
export interface TemplateScan {
  /** [template][factor], flattened, low by 3e-4 at most; 0 where no match beside the factor can be the best. */
  readonly rough: Float32Array;
  /** The match at any factor, its lag refined, on the sharp bins. */
  readonly sharp: (template: number, massFactor: number) => number;
  /** Some of the places that stay would not if far lags were told apart. */
  readonly unsettled: boolean;
}

/** Numbers of one signal that are kept at several masses: 32 MB. */
const MOST_KEPT = 1 << 22;

const LOOKS_A_STEP = 256;

function normOf({ first: lowest, values }: MassSlice['weights'], { first, re, im }: PackedSide): number {
  const from = Math.max(first, lowest);
  const to = Math.min(first + re.length, lowest + values.length);
  let sum = 0;
  for (let k = from; k < to; k++) sum += values[k - lowest]! * (re[k - first]! ** 2 + im[k - first]! ** 2);
  return sum;
}

interface Buffers {
  re: Float64Array;
  im: Float64Array;
}

/** The product of a weighted signal with a template, in buffers that the next one overwrites. */
function productOf(a: MassSlice, b: PackedSide, buffers: Buffers): CrossSpectrum {
  const from = Math.max(a.first, b.first);
  const n = Math.max(0, Math.min(a.first + a.re.length, b.first + b.re.length) - from);
  if (buffers.re.length < n) [buffers.re, buffers.im] = [new Float64Array(2 * n), new Float64Array(2 * n)];
  const re = buffers.re.subarray(0, n);
  const im = buffers.im.subarray(0, n);
  const { re: ar, im: ai } = a;
  const { re: br, im: bi } = b;
  const [i0, j0] = [from - a.first, from - b.first];
  for (let k = 0; k < n; k++) {
    const p = ar[i0 + k]!;
    const q = ai[i0 + k]!;
    const r = br[j0 + k]!;
    const s = bi[j0 + k]!;
    re[k] = p * r + q * s;
    im[k] = q * r - p * s;
  }
  return { first: from, n, plusRe: re, plusIm: im, minusRe: null, minusIm: null, normA: a.norm, normB: normOf(a.weights, b) };
}

/** A signal ready for any bank: its bins are read off one spectrum. */
export const sourceOf = (bank: PackedBank, a: Side, { request, store, numerics }: Omit<BankRequest, 'signals' | 'factors'>): SignalSource =>
  signalSource(a, widthIn(bank, a, 1), { response: request.response, store, numerics });

const widthIn = (bank: PackedBank, a: Side, factor: number): number => Number((bank.dfHz(factor) * a.secondsPerUnit).toPrecision(14));

/**
 * One signal's slices, those last asked for kept.
 * Shape:  a slice for any factor, on the bins of a bank.
 * Units:  as `massSlice`.
 * Error:  as `massSlice`.
 * Fails:  never.
 * Source: ours.
 */
export function slicer(bank: PackedBank, a: Side, source: SignalSource): (factor: number) => MassSlice {
  const kept = new Map<number, MassSlice>();
  let numbers = 0;
  return (factor) => {
    const known = kept.get(factor);
    if (known) return known;
    const made = massSlice(source, widthIn(bank, a, factor), bank.weightsAt(factor));
    if ((numbers += 2 * made.re.length) > MOST_KEPT) {
      kept.clear();
      numbers = 2 * made.re.length;
    }
    kept.set(factor, made);
    return made;
  };
}

export interface ScanRequest {
  /** Look at every template at every factor, whatever the bounds say. */
  readonly everywhere?: boolean;
  /** Called every so many looks. */
  readonly onStep?: () => void;
}

/**
 * Looks at one signal with every template, at the factors on its mass where the best match could lie.
 * Shape:  a bank for the looks and a sharp one, both made for this signal among others.
 * Units:  dimensionless.
 * Error:  rough: 3e-4 at most; sharp: 2e-5, the bins' own. What is left out is bounded, not guessed.
 * Fails:  never; sides without power in the band give 0.
 * Source: engine design: a mass only stretches the frequencies; `promising` for what is left out.
 */
export function scanTemplates(bank: TemplateBank, sharpest: PackedBank, a: Side, source: SignalSource, factors: readonly number[], { everywhere = false, onStep }: ScanRequest = {}): TemplateScan {
  const [sliceAt, sharpSlice] = [slicer(bank, a, source), slicer(sharpest, a, source)];
  const buffers: Buffers = { re: new Float64Array(0), im: new Float64Array(0) };
  const unsettled = new Set<number>();
  let looks = 0;
  const look = (t: number, g: number): MatchBounds => {
    if (++looks % LOOKS_A_STEP === 0) onStep?.();
    const found = matchBounds(sliceAt(factors[g]!), bank.template(t));
    if (found.byFarLags) unsettled.add(t * factors.length + g);
    return found;
  };
  const rough = promising(bank.paths, look, everywhere);
  const sharp = (t: number, factor: number): number => {
    const product = productOf(sharpSlice(factor), sharpest.template(t), buffers);
    return product.normA > 0 && product.normB > 0 ? findLag(product, 'modulus', 1).value / Math.sqrt(product.normA * product.normB) : 0;
  };
  return { rough, sharp, unsettled: [...unsettled].some((place) => rough[place]! > 0) };
}
