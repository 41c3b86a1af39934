import { transformOfSize } from './transform';

interface Kept {
  readonly data: Float64Array;
  readonly out: Float64Array;
  /** e^{−2πik/size} for k below half the size. */
  readonly rotors: Float64Array;
}

/** Of the last sizes: the records of a bank ask for the same ones. */
const kept = new Map<number, Kept>();
const MOST_KEPT = 4;

function keptOf(size: number): Kept {
  const known = kept.get(size);
  if (known) return known;
  if (kept.size >= MOST_KEPT) kept.clear();
  const rotors = new Float64Array(size);
  for (let k = 0; k < size / 2; k++) [rotors[2 * k], rotors[2 * k + 1]] = [Math.cos((2 * Math.PI * k) / size), -Math.sin((2 * Math.PI * k) / size)];
  const made = { data: new Float64Array(size), out: new Float64Array(size), rotors };
  kept.set(size, made);
  return made;
}

/** The transform of a real series before its even and odd samples are put together, which is done for the bins that are asked for. */
export interface RealTransform {
  readonly size: number;
  /** Of half the size, even samples as real parts and odd ones as imaginary parts; valid until the next transform of this size. */
  readonly half: Float64Array;
}

/**
 * A real series, padded with zeros to `size`, by a complex transform of half the size.
 * Shape:  size a power of two, ≥ 4 and no shorter than the series; sample `origin` stands at index 0.
 * Units:  none; sums, not integrals.
 * Error:  rounding.
 * Fails:  never.
 * Source: common practice.
 */
export function realTransform(series: Float64Array, origin: number, size: number): RealTransform {
  const { data, out } = keptOf(size);
  data.fill(0, series.length - origin, size - origin);
  data.set(series.subarray(origin), 0);
  data.set(series.subarray(0, origin), size - origin);
  transformOfSize(size / 2).forward(out, data);
  return { size, half: out };
}

/**
 * Reads n bins, from `first` on and `step` apart, into re and im.
 * Shape:  bins from 1 to size/2 − 1.
 * Units:  none.
 * Error:  rounding.
 * Fails:  never.
 * Source: X = E + e^{−2πik/size} O of the even and the odd samples.
 */
export function readBins({ size, half }: RealTransform, first: number, step: number, n: number, re: Float64Array, im: Float64Array): void {
  const { rotors } = keptOf(size);
  for (let i = 0, k = first; i < n; i++, k += step) {
    const at = 2 * k;
    const mirror = size - at;
    const a = half[at]!;
    const b = half[at + 1]!;
    const c = half[mirror]!;
    const d = half[mirror + 1]!;
    const cos = rotors[at]!;
    const sin = rotors[at + 1]!;
    const oddRe = b + d;
    const oddIm = c - a;
    re[i] = 0.5 * (a + c + cos * oddRe - sin * oddIm);
    im[i] = 0.5 * (b - d + cos * oddIm + sin * oddRe);
  }
}
