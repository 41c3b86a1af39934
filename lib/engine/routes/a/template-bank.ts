import type { Side, TemplateRequest } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { binWeights, type BinWeights } from './bin-weights';
import { blockEdges, blockMoments } from './block-moments';
import { massPaths } from './mass-paths';
import type { Numerics } from './numerics';
import { responseSeries, slopedSide, type PackedSide } from './packed-side';
import type { SpectrumStore } from './spectrum-store';
import { templateFrame } from './template-frame';

/** Every template of a bank on bins that never change; a mass moves the signal and the noise across them. */
export interface TemplateBank {
  readonly templates: readonly PackedSide[];
  /** Of each template, how far it moves at most from the first factor to each other, rad. */
  readonly paths: readonly Float64Array[];
  /** Width of a bin at a factor on the templates' mass. */
  readonly dfHz: (factor: number) => number;
  readonly weightsAt: (factor: number) => Pick<BinWeights, 'first' | 'values'>;
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

/**
 * Transforms every template once.
 * Shape:  time-domain sides in one real response; factors rising.
 * Units:  Hz; rad.
 * Error:  as `slopedSide`; paths are bounds.
 * Fails:  never.
 * Source: engine design: spectra of all templates in memory.
 */
export function templateBank({ signals, factors, request, store, numerics }: BankRequest): TemplateBank {
  const { templates: sides, band, response } = request;
  const dfHz = templateFrame(signals, sides, factors, store, numerics);
  const lowest = Math.max(1, Math.floor(band.fLowHz / dfHz(factors[0]!)) - numerics.edgeOrder);
  const highest = Math.ceil(band.fHighHz / dfHz(factors[factors.length - 1]!)) + numerics.edgeOrder;
  const width = factors.length > 1 ? Math.log(factors[1]! / factors[0]!) : 1;
  const edges = blockEdges(lowest, highest, width);
  const { of: pathsOf } = massPaths(factors, edges, dfHz, band);
  const weightsFor = (last: number) => weightsBy(request, dfHz, lowest, last, store, numerics);
  const tail = tailWeights(lowest, highest, factors, weightsFor(highest));
  const templates: PackedSide[] = [];
  const paths: Float64Array[] = [];
  for (const [i, side] of sides.entries()) {
    request.onStep?.(i / (2 * sides.length));
    const dF = Number((dfHz(1) * side.secondsPerUnit).toPrecision(14));
    const { slopeRe, slopeIm, ...packed } = slopedSide(responseSeries(side, dF, { response, store, numerics }), dF, lowest, tail);
    templates.push(packed);
    paths.push(factors.length > 1 ? pathsOf(blockMoments(packed.first, packed.re, packed.im, slopeRe, slopeIm, edges)) : new Float64Array(1));
  }
  const last = Math.min(highest, Math.max(...templates.map(({ first, re }) => first + re.length - 1)));
  return { templates, paths, dfHz, weightsAt: weightsFor(last) };
}

/** Signals fall as this power of the frequency, before they end. */
const INSPIRAL = -7 / 3;

/** 1/S at the first, the middle and the last mass, each as large as an inspiral makes it. */
function tailWeights(lowest: number, highest: number, factors: readonly number[], weightsAt: TemplateBank['weightsAt']): Float64Array {
  const out = new Float64Array(highest - lowest + 1);
  for (const g of new Set([0, factors.length >> 1, factors.length - 1])) {
    const { first, values } = weightsAt(factors[g]!);
    const total = values.reduce((sum, v, i) => sum + v * (first + i) ** INSPIRAL, 0);
    for (let i = 0; i < values.length; i++) out[first + i - lowest]! += Math.max(0, values[i]!) / total;
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
