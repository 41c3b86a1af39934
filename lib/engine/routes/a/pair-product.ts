import type { MassSlice } from './mass-slice';
import type { PackedSide } from './packed-side';

/** The product of a weighed signal with a template over the bins of the signal's core. */
export interface PairProduct {
  /** a*b of bin j at 2j and 2j + 1; zeros up to the room that was asked for. Overwritten by the next product. */
  readonly values: Float64Array;
  readonly n: number;
  /** Σ V|b|² of the core, and Σ V (k − middle)² |b|². */
  readonly inside: number;
  readonly spread: number;
}

let kept = new Float64Array(0);

/**
 * The product over n bins from `from` on.
 * Shape:  bins that both sides and the weights hold; interleaved numbers with zeros up to `room` bins, and beyond the last in any case.
 * Units:  those of the slice and the template.
 * Error:  rounding.
 * Fails:  never.
 * Source: definition.
 */
export function pairProduct(slice: MassSlice, template: PackedSide, from: number, n: number, room: number): PairProduct {
  const most = 2 * Math.max(n + 1, room);
  if (kept.length < most) kept = new Float64Array(2 * most);
  const values = kept;
  const { re: ar, im: ai } = slice;
  const { re: br, im: bi } = template;
  const weights = slice.weights.values;
  const i0 = from - slice.first;
  const j0 = from - template.first;
  const w0 = from - slice.weights.first;
  let d = from - slice.middle;
  let inside = 0;
  let spread = 0;
  for (let k = 0; k < n; k++) {
    const p = ar[i0 + k]!;
    const q = ai[i0 + k]!;
    const r = br[j0 + k]!;
    const s = bi[j0 + k]!;
    const v = weights[w0 + k]! * (r * r + s * s);
    values[2 * k] = p * r + q * s;
    values[2 * k + 1] = p * s - q * r;
    inside += v;
    spread += d * d * v;
    d++;
  }
  values.fill(0, 2 * n, most);
  return { values, n, inside, spread };
}

const TURN = 2 * Math.PI;

/**
 * The height of |c|² that a Newton step from lag x promises, and the step.
 * Shape:  one lag of a product.
 * Units:  lags in cycles per bin.
 * Error:  of third order in the step.
 * Fails:  never; where the curve bends upwards the step is infinite.
 * Source: Newton's method; bins as far above the middle as below it turn by opposite angles, so that one rotor serves two.
 */
export function newtonStep({ values, n }: PairProduct, x: number): { readonly height: number; readonly step: number } {
  const [stepRe, stepIm] = [Math.cos(TURN * x), -Math.sin(TURN * x)];
  const middle = n >> 1;
  let zr = values[2 * middle]!;
  let zi = values[2 * middle + 1]!;
  let dr = 0;
  let di = 0;
  let sr = 0;
  let si = 0;
  let er = stepRe;
  let ei = stepIm;
  // Where n is even the last pair's upper bin stands one beyond the product, where there is nothing.
  for (let k = 1, up = 2 * middle + 2, down = 2 * middle - 2; down >= 0; k++, up += 2, down -= 2) {
    const a = values[up]!;
    const b = values[up + 1]!;
    const c = values[down]!;
    const d = values[down + 1]!;
    const sumRe = (a + c) * er + (d - b) * ei;
    const sumIm = (b + d) * er + (a - c) * ei;
    zr += sumRe;
    zi += sumIm;
    sr -= k * k * sumRe;
    si -= k * k * sumIm;
    dr += k * ((b - d) * er + (a + c) * ei);
    di -= k * ((a - c) * er - (b + d) * ei);
    const next = er * stepRe - ei * stepIm;
    ei = er * stepIm + ei * stepRe;
    er = next;
  }
  const height = zr * zr + zi * zi;
  const slope = 2 * (zr * dr + zi * di);
  const bend = 2 * (dr * dr + di * di + zr * sr + zi * si);
  if (!(bend < 0)) return { height, step: Infinity };
  return { height: height - (slope * slope) / (2 * bend), step: -slope / bend / TURN };
}
