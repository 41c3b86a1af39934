/** Blocks in an octave of bins, as a power of two: eight are narrow enough for a smooth noise curve to be a polynomial over each. */
const LOG_BLOCKS = 3;
/** Bins of a block that is kept as it is. */
export const LEAST_BLOCK = 16;

/** Bins of the block that bin k lies in. */
export const blockSize = (k: number): number => 1 << Math.max(0, 31 - Math.clz32(k) - LOG_BLOCKS);

/** Rises by one from block to block. */
export const blockOrdinal = (k: number): number => {
  const octave = 31 - Math.clz32(k);
  return (octave << LOG_BLOCKS) + (k >> Math.max(0, octave - LOG_BLOCKS));
};

const offsets = new Map<string, Float64Array>();
/** Where a block's nodes stand, in bins from its middle: Chebyshev points, or the bins themselves of a small block. */
export function nodeOffsets(size: number, order: number): Float64Array {
  const key = `${size},${order}`;
  const known = offsets.get(key);
  if (known) return known;
  const half = (size - 1) / 2;
  const made =
    size < LEAST_BLOCK
      ? Float64Array.from({ length: size }, (_, i) => i - half)
      : Float64Array.from({ length: order }, (_, j) => -half * Math.cos((Math.PI * (j + 0.5)) / order));
  offsets.set(key, made);
  return made;
}

const spreads = new Map<string, Float64Array>();
/**
 * What each bin of a block counts at each node, [bin][node]: the cardinal polynomials of the nodes at the bins.
 * Shape:  size × order, for blocks of LEAST_BLOCK bins and more.
 * Units:  none.
 * Error:  rounding; a sum over bins becomes one over nodes, exact where the factor is a polynomial below the order.
 * Fails:  never.
 * Source: discrete orthogonality of Chebyshev polynomials (from memory; sums of polynomials are tested).
 */
export function spreadOf(size: number, order: number): Float64Array {
  const key = `${size},${order}`;
  const known = spreads.get(key);
  if (known) return known;
  const half = (size - 1) / 2;
  const points = nodeOffsets(size, order);
  const atNodes = Float64Array.from({ length: order * order }, (_, i) => {
    const m = i % order;
    const angle = Math.acos(Math.max(-1, Math.min(1, points[Math.floor(i / order)]! / half)));
    return ((m === 0 ? 1 : 2) / order) * Math.cos(m * angle);
  });
  const made = new Float64Array(size * order);
  const polynomials = new Float64Array(order);
  for (let i = 0; i < size; i++) {
    const x = (i - half) / half;
    polynomials[0] = 1;
    polynomials[1] = x;
    for (let m = 2; m < order; m++) polynomials[m] = 2 * x * polynomials[m - 1]! - polynomials[m - 2]!;
    for (let j = 0; j < order; j++) {
      let sum = 0;
      for (let m = 0; m < order; m++) sum += atNodes[order * j + m]! * polynomials[m]!;
      made[order * i + j] = sum;
    }
  }
  spreads.set(key, made);
  return made;
}
