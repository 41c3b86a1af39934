import { powerOfTwoFrom, transformOfSize } from '@/lib/engine/fourier/transform';
import type { MassSlice } from './mass-slice';
import { newtonStep, pairProduct, type PairProduct } from './pair-product';
import type { PackedSide } from './packed-side';

/** Between what a pair's match at one mass lies, over all shifts and phases. */
export interface MatchBounds {
  readonly least: number;
  readonly most: number;
  /** `most` is what lags that the bins do not tell apart could hide. */
  readonly byFarLags?: boolean;
}

/** Lags for each bin by which the power spreads: between them the modulus rises by a third of its most. */
const LAGS_PER_SPREAD = 4;
const LEAST_LAGS = 64;
/** A Newton step shorter than this share of a lag leaves less than 1e-6 of the value. */
const CLOSE = 0.015;
const MOST_STEPS = 4;
/** A summit may stand so little below the lag it is sought from: the promise of a last step errs by as much. */
const SETTLED = 1 - 1e-6;
const ROOM = 2e-5;
/** Of a look that far lags leave open: it is not taken for one that holds nothing. */
const LEAST = 1e-9;

interface Scratch {
  readonly data: Float64Array;
  readonly out: Float64Array;
  readonly heights: Float64Array;
}
const scratches = new Map<number, Scratch>();
function scratchOf(size: number): Scratch {
  const known = scratches.get(size);
  if (known) return known;
  const made = { data: new Float64Array(2 * size), out: new Float64Array(2 * size), heights: new Float64Array(size) };
  if (scratches.size >= 4) scratches.clear();
  scratches.set(size, made);
  return made;
}

/** Σ V|b|² of bins outside the core, and Σ |V| |b|²: end weights change their sign. */
const rim = { signed: 0, sized: 0 };
function addRim(weights: Float64Array, { re, im }: PackedSide, shift: number, from: number, to: number): void {
  let signed = 0;
  let sized = 0;
  for (let i = from; i < to; i++) {
    const x = re[i - shift]!;
    const y = im[i - shift]!;
    const v = weights[i]! * (x * x + y * y);
    signed += v;
    sized += Math.abs(v);
  }
  rim.signed += signed;
  rim.sized += sized;
}

/** Bins a whole turn apart at every lag add up. */
function folded({ values, n }: PairProduct, size: number, data: Float64Array): Float64Array {
  if (n <= size) return values;
  for (let i = 0; i < 2 * size; i++) data[i] = values[i]!;
  for (let from = 2 * size; from < 2 * n; from += 2 * size) {
    const to = Math.min(2 * n, from + 2 * size);
    for (let i = from; i < to; i++) data[i - from]! += values[i]!;
  }
  return data;
}

/** |c|² at `size` lags, which may be fewer than the bins, and the place of the highest. */
function atLags(product: PairProduct, size: number): { readonly heights: Float64Array; readonly at: number } {
  const { data, out, heights } = scratchOf(size);
  transformOfSize(size).forward(out, folded(product, size, data));
  let at = 0;
  let most = -1;
  for (let i = 0; i < size; i++) {
    const x = out[2 * i]!;
    const y = out[2 * i + 1]!;
    const height = x * x + y * y;
    heights[i] = height;
    if (height > most) {
      most = height;
      at = i;
    }
  }
  return { heights, at };
}

/** Where a bell through three neighbours is highest, from the middle one: spectra of one hump make such hills. */
function summitBeside(before: number, most: number, after: number): number {
  const [low, high] = [Math.log(before / most), Math.log(after / most)];
  const bend = low + high;
  return bend < 0 && Number.isFinite(bend) ? Math.max(-0.5, Math.min(0.5, (low - high) / (2 * bend))) : 0;
}

/** The top of the hill beside the highest lag, of |c|²; NaN where the steps do not settle on one. */
function climbed(product: PairProduct, heights: Float64Array, at: number): number {
  const size = heights.length;
  let lag = (at + summitBeside(heights[at > 0 ? at - 1 : size - 1]!, heights[at]!, heights[at + 1 < size ? at + 1 : 0]!)) / size;
  for (let round = 0; round < MOST_STEPS; round++) {
    const { height, step } = newtonStep(product, lag);
    const lags = Math.abs(step) * size;
    if (lags < CLOSE) return height;
    if (!(lags < 1)) break;
    lag += step;
  }
  return Number.NaN;
}

/** The highest lag not beside place `at` that is higher than `least`; 0 where there is none. */
function otherAbove(heights: Float64Array, at: number, least: number): number {
  const size = heights.length;
  let other = least;
  for (let i = 0; i < size; i++) {
    if (heights[i]! > other && Math.min((i - at + size) % size, (at - i + size) % size) > 1) other = heights[i]!;
  }
  return other > least ? other : 0;
}

