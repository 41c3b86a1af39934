import { powerOfTwoFrom, transformOfSize } from '@/lib/engine/fourier/transform';
import type { MassSlice } from './mass-slice';
import type { PackedSide } from './packed-side';

/** Between what a pair's match at one mass lies, over all shifts and phases. */
export interface MatchBounds {
  readonly least: number;
  readonly most: number;
}

/** Lags for each bin by which the power spreads: between them the modulus rises by a tenth at most. */
const LAGS_PER_SPREAD = 5;
const LEAST_LAGS = 64;
const TURN = 2 * Math.PI;
/** A Newton step shorter than this share of a lag leaves less than 1e-6 of the value. */
const CLOSE = 0.015;
const MOST_STEPS = 4;
const ROOM = 2e-5;

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
function addRim(weights: Float64Array, power: Float64Array, shift: number, from: number, to: number): void {
  let signed = 0;
  let sized = 0;
  for (let i = from; i < to; i++) {
    const v = weights[i]! * power[i - shift]!;
    signed += v;
    sized += Math.abs(v);
  }
  rim.signed += signed;
  rim.sized += sized;
}

let product = new Float64Array(0);
/** Σ V|b|² of the core and Σ V (k − middle)² |b|², found as the product is made. */
const core = { inside: 0, spread: 0 };

/** The product over n bins of the core from `from` on, interleaved in `product`. */
function fillProduct({ first, re: ar, im: ai, weights, middle }: MassSlice, { first: own, re: br, im: bi }: PackedSide, from: number, n: number): void {
  if (product.length < 2 * n) product = new Float64Array(4 * n);
  const into = product;
  const { values } = weights;
  const i0 = from - first;
  const j0 = from - own;
  const w0 = from - weights.first;
  let d = from - middle;
  let inside = 0;
  let spread = 0;
  for (let k = 0; k < n; k++) {
    const p = ar[i0 + k]!;
    const q = ai[i0 + k]!;
    const r = br[j0 + k]!;
    const s = bi[j0 + k]!;
    const v = values[w0 + k]! * (r * r + s * s);
    into[2 * k] = p * r + q * s;
    into[2 * k + 1] = q * r - p * s;
    inside += v;
    spread += d * d * v;
    d++;
  }
  core.inside = inside;
  core.spread = spread;
}

/** The product at `size` lags, which may be fewer than the bins: those a whole turn apart add up. Gives |c|² times size². */
function atLags(n: number, size: number): Float64Array {
  const { data, out, heights } = scratchOf(size);
  const values = product;
  const head = 2 * Math.min(n, size);
  for (let i = 0; i < head; i++) data[i] = values[i]!;
  data.fill(0, head);
  for (let i = 2 * size; i < 2 * n; i++) data[i & (2 * size - 1)]! += values[i]!;
  transformOfSize(size).inverse(out, data);
  const scale = size * size;
  for (let i = 0; i < size; i++) {
    const x = out[2 * i]!;
    const y = out[2 * i + 1]!;
    heights[i] = scale * (x * x + y * y);
  }
  return heights;
}

/** The height of |c|² that a Newton step from lag x promises, and the step, in cycles per bin. */
function stepFrom(data: Float64Array, n: number, x: number): { readonly height: number; readonly step: number } {
  const [stepRe, stepIm] = [Math.cos(TURN * x), Math.sin(TURN * x)];
  let er = 1;
  let ei = 0;
  let zr = 0;
  let zi = 0;
  let dr = 0;
  let di = 0;
  let sr = 0;
  let si = 0;
  const middle = n >> 1;
  for (let j = 0; j < n; j++) {
    const a = data[2 * j]!;
    const b = data[2 * j + 1]!;
    const k = j - middle;
    const u = a * er - b * ei;
    const v = a * ei + b * er;
    zr += u;
    zi += v;
    dr -= k * v;
    di += k * u;
    sr -= k * k * u;
    si -= k * k * v;
    const next = er * stepRe - ei * stepIm;
    ei = er * stepIm + ei * stepRe;
    er = next;
  }
  const height = zr * zr + zi * zi;
  const slope = 2 * (zr * dr + zi * di);
  const bend = 2 * (dr * dr + di * di + zr * sr + zi * si);
  if (!(bend < 0)) return { height, step: 0 };
  return { height: height - (slope * slope) / (2 * bend), step: -slope / bend / TURN };
}

