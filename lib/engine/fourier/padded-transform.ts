import { transformOfSize } from './transform';

interface Scratch {
  readonly out: Float64Array;
  readonly part: Float64Array;
  readonly turned: Float64Array;
  readonly rotor: Float64Array;
}

/** Buffers of the last sizes: a sweep asks for the same ones again, and fresh pages cost as much as the transform. */
let scratch: Scratch | null = null;
function scratchOf(size: number, part: number): Scratch {
  if (scratch?.out.length !== 2 * size || scratch.part.length !== 2 * part)
    scratch = { out: new Float64Array(2 * size), part: new Float64Array(2 * part), turned: new Float64Array(2 * part), rotor: new Float64Array(2 * part) };
  return scratch;
}

const RENEWED = 64;

/** e^{−2πij/N} for j = from … from + n − 1. */
function fillRotors(rotor: Float64Array, n: number, from: number, size: number): void {
  const [stepC, stepS] = [Math.cos((2 * Math.PI) / size), -Math.sin((2 * Math.PI) / size)];
  let c = 0;
  let s = 0;
  for (let j = 0; j < n; j++) {
    if (j % RENEWED === 0) {
      const angle = (-2 * Math.PI * (from + j)) / size;
      c = Math.cos(angle);
      s = Math.sin(angle);
    }
    rotor[2 * j] = c;
    rotor[2 * j + 1] = s;
    const next = c * stepC - s * stepS;
    s = c * stepS + s * stepC;
    c = next;
  }
}

export interface PaddedSeries {
  readonly re: Float64Array;
  /** Null where the series is real. */
  readonly im: Float64Array | null;
  readonly weights: Float64Array;
  /** Sample that stands at index 0; those before it have negative indices. */
  readonly origin: number;
}

/**
 * The transform of a series padded with zeros to `size`, as short transforms of the series turned by each remainder of the bin: none is spent on zeros.
 * Shape:  `part` a power of two that holds the series, size a multiple of it; interleaved bins 0 … size − 1, valid until the next call.
 * Units:  none; sums, not integrals.
 * Error:  that of the short transform.
 * Fails:  never.
 * Source: decimation in frequency by size/part (common practice).
 */
export function paddedTransform({ re, im, weights, origin }: PaddedSeries, size: number, part: number): Float64Array {
  const { out, part: folded, turned, rotor } = scratchOf(size, part);
  const n = re.length;
  const parts = size / part;
  const transform = transformOfSize(part);
  folded.fill(0);
  fillRotors(rotor, n, -origin, size);
  const place = (k: number): number => 2 * (k >= origin ? k - origin : k - origin + part);
  for (let k = 0; k < n; k++) {
    const at = place(k);
    folded[at] = re[k]! * weights[k]!;
    if (im !== null) folded[at + 1] = im[k]! * weights[k]!;
  }
  for (let r = 0; r < parts; r++) {
    transform.forward(turned, folded);
    for (let m = 0; m < part; m++) {
      const at = 2 * (m * parts + r);
      out[at] = turned[2 * m]!;
      out[at + 1] = turned[2 * m + 1]!;
    }
    if (r + 1 < parts) turnOnce(folded, rotor, n, origin, part);
  }
  return out;
}

function turnOnce(folded: Float64Array, rotor: Float64Array, n: number, origin: number, part: number): void {
  for (let k = 0; k < n; k++) {
    const at = 2 * (k >= origin ? k - origin : k - origin + part);
    const x = folded[at]!;
    const y = folded[at + 1]!;
    const c = rotor[2 * k]!;
    const s = rotor[2 * k + 1]!;
    folded[at] = x * c - y * s;
    folded[at + 1] = x * s + y * c;
  }
}