interface Tops {
  readonly top: number;
  readonly highest: number;
  /** How high |c| is at lags that are taken for others, at most; 0 where there are none. */
  readonly far: number;
}

/** The top of the highest hill, and how high |c| may be at any lag. */
function topsOf(product: PairProduct, size: number, unseen: number, zone: LagZone | null): Tops {
  const { heights, at } = atLags(product, size);
  const most = Math.sqrt(heights[at]!);
  const far = zone === null ? 0 : Math.sqrt(highestIn(heights, zone)) + unseen;
  const summit = Math.sqrt(climbed(product, heights, at));
  if (!(summit > most * SETTLED)) return { top: most, highest: most + unseen, far };
  const top = Math.max(summit, most);
  // A lag that is not beside the highest one counts where it could hide more.
  const other = otherAbove(heights, at, Math.max(0, top - unseen) ** 2);
  return { top, highest: other === 0 ? top : Math.max(top, Math.sqrt(other) + unseen), far };
}

/** Lags from `from` to `to`, which stand also for those a period above; a period is 1. */
interface LagZone {
  readonly from: number;
  readonly to: number;
}

/** Records that meet at lags more than a period apart meet there with their ends alone, and both lags add up. */
function farZone(slice: MassSlice, template: PackedSide): LagZone | null {
  const [from, to] = [slice.from - template.to, slice.to - template.from - 1];
  return to > from ? { from, to } : null;
}

function highestIn(heights: Float64Array, { from, to }: LagZone): number {
  const size = heights.length;
  let most = 0;
  for (let lag = Math.floor(from * size) - 1; lag <= to * size + 1; lag++) most = Math.max(most, heights[((lag % size) + size) % size]!);
  return most;
}

/**
 * Bounds of the match of a signal with a template at one mass.
 * Shape:  one slice of the signal, one template on the same bins.
 * Units:  dimensionless.
 * Error:  between the lags of the transform the modulus rises by ½ (δω)² Σ (ω − ω₀)² |c| at most, and that sum by no more than
 *         Cauchy and Schwarz allow; bins outside the core likewise. The highest hill is climbed, so that the bounds mostly lie some 1e-4 apart. Of two lags that add up to h one may hold (1 + h)/2:
 *         the ends that meet at the one and those that meet at the other share each side's power.
 * Fails:  never; a side without power gives 0.
 * Source: Taylor's remainder about the maximum; our assembly.
 */
export function matchBounds(slice: MassSlice, template: PackedSide): MatchBounds {
  const { first, values } = slice.weights;
  const low = Math.max(first, template.first);
  const high = Math.min(first + values.length, template.first + template.re.length);
  const from = Math.min(Math.max(slice.coreFrom, low), high);
  const n = Math.max(0, Math.min(slice.coreTo, high) - from);
  const mostLags = powerOfTwoFrom(2 * n);
  const product = pairProduct(slice, template, from, n, mostLags);
  const shift = template.first - first;
  rim.signed = 0;
  rim.sized = 0;
  addRim(values, template, shift, low - first, from - first);
  addRim(values, template, shift, from + n - first, high - first);
  const norm = product.inside + rim.signed;
  const norms = Math.sqrt(slice.norm * norm);
  if (!(norms > 0)) return { least: 0, most: 0 };
  const rest = Math.sqrt(slice.outside * rim.sized) / norms + ROOM;
  if (n === 0) return { least: 0, most: Math.min(1, rest) };
  const width = Math.sqrt(Math.max(slice.spread / slice.norm, product.spread / norm));
  const size = Math.min(mostLags, powerOfTwoFrom(Math.max(LEAST_LAGS, LAGS_PER_SPREAD * width)));
  const half = Math.PI / size;
  const unseen = (half * half * Math.sqrt(slice.spread * product.spread)) / 2;
  const zone = farZone(slice, template);
  const { top, highest, far } = topsOf(product, size, unseen, zone);
  const most = Math.min(1, highest / norms + rest);
  if (zone === null) return { least: Math.max(0, top / norms - rest), most };
  // More than two lags may add up where a period is shorter than a record.
  const hidden = zone.to - zone.from < 1 ? (1 + far / norms) / 2 + rest : 1;
  // The top itself may be a sum of two.
  const least = far >= top ? top / 2 : top;
  return { least: Math.max(LEAST, least / norms - rest), most: Math.min(1, Math.max(most, hidden)), byFarLags: hidden > most };
}