/** The top of the hill of the highest lag, and the height that any other could reach unseen: both of |c|². */
function topsOf(heights: Float64Array, n: number, unseen: number): { readonly top: number; readonly other: number } {
  const size = heights.length;
  let at = 0;
  let most = -1;
  for (let i = 0; i < size; i++) {
    if (heights[i]! > most) {
      most = heights[i]!;
      at = i;
    }
  }
  const before = heights[(at + size - 1) % size]!;
  const after = heights[(at + 1) % size]!;
  const bend = before - 2 * most + after;
  const lag = (at + (bend < 0 ? Math.max(-0.5, Math.min(0.5, (before - after) / (2 * bend))) : 0)) / size;
  const hill = (): { readonly height: number; readonly step: number } => {
    let at = lag;
    for (let round = 1; ; round++) {
      const found = stepFrom(product, n, at);
      const lags = Math.abs(found.step) * size;
      if (lags < CLOSE || !(lags < 1) || round === MOST_STEPS) return found;
      at += found.step;
    }
  };
  const found = hill();
  const top = Math.max(most, Math.abs(found.step) * size < 1 ? found.height : 0);
  // A lag that is not beside the highest one counts where it could hide more.
  const least = Math.max(0, Math.sqrt(top) - unseen) ** 2;
  let other = 0;
  for (let i = 0; i < size; i++) {
    if (heights[i]! > least && heights[i]! > other && Math.min((i - at + size) % size, (at - i + size) % size) > 1) other = heights[i]!;
  }
  return { top, other };
}

/**
 * Bounds of the match of a signal with a template at one mass.
 * Shape:  one slice of the signal, one template on the same bins.
 * Units:  dimensionless.
 * Error:  between the lags of the transform the modulus rises by ½ (δω)² Σ (ω − ω₀)² |c| at most, and that sum by no more than
 *         Cauchy and Schwarz allow; bins outside the core likewise. The highest hill is climbed, so that the bounds mostly lie some 1e-4 apart.
 * Fails:  never; a side without power gives 0.
 * Source: Taylor's remainder about the maximum; our assembly.
 */
export function matchBounds(slice: MassSlice, template: PackedSide): MatchBounds {
  const { first, values } = slice.weights;
  const low = Math.max(first, template.first);
  const high = Math.min(first + values.length, template.first + template.re.length);
  const from = Math.min(Math.max(slice.coreFrom, low), high);
  const n = Math.max(0, Math.min(slice.coreTo, high) - from);
  fillProduct(slice, template, from, n);
  const shift = template.first - first;
  rim.signed = 0;
  rim.sized = 0;
  addRim(values, template.power, shift, low - first, from - first);
  addRim(values, template.power, shift, from + n - first, high - first);
  const { inside, spread } = core;
  const norm = inside + rim.signed;
  const norms = Math.sqrt(slice.norm * norm);
  if (!(norms > 0)) return { least: 0, most: 0 };
  const rest = Math.sqrt(slice.outside * rim.sized) / norms + ROOM;
  if (n === 0) return { least: 0, most: Math.min(1, rest) };
  const width = Math.sqrt(Math.max(slice.spread / slice.norm, spread / norm));
  const size = Math.min(powerOfTwoFrom(2 * n), powerOfTwoFrom(Math.max(LEAST_LAGS, LAGS_PER_SPREAD * width)));
  const half = Math.PI / size;
  const unseen = (half * half * Math.sqrt(slice.spread * spread)) / 2;
  const { top, other } = topsOf(atLags(n, size), n, unseen);
  const highest = other === 0 ? Math.sqrt(top) : Math.max(Math.sqrt(top), Math.sqrt(other) + unseen);
  return { least: Math.max(0, Math.sqrt(top) / norms - rest), most: Math.min(1, highest / norms + rest) };
}
