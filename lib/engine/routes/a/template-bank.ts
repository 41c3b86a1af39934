import type { Band, Side, TemplateRequest } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { binWeights, type BinWeights } from './bin-weights';
import { blockEdges, blockMoments } from './block-moments';
import { massPaths } from './mass-paths';
import type { Numerics } from './numerics';
import { endsBelow, packedSide, responseSeries, slopesOf, type PackedSide, type ResponseSeries } from './packed-side';
import type { SpectrumStore } from './spectrum-store';
import { templateFrame, type Reach, type TemplateFrame } from './template-frame';

/** Templates on bins that never change; a mass moves the signal and the noise across them. */
export interface PackedBank {
  readonly template: (index: number) => PackedSide;
  /** Width of a bin at a factor on the templates' mass. */
  readonly dfHz: (factor: number) => number;
  readonly weightsAt: (factor: number) => Pick<BinWeights, 'first' | 'values'>;
}

export interface TemplateBank extends PackedBank {
  /** Of each template, how far it moves at most from the first factor to each other, rad. */
  readonly paths: readonly Float64Array[];
}

export interface BankRequest {
  readonly signals: readonly Side[];
  readonly factors: readonly number[];
  readonly request: TemplateRequest & { readonly response: Exclude<Response, 'complex'> };
  readonly store: SpectrumStore;
  readonly numerics: Numerics;
}

/** Weights of so many numbers are kept: 32 MB. */
const MOST_KEPT = 1 << 22;

interface Ground extends TemplateFrame {
  readonly lowest: number;
  readonly highest: number;
  readonly weightsUpTo: (last: number) => TemplateBank['weightsAt'];
  /** Where a template's content ends. */
  readonly tail: Float64Array;
  readonly dFOf: (side: Side) => number;
}

function groundOf({ signals, factors, request, store, numerics }: BankRequest, reach: Reach): Ground {
  const { templates: sides, band } = request;
  const frame = templateFrame(signals, sides, factors, reach, store, numerics);
  const { dfHz } = frame;
  const lowest = Math.max(1, Math.floor(band.fLowHz / dfHz(factors[0]!)) - numerics.edgeOrder);
  const wanted = Math.ceil(band.fHighHz / dfHz(factors[factors.length - 1]!)) + numerics.edgeOrder;
  const highest = Math.max(lowest, Math.min(nyquistBin(sides, dfHz(1), store), wanted));
  const weightsUpTo = (last: number) => weightsBy(request, dfHz, lowest, last, store, numerics);
  const tail = tailWeights(lowest, highest, factors, weightsUpTo(highest));
  return { ...frame, lowest, highest, weightsUpTo, tail, dFOf: (side) => Number((dfHz(1) * side.secondsPerUnit).toPrecision(14)) };
}

/**
 * Transforms every template once, for bounds of matches.
 * Shape:  time-domain sides in one real response; factors rising.
 * Units:  Hz; rad.
 * Error:  as `packedSide`; 2e-4 of a template where every second sample is enough. Paths are bounds.
 * Fails:  never.
 * Source: engine design: spectra of all templates in memory.
 */
export function templateBank(bank: BankRequest, reach: Reach): TemplateBank {
  const { factors, request, store, numerics } = bank;
  const { templates: sides, band, response } = request;
  const { lowest, highest, tail, stride, dfHz, weightsUpTo, dFOf } = groundOf(bank, reach);
  const pathOf = factors.length > 1 ? pathsOn(lowest, highest, stride, dfHz, factors, band) : null;
  const templates: PackedSide[] = [];
  const paths: Float64Array[] = [];
  let thin = true;
  for (const [i, side] of sides.entries()) {
    request.onStep?.(i / (2 * sides.length));
    const dF = dFOf(side);
    const pack = (): { series: ResponseSeries; packed: PackedSide } => {
      const series = responseSeries(side, dF, { response, store, numerics, thin });
      return { series, packed: packedSide(series, dF, lowest, stride, tail) };
    };
    let { series, packed } = pack();
    // What is too fast for it in one template mostly is in the next.
    if (thin && !endsBelow(series, packed, dF)) {
      thin = false;
      ({ series, packed } = pack());
    }
    templates.push(packed);
    paths.push(pathOf === null ? new Float64Array(1) : pathOf(series, packed, dF));
  }
  const last = Math.min(highest, Math.max(...templates.map(({ first, re }) => first + re.length - 1)));
  return { template: (t) => templates[t]!, paths, dfHz, weightsAt: weightsUpTo(last) };
}

