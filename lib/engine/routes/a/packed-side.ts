import type { Band, Side } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { powerOfTwoFrom, transformOfSize } from '@/lib/engine/fourier/transform';
import { zoomTransform } from '@/lib/engine/fourier/zoom-transform';
import { windowWeights } from '@/lib/engine/series/window-weights';
import type { Numerics } from './numerics';
import { gridFor } from './side-spectra';
import { derivativeOrder } from './spectrum';
import type { SpectrumStore } from './spectrum-store';

/** The bins of one real response that a band can ask for, and nothing else: a bank holds hundreds. */
export interface PackedSide {
  readonly first: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** |·|² of each bin. */
  readonly power: Float64Array;
}

/** With S of each bin, where F dB/dF = i k S but for a turn that grows with frequency. */
export interface SlopedSide extends PackedSide {
  readonly slopeRe: Float64Array;
  readonly slopeIm: Float64Array;
}

export interface Packing {
  readonly band: Band;
  readonly response: Exclude<Response, 'complex'>;
  readonly store: SpectrumStore;
  readonly numerics: Numerics;
}

/** Of the weighed power, what may lie above the bins that are kept. */
const UNSEEN = 1e-8;

/** A side's strain in one response, windowed once. */
export interface ResponseSeries {
  readonly values: Float64Array;
  /** Samples and what they count from: times of sample j are (j − origin) dt. */
  readonly dt: number;
  readonly origin: number;
  /** Content ends here, in cycles per unit of the axis. */
  readonly top: number;
  /** How many times the variable is a time derivative of the strain. */
  readonly order: number;
}

/** F₊h₊ + F×h× where z = h₊ − ih×, times the window, in place. */
function toResponse(re: Float64Array, im: Float64Array | null, weights: Float64Array, response: Packing['response']): Float64Array {
  const { plus, cross } = response === 'plus' ? { plus: 1, cross: 0 } : response === 'cross' ? { plus: 0, cross: 1 } : response;
  const out = new Float64Array(re.length);
  if (im === null || cross === 0) for (let k = 0; k < out.length; k++) out[k] = plus * re[k]! * weights[k]!;
  else for (let k = 0; k < out.length; k++) out[k] = (plus * re[k]! - cross * im[k]!) * weights[k]!;
  return out;
}

function peakOf(values: Float64Array): number {
  let [at, top] = [0, -1];
  for (let k = 0; k < values.length; k++) {
    const size = values[k]! * values[k]!;
    if (size > top) [at, top] = [k, size];
  }
  return at;
}

/**
 * Prepares a side for a bank.
 * Shape:  time domain; the grid is that of bins `dF`. Times count from the sample of the largest modulus.
 * Units:  the file's own amplitude; dF in cycles per unit of the axis.
 * Error:  as `spectrumOf` at the step in use.
 * Fails:  never.
 * Source: engine design: spectra of all templates in memory.
 */
export function responseSeries(side: Side, dF: number, { response, store, numerics }: Omit<Packing, 'band'>): ResponseSeries {
  const source = store.time(side.waveform);
  const grid = gridFor(side, store, numerics, dF);
  const { re, im } = source.lineOfSight(grid, numerics.interpolationOrder, side.inclinationRad, side.azimuthRad);
  const values = toResponse(re, im, windowWeights(grid, grid.tEnd, side.taper, numerics.edgeOrder), response);
  return { values, dt: grid.dt, origin: peakOf(values), top: Math.min(source.nyquist, 0.5 / grid.dt), order: derivativeOrder(side.waveform.variable) };
}

/** Buffers of the last size: the records of a bank mostly ask for the same. */
let scratch: { readonly data: Float64Array; readonly out: Float64Array } | null = null;
function scratchOf(size: number): { readonly data: Float64Array; readonly out: Float64Array } {
  if (scratch?.data.length !== 2 * size) scratch = { data: new Float64Array(2 * size), out: new Float64Array(2 * size) };
  return scratch;
}

/** Size of the transform whose bins are exactly dF wide, or 0. */
export function sizeFor({ values, dt }: ResponseSeries, dF: number): number {
  const theta = dF * dt;
  const size = powerOfTwoFrom(Math.max(2, Math.round(1 / theta)));
  return Math.abs(size * theta - 1) < 1e-12 && size >= values.length ? size : 0;
}

/** Where the bins of x + iy stand at f and at −f: bin first + k at plusAt + 2k and minusAt − 2k. */
interface PairBins {
  readonly plus: Float64Array;
  readonly plusAt: number;
  readonly minus: Float64Array;
  readonly minusAt: number;
}

