import { paddedTransform } from '@/lib/engine/fourier/padded-transform';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import { zoomTransform } from '@/lib/engine/fourier/zoom-transform';
import type { Variable } from '@/lib/engine/contract/waveform';
import type { SampleGrid, Samples } from './time-source';

/**
 * The Fourier integral of one complex strain z = h₊ − i h× on bins k·dF, in units of the waveform's
 * own axis: Z(f) for f > 0 and Y(f) = Z(−f)*. Both are analytic functions of f > 0, with
 * h̃₊ = (Z + Y)/2 and h̃× = (Y − Z)/2i. Times count from `referenceTime`.
 */
export interface Spectrum {
  readonly dF: number;
  readonly zRe: Float64Array;
  readonly zIm: Float64Array;
  readonly yRe: Float64Array;
  readonly yIm: Float64Array;
  /** Bins that a sum or a stencil may use. */
  readonly firstBin: number;
  readonly lastBin: number;
  readonly referenceTime: number;
  /** Outside these frequencies the content counts as zero. */
  readonly fFirst: number;
  readonly fLast: number;
  /** True when the upper end is the resampled grid's own, below the record's Nyquist frequency: emptiness there must be checked. */
  readonly endsEarly: boolean;
}

/** How many times a variable is a time derivative of the strain. */
export const derivativeOrder = (variable: Variable): number => (variable === 'psi4' ? 2 : variable === 'news' ? 1 : 0);

const BINS_PAST_THE_END = 6;

function peakIndex({ re, im }: Samples): number {
  let best = 0;
  let top = -1;
  for (let k = 0; k < re.length; k++) {
    const size = re[k]! * re[k]! + (im === null ? 0 : im[k]! * im[k]!);
    if (size > top) [best, top] = [k, size];
  }
  return best;
}

/** Interleaved bins −last … last when the bins do not fit a power of two. */
function zoomed(samples: Samples, weights: Float64Array, theta: number, origin: number, last: number): Float64Array {
  const n = samples.re.length;
  const data = new Float64Array(2 * n);
  for (let k = 0; k < n; k++) {
    data[2 * k] = samples.re[k]! * weights[k]!;
    if (samples.im !== null) data[2 * k + 1] = samples.im[k]! * weights[k]!;
  }
  return zoomTransform({ samples: data, firstIndex: -origin, theta, firstBin: -last, bins: 2 * last + 1 });
}

/** Division by (2πif)^n turns news or ψ₄ into strain; the same factor serves Z and Y. */
function toStrain(re: Float64Array, im: Float64Array, dF: number, order: number): void {
  if (order === 0) return;
  re[0] = 0;
  im[0] = 0;
  for (let k = 1; k < re.length; k++) {
    const w = 2 * Math.PI * k * dF;
    const [x, y] = [re[k]!, im[k]!];
    re[k] = order === 1 ? y / w : -x / (w * w);
    im[k] = order === 1 ? -x / w : -y / (w * w);
  }
}

export interface SpectrumRequest {
  readonly samples: Samples;
  readonly grid: SampleGrid;
  readonly weights: Float64Array;
  readonly dF: number;
  readonly variable: Variable;
  /** Nyquist frequency of the record as given. */
  readonly nyquist: number;
  /** Common origin for modes that are added later; by default the series' own peak. */
  readonly origin?: number;
  readonly topShare: number;
}

/**
 * Fourier integral of a windowed series on uniform bins.
 * Shape:  samples and weights share the grid; bins 0 … lastBin come back.
 * Units:  amplitude × the axis's unit; dF in cycles per that unit.
 * Error:  rounding (1e-15 of the largest bin) and what the grid's step aliases.
 * Fails:  never; a record too long for its bins (n > 1/(dF·dt)) goes through the zoom transform.
 * Source: h̃(f) = ∫h e^{−2πift}dt, house convention.
 */
export function spectrumOf(request: SpectrumRequest): Spectrum {
  const { samples, grid, weights, dF, variable, nyquist } = request;
  const origin = request.origin ?? peakIndex(samples);
  const theta = dF * grid.dt;
  const size = powerOfTwoFrom(Math.max(2, Math.round(1 / theta)));
  const fits = Math.abs(size * theta - 1) < 1e-12 && size >= grid.n;
  const gridNyquist = 0.5 / grid.dt;
  const lastBin = Math.floor(gridNyquist / dF) + BINS_PAST_THE_END;
  const bins = fits ? paddedTransform({ ...samples, weights, origin }, size, Math.min(size, powerOfTwoFrom(grid.n))) : zoomed(samples, weights, theta, origin, lastBin);
  const zRe = new Float64Array(lastBin + 1);
  const zIm = new Float64Array(lastBin + 1);
  const yRe = new Float64Array(lastBin + 1);
  const yIm = new Float64Array(lastBin + 1);
  // Where the bins fit they go round: `size` is a power of two.
  const round = fits ? 2 * size - 1 : -1;
  const zero = fits ? 0 : 2 * lastBin;
  for (let k = 0; k <= lastBin; k++) {
    const plus = (zero + 2 * k) & round;
    const minus = (zero - 2 * k) & round;
    zRe[k] = bins[plus]! * grid.dt;
    zIm[k] = bins[plus + 1]! * grid.dt;
    yRe[k] = bins[minus]! * grid.dt;
    yIm[k] = -bins[minus + 1]! * grid.dt;
  }
  toStrain(zRe, zIm, dF, derivativeOrder(variable));
  toStrain(yRe, yIm, dF, derivativeOrder(variable));
  const endsEarly = gridNyquist < nyquist * (1 - 1e-9);
  const fLast = Math.min(nyquist, gridNyquist) * (endsEarly ? request.topShare : 1);
  return { dF, zRe, zIm, yRe, yIm, firstBin: 1, lastBin, referenceTime: grid.t0 + origin * grid.dt, fFirst: 0, fLast, endsEarly };
}
