import type { BinWeights } from './bin-weights';
import type { Spectrum } from './spectrum';

export const TOP_PART = 0.85;
/** Weighted power that adds nothing to a double. */
const UNSEEN = 1e-17;
const TRIM_BLOCK = 64;

/** What one pass over a weighted spectrum tells. */
export interface Survey {
  readonly all: number;
  /** The share above TOP_PART of the grid's own end. */
  readonly top: number;
  /** Weights after this index hold nothing that a double could see. */
  readonly lastUsed: number;
}

interface Powers {
  /** |Z|² + |Y|² of every bin. */
  readonly at: Float64Array;
  /** Sums of them over each block of TRIM_BLOCK bins and all above it. */
  readonly tails: Float64Array;
}

const powers = new WeakMap<Spectrum, Powers>();

/** Once for each spectrum: a sweep looks at the same one at every mass. */
export function powersOf(s: Spectrum): Powers {
  const known = powers.get(s);
  if (known) return known;
  const { zRe, zIm, yRe, yIm } = s;
  const at = new Float64Array(zRe.length);
  for (let k = 0; k < at.length; k++) at[k] = zRe[k]! * zRe[k]! + zIm[k]! * zIm[k]! + yRe[k]! * yRe[k]! + yIm[k]! * yIm[k]!;
  const tails = new Float64Array(Math.ceil(at.length / TRIM_BLOCK));
  let above = 0;
  for (let i = tails.length - 1; i >= 0; i--) {
    for (let k = Math.min(at.length, (i + 1) * TRIM_BLOCK) - 1; k >= i * TRIM_BLOCK; k--) above += at[k]!;
    tails[i] = above;
  }
  const made = { at, tails };
  powers.set(s, made);
  return made;
}

/** Of a waveform's whole power, a run of bins that holds less sees the transform's last digits only: finer bins or steps would chase them. */
const LAST_DIGITS = 1e-26;

export function holdsRoundingOnly(s: Spectrum, fromBin: number, toBin: number): boolean {
  const { at, tails } = powersOf(s);
  let inside = 0;
  for (let k = Math.max(s.firstBin, Math.ceil(fromBin)); k <= Math.min(at.length - 1, toBin); k++) inside += at[k]!;
  return inside < LAST_DIGITS * tails[0]!;
}

/** The last bin above which no weight of the curve could make the power visible beside `all`. */
export function lastLiveBin(s: Spectrum, all: number, ceiling: number): number {
  const { tails } = powersOf(s);
  const unseen = (UNSEEN * Math.abs(all)) / ceiling / 10;
  let i = tails.length;
  while (i > 0 && tails[i - 1]! < unseen) i--;
  return (i + 1) * TRIM_BLOCK;
}

/** Σ V (|Z|² + |Y|²) over weights from … to − 1. */
function powerBetween(power: Float64Array, { first, values }: BinWeights, from: number, to: number): number {
  let sum = 0;
  for (let j = from; j < to; j++) sum += values[j]! * power[first + j]!;
  return sum;
}

/** How much power lies in the band and at its top, and beyond which bin nothing is left to see. */
export function survey(s: Spectrum, weights: BinWeights): Survey {
  const { at: power } = powersOf(s);
  const n = weights.values.length;
  const topIndex = Math.max(0, Math.min(n, Math.ceil((TOP_PART * s.fLast) / s.dF) - weights.first));
  const top = powerBetween(power, weights, topIndex, n);
  const all = powerBetween(power, weights, 0, topIndex) + top;
  let lastUsed = n - 1;
  for (let tail = 0; lastUsed > 0; lastUsed -= TRIM_BLOCK) {
    tail += powerBetween(power, weights, Math.max(0, lastUsed - TRIM_BLOCK + 1), lastUsed + 1);
    if (!(Math.abs(tail) < UNSEEN * Math.abs(all))) break;
  }
  return { all, top, lastUsed };
}
