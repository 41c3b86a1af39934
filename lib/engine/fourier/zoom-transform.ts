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

/** θ·m²/2 modulo 1, exact to rounding although m² θ reaches 10⁷ cycles: the product is split as by Dekker. */
function chirpCycles(theta: number, m: number): number {
  const square = m * m;
  const product = theta * square;
  const a = SPLITTER * theta;
  const aHigh = a - (a - theta);
  const aLow = theta - aHigh;
  const b = SPLITTER * square;
  const bHigh = b - (b - square);
  const bLow = square - bHigh;
  const remainder = aLow * bLow - (product - aHigh * bHigh - aLow * bHigh - aHigh * bLow);
  const whole = product - 2 * Math.floor(product / 2);
  return (whole + remainder) / 2;
}

const multiplyInto = (target: Float64Array, by: Float64Array, n: number): void => {
  for (let k = 0; k < 2 * n; k += 2) {
    const x = target[k]!;
    const y = target[k + 1]!;
    target[k] = x * by[k]! - y * by[k + 1]!;
    target[k + 1] = x * by[k + 1]! + y * by[k]!;
  }
};

/** e^{+iπθm²} laid out so that a circular convolution reaches all k − j. */
function convolutionKernel(size: number, theta: number, lowest: number, highest: number): Float64Array {
  const kernel = new Float64Array(2 * size);
  for (let m = lowest; m <= highest; m++) {
    const angle = 2 * Math.PI * chirpCycles(theta, m);
    const at = 2 * (((m % size) + size) % size);
    kernel[at] = Math.cos(angle);
    kernel[at + 1] = Math.sin(angle);
  }
  return kernel;
}

/**
 * Fourier sums on bins of any spacing: X_k = Σ_j x_j e^{−2πikjθ} for k = firstBin, firstBin + 1, …
 * Shape:  n complex samples in, `bins` complex values out, interleaved.
 * Units:  none; a sum, not an integral.
 * Error:  relative about 1e-14 of the largest bin.
 * Fails:  never.
 * Source: Bluestein 1970 (from memory): kj = [k² + j² − (k−j)²]/2 makes the sum a convolution.
 */
export function zoomTransform(request: ZoomRequest): Float64Array {
  const { samples, firstIndex, theta, firstBin, bins } = request;
  const n = samples.length / 2;
  const size = powerOfTwoFrom(n + bins);
  const fft = transformOfSize(size);
  const data = new Float64Array(2 * size);
  for (let i = 0; i < n; i++) {
    const angle = -2 * Math.PI * chirpCycles(theta, firstIndex + i);
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    data[2 * i] = samples[2 * i]! * c - samples[2 * i + 1]! * s;
    data[2 * i + 1] = samples[2 * i]! * s + samples[2 * i + 1]! * c;
  }
  // Sample i stands at j = firstIndex + i and bin b at k = firstBin + b; the kernel is read at k − j.
  const shift = firstBin - firstIndex;
  const kernel = convolutionKernel(size, theta, shift - (n - 1), shift + bins - 1);
  const spectrum = new Float64Array(2 * size);
  const kernelSpectrum = new Float64Array(2 * size);
  fft.forward(spectrum, data);
  fft.forward(kernelSpectrum, kernel);
  multiplyInto(spectrum, kernelSpectrum, size);
  fft.inverse(data, spectrum);
  return readBins(data, size, request, shift);
}

function readBins(convolved: Float64Array, size: number, { theta, firstBin, bins }: ZoomRequest, shift: number): Float64Array {
  const out = new Float64Array(2 * bins);
  for (let b = 0; b < bins; b++) {
    const at = 2 * ((((shift + b) % size) + size) % size);
    const angle = -2 * Math.PI * chirpCycles(theta, firstBin + b);
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    out[2 * b] = convolved[at]! * c - convolved[at + 1]! * s;
    out[2 * b + 1] = convolved[at]! * s + convolved[at + 1]! * c;
  }
  return out;
}
