import { powerOfTwoFrom, transformOfSize } from './transform';

export interface ZoomRequest {
  /** Interleaved complex samples x_j, j = firstIndex, firstIndex + 1, … */
  readonly samples: Float64Array;
  readonly firstIndex: number;
  /** Cycles per sample between neighbouring bins: (bin spacing) × (sample step). */
  readonly theta: number;
  readonly firstBin: number;
  readonly bins: number;
}

const SPLITTER = 134217729;

/** θ·p/2 modulo 1, exact to rounding although p θ reaches 10⁷ cycles: the product is split as by Dekker. */
function halfCycles(theta: number, p: number): number {
  const product = theta * p;
  const a = SPLITTER * theta;
  const aHigh = a - (a - theta);
  const aLow = theta - aHigh;
  const b = SPLITTER * p;
  const bHigh = b - (b - p);
  const bLow = p - bHigh;
  const remainder = aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
  const whole = product - 2 * Math.floor(product / 2);
  return (whole + remainder) / 2;
}

/** Writes e^{iπθp} times a sign of the exponent. */
function putTurn(into: Float64Array, at: number, theta: number, p: number, sign: 1 | -1): void {
  const angle = 2 * Math.PI * halfCycles(theta, p);
  into[at] = Math.cos(angle);
  into[at + 1] = sign * Math.sin(angle);
}

const multiplyInto = (target: Float64Array, by: Float64Array, n: number): void => {
  for (let k = 0; k < 2 * n; k += 2) {
    const x = target[k]!;
    const y = target[k + 1]!;
    target[k] = x * by[k]! - y * by[k + 1]!;
    target[k + 1] = x * by[k + 1]! + y * by[k]!;
  }
};

/** A turn of a bin costs as much as so many steps of a transform. */
const TURN_COST = 8;

/** How long the transforms are: one for all bins, or shorter ones for as many bins as each has room for. */
function sizeFor(n: number, bins: number): number {
  let [best, least] = [0, Infinity];
  for (let size = powerOfTwoFrom(n + 1); ; size *= 2) {
    const room = size - n + 1;
    const rounds = Math.ceil(bins / room);
    const cost = (1 + 2 * rounds) * size * Math.log2(size) + TURN_COST * ((1 + rounds) * n + 2 * Math.min(room, bins));
    if (cost < least) [best, least] = [size, cost];
    if (rounds === 1) return best;
  }
}

/** The transform of e^{+iπθm²}, laid out so that a circular convolution reaches all m = b − i. */
function kernelOf(size: number, theta: number, n: number, room: number): Float64Array {
  const [kernel, out] = [new Float64Array(2 * size), new Float64Array(2 * size)];
  for (let m = 0; m < Math.max(n, room); m++) {
    putTurn(kernel, m < room ? 2 * m : 2 * (size - m), theta, m * m, 1);
    if (m > 0 && m < room && m < n) {
      kernel[2 * (size - m)] = kernel[2 * m]!;
      kernel[2 * (size - m) + 1] = kernel[2 * m + 1]!;
    }
  }
  transformOfSize(size).forward(out, kernel);
  return out;
}

/**
 * Fourier sums on bins of any spacing: X_k = Σ_j x_j e^{−2πikjθ} for k = firstBin, firstBin + 1, …
 * Shape:  n complex samples in, `bins` complex values out, interleaved.
 * Units:  none; a sum, not an integral.
 * Error:  relative about 1e-14 of the largest bin.
 * Fails:  never.
 * Source: Bluestein 1970 (from memory): bi = [b² + i² − (b−i)²]/2 makes the sum a convolution; runs of bins share its kernel.
 */
export function zoomTransform({ samples, firstIndex, theta, firstBin, bins }: ZoomRequest): Float64Array {
  const n = samples.length / 2;
  const size = sizeFor(n, bins);
  const room = Math.min(bins, size - n + 1);
  const fft = transformOfSize(size);
  const kernel = kernelOf(size, theta, n, room);
  const turns = new Float64Array(2 * n);
  const [data, spectrum, out] = [new Float64Array(2 * size), new Float64Array(2 * size), new Float64Array(2 * bins)];
  const ends = new Float64Array(2 * room);
  for (let b = 0; b < room; b++) putTurn(ends, 2 * b, theta, b * (2 * firstIndex + b), -1);
  for (let from = 0; from < bins; from += room) {
    // Sample i stands at j = firstIndex + i and bin b of this run at k = firstBin + from + b.
    for (let i = 0; i < n; i++) putTurn(turns, 2 * i, theta, 2 * (firstBin + from) * (firstIndex + i) + i * i, -1);
    data.fill(0);
    data.set(samples);
    multiplyInto(data, turns, n);
    fft.forward(spectrum, data);
    multiplyInto(spectrum, kernel, size);
    fft.inverse(data, spectrum);
    const run = Math.min(room, bins - from);
    multiplyInto(data, ends, run);
    out.set(data.subarray(0, 2 * run), 2 * from);
  }
  return out;
}
