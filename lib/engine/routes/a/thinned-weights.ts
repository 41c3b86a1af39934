import type { BinWeights } from './bin-weights';

/** Bins at which an integrand is read, with what each stands for. */
export interface ThinnedWeights {
  readonly bins: Int32Array;
  readonly values: Float64Array;
}

/** Points of the interpolation between the bins that are kept. */
const ORDER = 12;

/** How far outside the band bins are read. */
export const marginOf = (stride: number): number => (ORDER / 2) * stride;

/** Lagrange's weights at `place` among ORDER neighbours numbered from 0. */
function lagrange(place: number, into: Float64Array): void {
  for (let k = 0; k < ORDER; k++) {
    let product = 1;
    for (let i = 0; i < ORDER; i++) if (i !== k) product *= (place - i) / (k - i);
    into[k] = product;
  }
}

/**
 * The same sum over every stride-th bin: each left-out bin's weight goes to the twelve kept bins around it.
 * Shape:  bins from `lowest` to `highest` may be read.
 * Units:  those of the weights.
 * Error:  3e-6 of what turns by π/4 from bin to bin that is kept, 1e-13 of what turns by a fifth of that.
 * Fails:  never; too few bins keep them all.
 * Source: interpolation by Lagrange's formula, transposed (our derivation).
 */
export function thinnedWeights({ first, values }: BinWeights, stride: number, lowest: number, highest: number): ThinnedWeights {
  const margin = marginOf(stride);
  const from = Math.max(lowest, first - margin);
  const count = Math.floor((Math.min(highest, first + values.length - 1 + margin) - from) / stride) + 1;
  if (stride <= 1 || count < 2 * ORDER) return { bins: Int32Array.from(values, (_, j) => first + j), values };
  const bins = Int32Array.from({ length: count }, (_, i) => from + i * stride);
  const sums = new Float64Array(count);
  const rows = Array.from({ length: stride }, () => new Float64Array(0));
  const own = new Float64Array(ORDER);
  for (let j = 0; j < values.length; j++) {
    const place = (first + j - from) / stride;
    const start = Math.min(Math.max(Math.floor(place) - ORDER / 2 + 1, 0), count - ORDER);
    const centred = start === Math.floor(place) - ORDER / 2 + 1;
    const phase = (first + j - from) % stride;
    // Away from the ends the weights depend on the place between two kept bins alone.
    if (centred && rows[phase]!.length === 0) lagrange(place - start, (rows[phase] = new Float64Array(ORDER)));
    if (!centred) lagrange(place - start, own);
    const row = centred ? rows[phase]! : own;
    for (let k = 0; k < ORDER; k++) sums[start + k]! += values[j]! * row[k]!;
  }
  return { bins, values: sums };
}