/** One transform of the series and, as an imaginary part, of it times `turn` and the time. */
function pairBins(series: ResponseSeries, turn: number, dF: number, first: number, bins: number): PairBins {
  const { values, origin } = series;
  const n = values.length;
  const size = sizeFor(series, dF);
  if (size === 0) {
    const samples = new Float64Array(2 * n);
    for (let j = 0; j < n; j++) {
      samples[2 * j] = values[j]!;
      samples[2 * j + 1] = turn * (j - origin) * values[j]!;
    }
    const zoom = (from: number): Float64Array => zoomTransform({ samples, firstIndex: -origin, theta: dF * series.dt, firstBin: from, bins });
    return { plus: zoom(first), plusAt: 0, minus: zoom(1 - first - bins), minusAt: 2 * (bins - 1) };
  }
  const { data, out } = scratchOf(size);
  data.fill(0, 2 * (n - origin), 2 * (size - origin));
  for (let j = 0, at = 2 * (size - origin); j < n; j++, at += 2) {
    if (j === origin) at = 0;
    const x = values[j]!;
    data[at] = x;
    data[at + 1] = turn * (j - origin) * x;
  }
  transformOfSize(size).forward(out, data);
  return { plus: out, plusAt: 2 * first, minus: out, minusAt: 2 * (size - first) };
}

let powers = new Float64Array(0);

/** How many bins hold all but UNSEEN of the weighed power of x. */
function liveBins({ plus, plusAt, minus, minusAt }: PairBins, scaleAt: (k: number) => number, weights: Float64Array, bins: number): number {
  if (powers.length < bins) powers = new Float64Array(bins);
  let total = 0;
  for (let k = 0; k < bins; k++) {
    const x = plus[plusAt + 2 * k]! + minus[minusAt - 2 * k]!;
    const y = plus[plusAt + 2 * k + 1]! - minus[minusAt - 2 * k + 1]!;
    const scale = scaleAt(k);
    total += powers[k] = weights[k]! * scale * scale * (x * x + y * y);
  }
  let n = bins;
  for (let left = 0; n > 0 && (left += powers[n - 1]!) < UNSEEN * total; ) n--;
  return n;
}

const empty = (first: number): SlopedSide => {
  const none = new Float64Array(0);
  return { first, re: none, im: none, power: none, slopeRe: none, slopeIm: none };
};

/**
 * Bins of a template from `first` on, one for each of the weights that tell where its content ends for a band, less those above that.
 * Shape:  re, im and power of their own; the slopes stand in buffers that the next call overwrites.
 * Units:  those of the series, less dt: matches do not see a factor.
 * Error:  rounding; the end of the content to 1e-8 of the weighed power.
 * Fails:  never.
 * Source: F dB/dF is the transform of −2πi t b(t), times F.
 */
export function slopedSide(series: ResponseSeries, dF: number, first: number, weights: Float64Array): SlopedSide {
  const bins = Math.max(0, Math.min(weights.length, Math.floor(series.top / dF) - first + 1));
  if (bins === 0) return empty(first);
  const pairs = pairBins(series, -2 * Math.PI * series.dt * dF, dF, first, bins);
  // Division by (2πf)^n turns news or ψ₄ into strain; the common i^n is a phase.
  const scaleAt = series.order === 0 ? () => 1 : (k: number) => (first + k) ** -series.order;
  return separated(pairs, scaleAt, first, liveBins(pairs, scaleAt, weights, bins));
}

const slopes = { re: new Float64Array(0), im: new Float64Array(0) };

/** Spectra of x and y from those of x + iy. */
function separated({ plus, plusAt, minus, minusAt }: PairBins, scaleAt: (k: number) => number, first: number, n: number): SlopedSide {
  const [re, im, power] = [new Float64Array(n), new Float64Array(n), new Float64Array(n)];
  if (slopes.re.length < n) [slopes.re, slopes.im] = [new Float64Array(2 * n), new Float64Array(2 * n)];
  const [slopeRe, slopeIm] = [slopes.re.subarray(0, n), slopes.im.subarray(0, n)];
  for (let k = 0; k < n; k++) {
    const half = 0.5 * scaleAt(k);
    const a = plus[plusAt + 2 * k]!;
    const b = plus[plusAt + 2 * k + 1]!;
    const c = minus[minusAt - 2 * k]!;
    const d = minus[minusAt - 2 * k + 1]!;
    const x = half * (a + c);
    const y = half * (b - d);
    re[k] = x;
    im[k] = y;
    power[k] = x * x + y * y;
    slopeRe[k] = half * (b + d);
    slopeIm[k] = half * (c - a);
  }
  return { first, re, im, power, slopeRe, slopeIm };
}
