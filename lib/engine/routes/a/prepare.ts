import type { Band, Side } from '@/lib/engine/contract/route';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import { binWeights, type BinWeights } from './bin-weights';
import type { Numerics } from './numerics';
import { MOST_SAMPLES } from './sample-grid';
import { gridFor, lineOf, sideSpectrum, type Content } from './side-spectra';
import type { Spectrum } from './spectrum';
import type { SpectrumStore } from './spectrum-store';

/** Common bins of the sides of one inner product, with the weights of the band. */
export interface Prepared {
  /** Bin spacing in each side's own unit. */
  readonly dF: readonly number[];
  readonly dfHz: number;
  readonly weights: BinWeights;
  readonly spectra: readonly Spectrum[];
}

export interface PrepareRequest {
  readonly sides: readonly Side[];
  readonly band: Band;
  /** Overlap at the files' own times: the bins must resolve the delay between them. */
  readonly absoluteTimes: boolean;
  /** Length in seconds that the last side may grow to (search over its mass). */
  readonly longestS?: number;
}

/** The padded record is this much longer than the longest lag, so that no lag is taken for another. */
const LAG_ROOM = 1.02;
/** Bins between the band's edges, at least. */
const LEAST_BINS = 64;
/** Fraction of a waveform's weighted power allowed in the top of its own grid before the step is halved. */
const EMPTY_TOP = 1e-13;
const TOP_PART = 0.85;
const FREQUENCY_FILE_BINS = 4096;

const spanS = (side: Side, store: SpectrumStore): number =>
  side.secondsPerUnit * (side.waveform.domain === 'frequency' ? store.frequency(side.waveform).span : store.time(side.waveform).span);

/** Start and end in seconds, for the delay between two files. */
function edgesS(side: Side): [number, number] {
  if (side.waveform.domain === 'frequency') return [0, 0];
  const { axis } = side.waveform;
  return [axis[0]! * side.secondsPerUnit, axis[axis.length - 1]! * side.secondsPerUnit];
}

function longestLagS({ sides, absoluteTimes, longestS }: PrepareRequest, store: SpectrumStore): number {
  const spans = sides.map((side) => spanS(side, store));
  if (longestS !== undefined) spans[spans.length - 1] = longestS;
  const both = spans.length === 1 ? 2 * spans[0]! : spans[0]! + spans[1]!;
  if (!absoluteTimes || sides.length === 1) return both;
  const edges = sides.map(edgesS);
  const centre = edges.map(([from, to]) => (from + to) / 2);
  return both + 2 * Math.abs(centre[0]! - centre[1]!);
}

/** Where both contents and the band overlap, in Hz, before the grids' own upper ends. */
export function contentBand(sides: readonly Side[], band: Band, store: SpectrumStore): { low: number; high: number } {
  const ends = sides.map(({ waveform, secondsPerUnit }) => {
    if (waveform.domain === 'frequency') return [waveform.axis[0]! / secondsPerUnit, waveform.axis[waveform.axis.length - 1]! / secondsPerUnit] as const;
    return [0, store.time(waveform).nyquist / secondsPerUnit] as const;
  });
  return { low: Math.max(band.fLowHz, ...ends.map(([low]) => low)), high: Math.min(band.fHighHz, ...ends.map(([, high]) => high)) };
}

/** Bin spacing that the noise and the band ask for, in Hz. */
function bandSpacing(request: PrepareRequest, store: SpectrumStore, numerics: Numerics): number {
  const { low, high } = contentBand(request.sides, request.band, store);
  const weigher = store.weigher(request.band.noise, numerics.noiseTableHalvings);
  const steep = Math.max(6, weigher.steepness(request.band.fLowHz, request.band.fHighHz));
  const file = request.sides.some((side) => side.waveform.domain === 'frequency') ? (high - low) / FREQUENCY_FILE_BINS : Infinity;
  return Math.min(low / (4 * steep), (high - low) / LEAST_BINS, weigher.kinkResolutionHz(low, high), file);
}

/**
 * Spacing in the first side's unit. It does not depend on the mass unless the noise asks for finer
 * bins, and then only in powers of two, so that one transform serves many masses.
 */
function spacing(request: PrepareRequest, store: SpectrumStore, numerics: Numerics): number[] {
  const [a] = request.sides;
  const perUnit = a!.secondsPerUnit;
  const ratios = request.sides.map((side) => Number((side.secondsPerUnit / perUnit).toPrecision(14)));
  const lag = Number((longestLagS(request, store) / perUnit).toPrecision(13)) * LAG_ROOM;
  const wanted = bandSpacing(request, store, numerics) * perUnit;
  let doublings = 0;
  while (1 / (lag * 2 ** doublings) > wanted && doublings < 40) doublings++;
  doublings += numerics.padDoublings;
  const most = MOST_SAMPLES * 2 ** numerics.padDoublings;
  while (doublings > 0 && longestTransform(request, store, numerics, 1 / (lag * 2 ** doublings), ratios) > most) doublings--;
  return fitted(request, store, numerics, 1 / (lag * 2 ** doublings), ratios);
}

