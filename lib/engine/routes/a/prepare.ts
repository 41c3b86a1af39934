import type { Band, Side } from '@/lib/engine/contract/route';
import { holdsRoundingOnly, lastLiveBin, powersOf, survey, type Survey } from './band-power';
import { contentBand, spacing, topOf, type PrepareRequest, type Spacing } from './bin-plan';
import { binWeights, glanceAtEdges, type BinRange, type BinWeights } from './bin-weights';
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
  /** Every so-manieth bin alone still tells all lags of the two records apart. */
  readonly lagStride: number;
  readonly weights: BinWeights;
  readonly spectra: readonly Spectrum[];
}

/** Fraction of a waveform's weighted power allowed in the top of its own grid before the step is halved. */
const EMPTY_TOP = 1e-13;
/** Bins are halved until two orders less at the band's edges, or (for a file without a length) half the bins, move the power by less. */
export const SETTLED = 3e-9;
/** That falls at best by two to the order less one with every halving: bins that are far off need not be looked at halving by halving. */
const MOST_HALVINGS = 3;

/** Where the band, the curve, the spectra and what lives of them overlap, on bins of dfHz. */
export function rangeFor(
  spectra: readonly Spectrum[],
  sides: readonly Pick<Side, 'secondsPerUnit'>[],
  { noise, fLowHz, fHighHz }: Band,
  dfHz: number,
  numerics: Numerics,
  liveLast = Infinity,
): BinRange {
  const lows = spectra.map((s, i) => s.fFirst / sides[i]!.secondsPerUnit);
  const highs = spectra.map((s, i) => s.fLast / sides[i]!.secondsPerUnit);
  return {
    dfHz,
    fLowHz: Math.max(fLowHz, ...lows),
    fHighHz: Math.min(fHighHz, liveLast * dfHz, ...highs),
    firstBin: Math.max(...spectra.map((s) => s.firstBin)),
    lastBin: Math.min(...spectra.map((s) => s.lastBin)),
    curveLowHz: noise.fLowHz,
    curveHighHz: noise.fHighHz,
    order: numerics.edgeOrder,
  };
}

function weightsFor(
  spectra: readonly Spectrum[],
  sides: readonly Side[],
  band: Band,
  dfHz: number,
  store: SpectrumStore,
  numerics: Numerics,
  liveLast = Infinity,
): BinWeights {
  return binWeights(store.weigher(band.noise, numerics.noiseTableHalvings), rangeFor(spectra, sides, band, dfHz, numerics, liveLast));
}

const everySecond = (values: Float64Array): Float64Array =>
  Float64Array.from({ length: (values.length + 1) >> 1 }, (_, k) => values[2 * k]!);

interface Outlook {
  /** Halvings that the bins still need at least, if the power of some side hangs on how they resolve the band's edges. */
  readonly halvings: number;
  readonly liveLast: number;
}

/** What can be said of these bins before they are weighed one by one. */
function outlook(
  request: PrepareRequest,
  dF: readonly number[],
  spectra: readonly Spectrum[],
  store: SpectrumStore,
  numerics: Numerics,
): Outlook {
  const { sides, band } = request;
  const dfHz = dF[0]! / sides[0]!.secondsPerUnit;
  const weigher = store.weigher(band.noise, numerics.noiseTableHalvings);
  const glance = glanceAtEdges(weigher, rangeFor(spectra, sides, band, dfHz, numerics));
  if (glance === null) return { halvings: 0, liveLast: Infinity };
  const views = spectra.map((s) => {
    const { at: power } = powersOf(s);
    const all = glance.sum(power);
    const doubt = glance.doubt.reduce((sum, { bin, weight }) => sum + weight * power[bin]!, 0);
    const liveLast = all > 0 ? lastLiveBin(s, all, weigher.ceiling) : Infinity;
    const over = Math.abs(doubt) / (SETTLED * Math.abs(all));
    return { halvings: over > 1 ? Math.max(1, Math.min(MOST_HALVINGS, Math.ceil(Math.log2(over) / (numerics.edgeOrder - 1)))) : 0, liveLast };
  });
  return { halvings: Math.max(...views.map(({ halvings }) => halvings)), liveLast: Math.max(...views.map(({ liveLast }) => liveLast)) };
}

/** A frequency-domain file has no length of its own: is the power still different on every second bin? */
function fileIsLoose(s: Spectrum, side: Side, band: Band, weights: BinWeights, store: SpectrumStore, numerics: Numerics): boolean {
  if (side.waveform.domain !== 'frequency') return false;
  const halved = { dF: 2 * s.dF, firstBin: Math.ceil(s.firstBin / 2), lastBin: Math.floor(s.lastBin / 2) };
  const thin: Spectrum = {
    ...s,
    ...halved,
    zRe: everySecond(s.zRe),
    zIm: everySecond(s.zIm),
    yRe: everySecond(s.yRe),
    yIm: everySecond(s.yIm),
  };
  const coarse = survey(thin, weightsFor([thin], [side], band, 2 * weights.dfHz, store, numerics)).all;
  const fine = survey(s, weightsFor([s], [side], band, weights.dfHz, store, numerics)).all;
  return Math.abs(2 * coarse - fine) > SETTLED * Math.abs(fine);
}

