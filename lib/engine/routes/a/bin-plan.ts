import type { Band, Side } from '@/lib/engine/contract/route';
import { powerOfTwoFrom } from '@/lib/engine/fourier/transform';
import type { Numerics } from './numerics';
import { MOST_SAMPLES } from './sample-grid';
import { gridFor } from './side-spectra';
import type { SpectrumStore } from './spectrum-store';

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
/** A frequency-domain file says nothing finer than its own interpolation does. */
const MOST_FILE_BINS = 1 << 18;
/** A file that would need more even lines than this between zero and the band's upper edge is summed in pieces, or refused where a shift needs one grid. */
export const MOST_EVEN_LINES = 1 << 21;
/** Even lines below a band's lower edge, at least: a file's content varies as fast as its frequency does. */
const LINES_BELOW = 8;
/** Longest padding that an edge may ask for, as halvings of the first bins. */
const MOST_EDGE_DOUBLINGS = 8;

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
    if (waveform.domain === 'frequency')
      return [waveform.axis[0]! / secondsPerUnit, waveform.axis[waveform.axis.length - 1]! / secondsPerUnit] as const;
    return [0, store.time(waveform).nyquist / secondsPerUnit] as const;
  });
  return { low: Math.max(band.fLowHz, ...ends.map(([low]) => low)), high: Math.min(band.fHighHz, ...ends.map(([, high]) => high)) };
}

export interface Spacing {
  /** In each side's own unit. */
  readonly dF: readonly number[];
  /** Halvings of the bins in use, before the knob, and those that a steep or distant edge might need. */
  readonly doublings: number;
  readonly mostDoublings: number;
  readonly lagStride: number;
}

/** Halvings after which 1/(lag·2^n) is at most the spacing wanted. */
const doublingsTo = (lag: number, wanted: number): number =>
  Math.max(0, Math.min(40, Math.ceil(Math.log2(1 / (lag * wanted)) - 1e-9) || 0));

/**
 * Spacing of the bins. It does not depend on the mass unless the noise asks for finer bins, and
 * then only in powers of two, so that one transform serves many masses.
 * Shape:  one plan for all sides of the request.
 * Units:  `dF` in 1/(unit of time of the first side's file).
 * Error:  none of its own; the doublings say how fine the bins are, and how much finer they could be.
 * Fails:  never; beyond the longest transform the doublings stop and say so.
 * Source: a band-limited product over a finite lag is summed exactly by bins of 1/(2·lag), the sampling theorem.
 */
export function spacing(request: PrepareRequest, store: SpectrumStore, numerics: Numerics, extra: number): Spacing {
  const perUnit = request.sides[0]!.secondsPerUnit;
  const ratios = request.sides.map((side) => Number((side.secondsPerUnit / perUnit).toPrecision(14)));
  const lag = Number((longestLagS(request, store) / perUnit).toPrecision(13)) * LAG_ROOM;
  const { low, high } = contentBand(request.sides, request.band, store);
  const weigher = store.weigher(request.band.noise, numerics.noiseTableHalvings);
  const must = doublingsTo(lag, perUnit * Math.min((high - low) / LEAST_BINS, weigher.kinkResolutionHz(low, high, numerics.kinkChange)));
  const fromFile = request.sides.some((side) => side.waveform.domain === 'frequency');
  const file = fromFile ? doublingsTo(lag, perUnit * Math.min((high - low) / MOST_FILE_BINS, low / LINES_BELOW)) : MOST_EDGE_DOUBLINGS;
  const learned = Math.max(extra, ...request.sides.map((side) => store.paddings(side.waveform)));
  const doublings = Math.max(must, Math.min(must + file, learned));
  let used = doublings + numerics.padDoublings;
  const most = MOST_SAMPLES * 2 ** numerics.padDoublings;
  while (used > 0 && longestTransform(request, store, numerics, 1 / (lag * 2 ** used), ratios) > most) used--;
  const atCap = used < doublings + numerics.padDoublings;
  return {
    dF: fitted(request, store, numerics, 1 / (lag * 2 ** used), ratios),
    doublings,
    mostDoublings: atCap ? doublings : must + file,
    lagStride: 2 ** used,
  };
}

/**
 * Even lines from zero to the band's upper edge that a file in frequency asks for: by its lags and by where the band begins.
 * Shape:  one number; 0 without such a file.
 * Units:  lines.
 * Error:  a measure, good to a factor.
 * Fails:  never.
 * Source: our rule.
 */
export function evenLines(request: PrepareRequest, store: SpectrumStore): number {
  if (request.sides.every((side) => side.waveform.domain !== 'frequency')) return 0;
  const { low, high } = contentBand(request.sides, request.band, store);
  return high > low ? high * Math.max(longestLagS(request, store) * LAG_ROOM, LINES_BELOW / low) : 0;
}

function longestTransform(
  request: PrepareRequest,
  store: SpectrumStore,
  numerics: Numerics,
  dF: number,
  ratios: readonly number[],
): number {
  return Math.max(
    ...request.sides.map((side, i) => {
      if (side.waveform.domain === 'frequency') return topOf(side, request.band) / (dF * ratios[i]!);
      return 1 / (dF * ratios[i]! * gridFor(side, store, numerics, dF * ratios[i]!).dt);
    }),
  );
}

/** Rounded up to a power of two, so that masses share what was read. */
export const topOf = (side: Side, band: Band): number =>
  Math.min(side.waveform.axis[side.waveform.axis.length - 1]!, 2 ** Math.ceil(Math.log2(band.fHighHz * side.secondsPerUnit)));

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