function longestTransform(request: PrepareRequest, store: SpectrumStore, numerics: Numerics, dF: number, ratios: readonly number[]): number {
  return Math.max(
    ...request.sides.map((side, i) => {
      if (side.waveform.domain === 'frequency') return side.waveform.axis[side.waveform.axis.length - 1]! / (dF * ratios[i]!);
      return 1 / (dF * ratios[i]! * gridFor(side, store, numerics, dF * ratios[i]!).dt);
    }),
  );
}

/** Samples used as they stand fix their own step: the bins are moved so that their transform is a power of two long. */
function fitted(request: PrepareRequest, store: SpectrumStore, numerics: Numerics, dF: number, ratios: readonly number[]): number[] {
  for (const [i, side] of request.sides.entries()) {
    if (side.waveform.domain === 'frequency') continue;
    const grid = gridFor(side, store, numerics, dF * ratios[i]!);
    if (grid.stride === null) continue;
    const own = 1 / (grid.dt * powerOfTwoFrom(Math.ceil(1 / (dF * ratios[i]! * grid.dt) - 1e-9)));
    return ratios.map((ratio, j) => (j === i ? own : (own / ratios[i]!) * ratio));
  }
  return ratios.map((ratio) => dF * ratio);
}

/** Is there weighted power left where a resampled grid ends below both the band and the record's own limit? */
function topIsFull(s: Spectrum, weights: BinWeights): boolean {
  if (!s.endsEarly) return false;
  const topBin = (TOP_PART * s.fLast) / s.dF;
  let [all, top] = [0, 0];
  const { first, values } = weights;
  if (values.length === 0) return true;
  if (first + values.length - 1 < topBin) return false;
  for (let j = 0; j < values.length; j++) {
    const k = first + j;
    const p = values[j]! * (s.zRe[k]! ** 2 + s.zIm[k]! ** 2 + s.yRe[k]! ** 2 + s.yIm[k]! ** 2);
    all += p;
    if (k >= topBin) top += p;
  }
  return top > EMPTY_TOP * all;
}

export function weightsFor(spectra: readonly Spectrum[], sides: readonly Side[], band: Band, dfHz: number, store: SpectrumStore, numerics: Numerics): BinWeights {
  const lows = spectra.map((s, i) => s.fFirst / sides[i]!.secondsPerUnit);
  const highs = spectra.map((s, i) => s.fLast / sides[i]!.secondsPerUnit);
  const { noise } = band;
  return binWeights(store.weigher(noise, numerics.noiseTableHalvings), {
    dfHz,
    fLowHz: Math.max(band.fLowHz, ...lows),
    fHighHz: Math.min(band.fHighHz, ...highs),
    firstBin: Math.max(...spectra.map((s) => s.firstBin)),
    lastBin: Math.min(...spectra.map((s) => s.lastBin)),
    curveLowHz: noise.fLowHz,
    curveHighHz: noise.fHighHz,
    order: numerics.edgeOrder,
  });
}

/**
 * Puts one or two sides on common bins and weighs the band, halving a side's step until nothing is left at its upper end.
 * Shape:  spectra in the order of the sides.
 * Units:  dF per side's unit, dfHz in Hz.
 * Error:  content above a resampled grid's end below 1e-13 of the weighted power, or the step at its cap.
 * Fails:  never; a band without content gives empty weights.
 * Source: settings.md rule 2.5; engine design.
 */
export function prepare(request: PrepareRequest, store: SpectrumStore, numerics: Numerics, contents?: readonly Content[]): Prepared {
  for (;;) {
    const dF = spacing(request, store, numerics);
    const dfHz = dF[0]! / request.sides[0]!.secondsPerUnit;
    const spectra = request.sides.map((side, i) => sideSpectrum(side, contents?.[i] ?? lineOf(side), dF[i]!, store, numerics));
    const weights = weightsFor(spectra, request.sides, request.band, dfHz, store, numerics);
    const { low, high } = contentBand(request.sides, request.band, store);
    const full = numerics.refineStep && high > low ? spectra.findIndex((s) => topIsFull(s, weights)) : -1;
    const side = full < 0 ? undefined : request.sides[full];
    if (side === undefined || 2 * gridFor(side, store, numerics, dF[full]!).n > MOST_SAMPLES || store.halvings(side.waveform) > 8) return { dF, dfHz, weights, spectra };
    store.halve(side.waveform);
  }
}