const spectraOn = (
  request: PrepareRequest,
  { dF }: Spacing,
  store: SpectrumStore,
  numerics: Numerics,
  contents?: readonly Content[],
): Spectrum[] =>
  request.sides.map((side, i) => sideSpectrum(side, contents?.[i] ?? lineOf(side), dF[i]!, topOf(side, request.band), store, numerics));

function onBins(
  request: PrepareRequest,
  plan: Spacing,
  spectra: readonly Spectrum[],
  liveLast: number,
  store: SpectrumStore,
  numerics: Numerics,
): Prepared {
  const { dF, lagStride } = plan;
  const dfHz = dF[0]! / request.sides[0]!.secondsPerUnit;
  return { dF, dfHz, lagStride, spectra, weights: weightsFor(spectra, request.sides, request.band, dfHz, store, numerics, liveLast) };
}

function trimmed(prepared: Prepared, surveys: readonly Survey[]): Prepared {
  const { weights } = prepared;
  const last = Math.max(...surveys.map(({ lastUsed }) => lastUsed));
  return last + 1 >= weights.values.length
    ? prepared
    : { ...prepared, weights: { ...weights, values: weights.values.subarray(0, last + 1) } };
}

/**
 * Puts one or two sides on common bins and weighs the band. A side's step is halved until nothing is
 * left at its upper end, and the bins until the band's edges are resolved; a knob then goes beyond that.
 * Shape:  spectra in the order of the sides; weights stop where nothing is left.
 * Units:  dF per side's unit, dfHz in Hz.
 * Error:  content above a resampled grid's end below 1e-13 of the weighted power; edges to 1e-10 by two orders less, far below that by the order used; or the caps.
 * Fails:  never; a band without content gives empty weights.
 * Source: settings.md rule 2.5; engine design.
 */
export function prepare(request: PrepareRequest, store: SpectrumStore, numerics: Numerics, contents?: readonly Content[]): Prepared {
  const unpadded = { ...numerics, padDoublings: 0 };
  let extra = 0;
  for (;;) {
    const plan = spacing(request, store, unpadded, extra);
    const spectra = spectraOn(request, plan, store, numerics, contents);
    const mayPad = numerics.refineBins && plan.doublings < plan.mostDoublings;
    const { halvings, liveLast } = outlook(request, plan.dF, spectra, store, numerics);
    const empty = (): boolean =>
      spectra.every((s, i) =>
        holdsRoundingOnly(
          s,
          (request.band.fLowHz * request.sides[i]!.secondsPerUnit) / s.dF,
          (request.band.fHighHz * request.sides[i]!.secondsPerUnit) / s.dF,
        ),
      );
    if (mayPad && halvings > 0 && !empty()) {
      extra = padded(request, plan, store, halvings);
      continue;
    }
    const found = onBins(request, plan, spectra, liveLast, store, numerics);
    const surveys = found.spectra.map((s) => survey(s, found.weights));
    const side = numerics.refineStep ? fullSide(request, found, surveys, store, numerics) : undefined;
    const full = side !== undefined && !empty() ? side : undefined;
    if (full !== undefined) store.halve(full.waveform);
    else if (mayPad && spectra.some((s, i) => fileIsLoose(s, request.sides[i]!, request.band, found.weights, store, numerics)))
      extra = padded(request, plan, store);
    else if (numerics.padDoublings > 0) return finer(request, extra, store, numerics, contents);
    else return trimmed(found, surveys);
  }
}

function padded(request: PrepareRequest, plan: Spacing, store: SpectrumStore, halvings = 1): number {
  const extra = plan.doublings + halvings;
  for (const { waveform } of request.sides) if (waveform.domain === 'frequency') store.pad(waveform, extra);
  return extra;
}

/** The knob for the error bar: beyond what was found to be enough. */
function finer(request: PrepareRequest, extra: number, store: SpectrumStore, numerics: Numerics, contents?: readonly Content[]): Prepared {
  const plan = spacing(request, store, numerics, extra);
  return onBins(request, plan, spectraOn(request, plan, store, numerics, contents), Infinity, store, numerics);
}

/** A side with power left where its resampled grid ends below both the band and the record's own limit, and whose step may be halved. */
function fullSide(
  request: PrepareRequest,
  { spectra, weights, dF }: Prepared,
  surveys: readonly Survey[],
  store: SpectrumStore,
  numerics: Numerics,
): Side | undefined {
  const { low, high } = contentBand(request.sides, request.band, store);
  return request.sides.find((side, i) => {
    const { all, top } = surveys[i]!;
    if (!spectra[i]!.endsEarly || high <= low || store.halvings(side.waveform) > 8) return false;
    const full = weights.values.length === 0 || Math.abs(top) > EMPTY_TOP * Math.abs(all);
    return full && 2 * gridFor(side, store, numerics, dF[i]!).n <= MOST_SAMPLES;
  });
}
