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

export interface Packing {
  readonly band: Band;
  readonly response: Exclude<Response, 'complex'>;
  readonly store: SpectrumStore;
  readonly numerics: Numerics;
}

/** Of the power above the band's lower edge, what may lie above the bins that are kept. */
const UNSEEN = 1e-12;

/** A side's strain in one response, windowed once; its spectrum on bins of any spacing. */
export interface ResponseSource {
  /** Bins `first` … `last`, less those above the end of the content. */
  readonly spectrum: (dF: number, first: number, last: number) => PackedSide;
}

/** F₊h₊ + F×h× where z = h₊ − ih×. */
function responseOf(re: Float64Array, im: Float64Array | null, response: Packing['response']): Float64Array {
  const { plus, cross } = response === 'plus' ? { plus: 1, cross: 0 } : response === 'cross' ? { plus: 0, cross: 1 } : response;
  return re.map((x, k) => plus * x - (im === null ? 0 : cross * im[k]!));
}

/** Buffers of the last size: the records of a bank mostly ask for the same; imaginary parts stay zero. */
let scratch: { readonly data: Float64Array; readonly out: Float64Array } | null = null;

function transformed(series: Float64Array, size: number, first: number, bins: number): Float64Array {
  if (scratch?.data.length !== 2 * size) scratch = { data: new Float64Array(2 * size), out: new Float64Array(2 * size) };
  const { data, out } = scratch;
  for (let k = 0; k < series.length; k++) data[2 * k] = series[k]!;
  data.fill(0, 2 * series.length);
  transformOfSize(size).forward(out, data);
  return out.subarray(2 * first, 2 * (first + bins));
}

function zoomed(series: Float64Array, theta: number, first: number, bins: number): Float64Array {
  const samples = new Float64Array(2 * series.length);
  for (let k = 0; k < series.length; k++) samples[2 * k] = series[k]!;
  return zoomTransform({ samples, firstIndex: 0, theta, firstBin: first, bins });
}

/** How many bins hold all but UNSEEN of the power. */
function liveBins(power: Float64Array): number {
  const total = power.reduce((sum, x) => sum + x, 0);
  let n = power.length;
  for (let left = 0; n > 0 && (left += power[n - 1]!) < UNSEEN * total; ) n--;
  return n;
}

/**
 * Prepares a side for a bank.
 * Shape:  time domain; the grid is that of bins `dF`, others are read off it as well.
 * Units:  the file's own amplitude; dF in cycles per unit of the axis. A constant factor and the instant of time zero are left open: matches do not see them.
 * Error:  as `spectrumOf` at the step in use; the end of the content to 1e-12 of the power.
 * Fails:  never.
 * Source: engine design: spectra of all templates in memory.
 */
export function responseSource(side: Side, dF: number, { response, store, numerics }: Packing): ResponseSource {
  const source = store.time(side.waveform);
  const grid = gridFor(side, store, numerics, dF);
  const { re, im } = source.lineOfSight(grid, numerics.interpolationOrder, side.inclinationRad, side.azimuthRad);
  const weights = windowWeights(grid, grid.tEnd, side.taper, numerics.edgeOrder);
  const series = responseOf(re, im, response).map((x, k) => x * weights[k]!);
  const order = derivativeOrder(side.waveform.variable);
  let live = Math.min(source.nyquist, 0.5 / grid.dt);
  const spectrum: ResponseSource['spectrum'] = (spacing, first, last) => {
    const bins = Math.max(0, Math.min(last, Math.floor(live / spacing)) - first + 1);
    if (bins === 0) return { first, re: new Float64Array(0), im: new Float64Array(0), power: new Float64Array(0) };
    const theta = spacing * grid.dt;
    const size = powerOfTwoFrom(Math.max(2, Math.round(1 / theta)));
    const fits = Math.abs(size * theta - 1) < 1e-12 && size >= grid.n;
    const values = fits ? transformed(series, size, first, bins) : zoomed(series, theta, first, bins);
    const cut = { re: new Float64Array(bins), im: new Float64Array(bins), power: new Float64Array(bins) };
    for (let k = 0; k < bins; k++) {
      // Division by (2πf)^n turns news or ψ₄ into strain; the common i^n is a phase.
      const scale = order === 0 ? 1 : (first + k) ** -order;
      const x = values[2 * k]! * scale;
      const y = values[2 * k + 1]! * scale;
      cut.re[k] = x;
      cut.im[k] = y;
      cut.power[k] = x * x + y * y;
    }
    const kept = liveBins(cut.power);
    if (kept < bins) live = Math.min(live, (first + kept) * spacing);
    return { first, re: cut.re.slice(0, kept), im: cut.im.slice(0, kept), power: cut.power.slice(0, kept) };
  };
  return { spectrum };
}
