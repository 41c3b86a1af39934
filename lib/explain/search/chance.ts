import { drawAt } from '@/lib/kernel/counted-draw';
import { onScale, reach, uncertaintyBeside, type ScaledClaim } from './scaled-claim';
import { drawn, lawAt, type UnexplainedLaw } from './unexplained';

/** Of a long claim only the points that tell most are asked: a decoy fits fewer points no worse, so that a chance can only come out too large. */
const MOST_POINTS = 16;

/** Claimed values as they would be if nothing explained them, each point by itself. */
export interface Decoys {
  readonly scaled: ScaledClaim;
  readonly count: number;
  /** Points that are asked, the most telling first, and a row of values for each decoy. */
  readonly points: readonly number[];
  readonly laws: readonly UnexplainedLaw[];
  readonly values: Float64Array;
}

/** T + U as a share of what the law spans. */
function share(scaled: ScaledClaim, law: UnexplainedLaw, i: number): number {
  const { scale } = scaled.claim;
  return reach(scaled, i, scaled.declared[i]!) / Math.abs(onScale(scale, drawn(law, 0.95)) - onScale(scale, drawn(law, 0.05)));
}

/**
 * T + U where a decoy meets a reading. A tolerance may be a share of the number claimed, so that a larger decoy would
 * have brought a larger one; it may be fixed too, so that a smaller decoy keeps the claim's.
 */
function decoyReach(scaled: ScaledClaim, { from }: UnexplainedLaw, i: number, y: number): number {
  const { scale, points } = scaled.claim;
  const size = Math.abs(points[i]!.claimed - from);
  const larger = scale === 'ln' || size === 0 ? 1 : Math.max(1, Math.abs(y - from) / size);
  return Math.max(reach(scaled, i, y), scaled.tolerance[i]! * larger + uncertaintyBeside(scaled, i, y));
}

export function decoysOf(scaled: ScaledClaim, seed: number, count: number): Decoys {
  const { claim } = scaled;
  const laws = claim.points.map((point) => lawAt(claim, point));
  const shares = laws.map((law, i) => share(scaled, law, i));
  const points = laws.map((_, i) => i).sort((i, j) => shares[i]! - shares[j]! || i - j).slice(0, MOST_POINTS);
  const values = new Float64Array(count * points.length);
  for (let d = 0; d < count; d++)
    for (const [k, i] of points.entries()) values[d * points.length + k] = onScale(claim.scale, drawn(laws[i]!, drawAt(seed, d * laws.length + i)));
  return { scaled, count, points, laws, values };
}

/** Readings as the decoys are held against them: sorted by their first number. */
interface Bank {
  readonly width: number;
  readonly values: Float64Array;
  readonly reaches: Float64Array;
  readonly first: Float64Array;
  readonly widest: number;
}

function bankOf({ scaled, points, laws }: Decoys, rows: readonly Float64Array[]): Bank {
  const width = points.length;
  const sorted = [...rows].sort((p, q) => p[points[0]!]! - q[points[0]!]!);
  const values = new Float64Array(sorted.length * width);
  const reaches = new Float64Array(sorted.length * width);
  for (const [n, row] of sorted.entries())
    for (const [k, i] of points.entries()) {
      values[n * width + k] = row[i]!;
      reaches[n * width + k] = decoyReach(scaled, laws[i]!, i, row[i]!);
    }
  const first = Float64Array.from(sorted, (row) => row[points[0]!]!);
  return { width, values, reaches, first, widest: sorted.reduce((most, _, n) => Math.max(most, reaches[n * width]!), 0) };
}

/** Index of the first that is not below x. */
function placeOf(sorted: Float64Array, x: number): number {
  let [low, high] = [0, sorted.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (sorted[middle]! < x) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** For each decoy the misfit of the reading that fits it best; infinite where none comes within `most`. */
export interface Misfits {
  readonly best: Float64Array;
  /** How often two numbers were compared. */
  readonly comparisons: number;
}

/** A decoy that some reading fits within `enough` is not looked at further. */
export function decoyMisfits(decoys: Decoys, rows: readonly Float64Array[], most: number, enough: number): Misfits {
  const bank = bankOf(decoys, rows);
  const best = new Float64Array(decoys.count).fill(Number.POSITIVE_INFINITY);
  let comparisons = 0;
  for (let d = 0; d < decoys.count; d++) {
    const offset = d * bank.width;
    const place = placeOf(bank.first, decoys.values[offset]!);
    let bound = most * (1 + 1e-9);
    for (const step of [1, -1])
      for (let n = step === 1 ? place : place - 1; n >= 0 && n < bank.first.length && bound > enough; n += step) {
        if (Math.abs(decoys.values[offset]! - bank.first[n]!) > bound * bank.widest) break;
        let worst = 0;
        for (let k = 0; k < bank.width && worst <= bound; k++) {
          comparisons++;
          worst = Math.max(worst, Math.abs(decoys.values[offset + k]! - bank.values[n * bank.width + k]!) / bank.reaches[n * bank.width + k]!);
        }
        if (worst <= bound) best[d] = bound = worst;
      }
  }
  return { best, comparisons };
}

/** Share of the decoys that come as close, the claim itself counted as one: never zero. */
export const chanceOf = (best: readonly Float64Array[], count: number, misfit: number): number => {
  let close = 0;
  for (let d = 0; d < count; d++) if (best.some((of) => of[d]! <= misfit)) close++;
  return (close + 1) / (count + 1);
};
