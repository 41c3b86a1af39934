import type { Band, Side } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { windowWeights } from '@/lib/engine/series/window-weights';
import type { Numerics } from './numerics';
import { gridFor } from './side-spectra';
import { derivativeOrder } from './spectrum';
import type { SpectrumStore } from './spectrum-store';
import { seriesBins, type SeriesBins } from './series-bins';
import type { Polarisations, SampleGrid } from './time-source';

/** The bins of one real response that a band can ask for, and nothing else: a bank holds hundreds. */
export interface PackedSide {
  readonly first: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** When the record begins and ends, as shares of the period that the bins tell apart. */
  readonly from: number;
  readonly to: number;
}

/** Every so-manieth bin's S, where F dB/dF = i k S but for a turn that grows with frequency; k counts these bins alone. */
export interface Slopes {
  readonly first: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export interface Packing {
  readonly band: Band;
  readonly response: Exclude<Response, 'complex'>;
  readonly store: SpectrumStore;
  readonly numerics: Numerics;
  /** Every second sample of an even record is enough, if the spectrum says so afterwards. */
  readonly thin?: boolean;
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

const polarisations = (response: Packing['response']): Polarisations =>
  response === 'plus' ? { plus: 1, cross: 0 } : response === 'cross' ? { plus: 0, cross: 1 } : response;

function peakOf(values: Float64Array): number {
  let [at, top] = [0, -1];
  for (let k = 0; k < values.length; k++) {
    const size = values[k]! * values[k]!;
    if (size > top) [at, top] = [k, size];
  }
  return at;
}

const everySecondOf = (grid: SampleGrid): SampleGrid =>
  grid.stride === null ? grid : { ...grid, dt: 2 * grid.dt, n: ((grid.n - 1) >> 1) + 1, stride: 2 * grid.stride };

/**
 * Prepares a side for a bank.
 * Shape:  time domain; the grid is that of bins `dF`. Times count from the sample of the largest modulus.
 * Units:  the file's own amplitude; dF in cycles per unit of the axis.
 * Error:  as `spectrumOf` at the step in use.
 * Fails:  never.
 * Source: engine design: spectra of all templates in memory.
 */
export function responseSeries(side: Side, dF: number, { response, store, numerics, thin = false }: Omit<Packing, 'band'>): ResponseSeries {
  const source = store.time(side.waveform);
  const whole = gridFor(side, store, numerics, dF);
  const grid = thin ? everySecondOf(whole) : whole;
  const values = source.response(grid, numerics.interpolationOrder, side.inclinationRad, side.azimuthRad, polarisations(response));
  const weights = windowWeights(grid, grid.tEnd, side.taper, numerics.edgeOrder);
  for (let k = 0; k < values.length; k++) values[k]! *= weights[k]!;
  return { values, dt: grid.dt, origin: peakOf(values), top: Math.min(source.nyquist, 0.5 / grid.dt), order: derivativeOrder(side.waveform.variable) };
}

/** Division by (2πf)^n turns news or ψ₄ into strain; the common i^n is a phase. */
function toStrain(order: number, first: number, step: number, n: number, re: Float64Array, im: Float64Array): void {
  if (order === 0) return;
  for (let i = 0; i < n; i++) {
    const scale = (first + i * step) ** -order;
    re[i]! *= scale;
    im[i]! *= scale;
  }
}

const looked = { re: new Float64Array(0), im: new Float64Array(0) };
/** Numbers that the next call overwrites. */
function lookedAt(bins: SeriesBins, order: number, first: number, step: number, n: number): typeof looked {
  if (looked.re.length < n) [looked.re, looked.im] = [new Float64Array(2 * n), new Float64Array(2 * n)];
  bins.read(first, step, n, looked.re, looked.im);
  toStrain(order, first, step, n, looked.re, looked.im);
  return looked;
}

/** How many bins hold all but UNSEEN of the weighed power; every `stride`-th of them shows it. */
function liveBins(bins: SeriesBins, order: number, first: number, stride: number, weights: Float64Array, most: number): number {
  const n = Math.ceil(most / stride);
  const { re, im } = lookedAt(bins, order, first, stride, n);
  let total = 0;
  for (let i = 0; i < n; i++) total += re[i] = weights[i * stride]! * (re[i]! * re[i]! + im[i]! * im[i]!);
  let live = n;
  for (let left = 0; live > 0 && (left += re[live - 1]!) < UNSEEN * total; ) live--;
  return Math.min(most, live * stride);
}

/**
 * Bins of a template from `first` on, one for each of the weights that tell where its content ends for a band, less those above that.
 * Shape:  re and im of their own. Every `stride`-th bin alone must tell the record's length apart.
 * Units:  those of the series, less dt: matches do not see a factor.
 * Error:  rounding; the end of the content to 1e-8 of the weighed power.
 * Fails:  never.
 * Source: definition.
 */
export function packedSide(series: ResponseSeries, dF: number, first: number, stride: number, weights: Float64Array): PackedSide {
  const most = Math.max(0, Math.min(weights.length, Math.floor(series.top / dF) - first + 1));
  const { values, origin, dt } = series;
  const extent = { from: -origin * dt * dF, to: (values.length - 1 - origin) * dt * dF };
  if (most === 0) return { first, re: new Float64Array(0), im: new Float64Array(0), ...extent };
  const bins = seriesBins(values, series, dF, first, most);
  const n = liveBins(bins, series.order, first, stride, weights, Math.min(most, bins.last - first + 1));
  const [re, im] = [new Float64Array(n), new Float64Array(n)];
  bins.read(first, 1, n, re, im);
  toStrain(series.order, first, 1, n, re, im);
  return { first, re, im, ...extent };
}

/** Content that ends below this share of its samples' own limit leaves too little above the limit to be folded down on it: 2e-4 of its size was not reached. */
const ENDS_BELOW = 0.85;

/** Do the bins of a packed side end so low that thinning its samples did no harm? */
export const endsBelow = ({ top }: ResponseSeries, { first, re }: PackedSide, dF: number): boolean => (first + re.length) * dF <= ENDS_BELOW * top;

let timed = new Float64Array(0);

/**
 * The slopes of a packed side, for bounds of how fast a mass moves it.
 * Shape:  bins `stride` times as wide, within those of the side; buffers that the next call overwrites.
 * Units:  those of the side.
 * Error:  rounding.
 * Fails:  never.
 * Source: F dB/dF is the transform of −2πi t b(t), times F.
 */
export function slopesOf(series: ResponseSeries, { first: from, re }: PackedSide, dF: number, stride: number): Slopes {
  const first = Math.ceil(from / stride);
  const n = Math.max(0, Math.floor((from + re.length - 1) / stride) - first + 1);
  const { values, origin, dt, order } = series;
  if (timed.length < values.length) timed = new Float64Array(2 * values.length);
  const product = timed.subarray(0, values.length);
  const turn = -2 * Math.PI * dt * dF * stride;
  for (let j = 0; j < values.length; j++) product[j] = turn * (j - origin) * values[j]!;
  if (n > 0) lookedAt(seriesBins(product, series, dF * stride, first, n), order, first, 1, n);
  return { first, re: looked.re.subarray(0, n), im: looked.im.subarray(0, n) };
}