/**
 * The same templates on bins that tell all lags apart, each when it is first asked for.
 * Shape:  `known` is a bank of the same request: no content lies above its bins.
 * Units:  Hz.
 * Error:  as `packedSide`.
 * Fails:  never.
 * Source: engine design: spectra of all templates in memory.
 */
export function sharpBank(bank: BankRequest, known: TemplateBank): PackedBank {
  const { request, store, numerics } = bank;
  const { response, templates: sides } = request;
  const { lowest, highest, tail, stride, dfHz, weightsUpTo, dFOf } = groundOf(bank, 'all');
  const ends = sides.map((_, t) => known.template(t)).map(({ first, re }) => first + re.length);
  const last = Math.min(highest, Math.ceil((Math.max(...ends) * known.dfHz(1)) / dfHz(1)));
  const packed = new Map<number, PackedSide>();
  const template = (t: number): PackedSide => {
    const dF = dFOf(sides[t]!);
    const made = packed.get(t) ?? packedSide(responseSeries(sides[t]!, dF, { response, store, numerics }), dF, lowest, stride, tail);
    packed.set(t, made);
    return made;
  };
  return { template, dfHz, weightsAt: weightsUpTo(last) };
}

/** No record holds content above it. */
const nyquistBin = (sides: readonly Side[], dfHz: number, store: SpectrumStore): number =>
  Math.ceil(Math.max(...sides.map(({ waveform, secondsPerUnit }) => store.time(waveform).nyquist / secondsPerUnit)) / dfHz);

type PathOf = (series: ResponseSeries, packed: PackedSide, dF: number) => Float64Array;

/** Lengths of paths, from every `stride`-th bin: they are integrals over spectra whose records those bins tell apart. */
function pathsOn(lowest: number, highest: number, stride: number, dfHz: TemplateBank['dfHz'], factors: readonly number[], band: Band): PathOf {
  const edges = blockEdges(Math.ceil(lowest / stride), Math.floor(highest / stride), Math.log(factors[1]! / factors[0]!));
  const { of: pathsOf } = massPaths(factors, edges, (factor) => stride * dfHz(factor), band);
  return (series, packed, dF) => pathsOf(blockMoments(packed, slopesOf(series, packed, dF, stride), stride, edges));
}

/** Signals fall as this power of the frequency, before they end. */
const INSPIRAL = -7 / 3;

/** 1/S at the first, the middle and the last mass, each as large as an inspiral makes it. */
function tailWeights(lowest: number, highest: number, factors: readonly number[], weightsAt: TemplateBank['weightsAt']): Float64Array {
  const out = new Float64Array(highest - lowest + 1);
  const inspiral = out.map((_, i) => (lowest + i) ** INSPIRAL);
  for (const g of new Set([0, factors.length >> 1, factors.length - 1])) {
    const { first, values } = weightsAt(factors[g]!);
    const from = first - lowest;
    let total = 0;
    for (let i = 0; i < values.length; i++) total += values[i]! * inspiral[from + i]!;
    for (let i = 0; i < values.length; i++) out[from + i]! += Math.max(0, values[i]!) / total;
  }
  return out;
}

function weightsBy({ band }: BankRequest['request'], dfHz: TemplateBank['dfHz'], firstBin: number, lastBin: number, store: SpectrumStore, numerics: Numerics): TemplateBank['weightsAt'] {
  const weigher = store.weigher(band.noise, numerics.noiseTableHalvings);
  const kept = new Map<number, BinWeights>();
  let numbers = 0;
  return (factor) => {
    const known = kept.get(factor);
    if (known) return known;
    const df = dfHz(factor);
    const bins = { dfHz: df, fLowHz: band.fLowHz, fHighHz: Math.min(band.fHighHz, lastBin * df), firstBin, lastBin, curveLowHz: band.noise.fLowHz, curveHighHz: band.noise.fHighHz, order: numerics.edgeOrder };
    const made = binWeights(weigher, bins);
    if ((numbers += made.values.length) > MOST_KEPT) {
      kept.clear();
      numbers = made.values.length;
    }
    kept.set(factor, made);
    return made;
  };
}
