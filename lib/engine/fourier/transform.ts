/**
 * Fourier: discrete transforms of interleaved complex series (re, im, re, im …), behind which the
 * library can be changed. Sizes are powers of two; any other spacing of frequencies goes through
 * the zoom transform.
 */
import FFT from 'fft.js';

export interface Transform {
  readonly size: number;
  /** X_k = Σ x_j e^{−2πijk/N}. `out` and `data` differ and hold 2N numbers. */
  readonly forward: (out: Float64Array, data: Float64Array) => void;
  /** x_j = (1/N) Σ X_k e^{+2πijk/N}. */
  readonly inverse: (out: Float64Array, data: Float64Array) => void;
}

/** Of larger sizes only the last is kept: at 2^20 and more the tables would hold a hundred megabytes for good. */
const KEPT_SIZE = 1 << 18;
const kept = new Map<number, Transform>();
let lastLarge: Transform | null = null;

const build = (size: number): Transform => {
  const fft = new FFT(size);
  return { size, forward: (out, data) => fft.transform(out, data), inverse: (out, data) => fft.inverseTransform(out, data) };
};

/**
 * The transform of one power-of-two size.
 * Shape:  size ≥ 2, a power of two.
 * Units:  none; sums, not integrals.
 * Error:  relative rms about 5e-16 up to 2^20 points.
 * Fails:  throws for other sizes.
 * Source: radix-4 decimation in time (common practice).
 */
export function transformOfSize(size: number): Transform {
  const known = kept.get(size);
  if (known) return known;
  if (lastLarge?.size === size) return lastLarge;
  const made = build(size);
  if (size <= KEPT_SIZE) kept.set(size, made);
  else lastLarge = made;
  return made;
}

/** The least power of two that is at least n (and at least 2). */
export const powerOfTwoFrom = (n: number): number => {
  let size = 2;
  while (size < n) size *= 2;
  return size;
};
