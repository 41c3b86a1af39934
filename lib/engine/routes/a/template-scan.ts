import type { Side, TemplateRequest } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { binWeights } from './bin-weights';
import type { CrossSpectrum } from './cross-spectrum';
import { glanceAtLag } from './lag-glance';
import { findLag } from './lag-search';
import type { Numerics } from './numerics';
import { RoughValues } from './rough-values';
import { responseSource, type PackedSide, type ResponseSource } from './packed-side';
import type { SpectrumStore } from './spectrum-store';
import { templateFrame } from './template-frame';

/** Matches of every signal with every template at every factor: rough ones, and sharp ones where asked. */
export interface TemplateScan {
  /** [signal][template][factor], flattened. */
  readonly rough: Float32Array;
  /** The match at any factor, its lag refined, on the scan's own bins. */
  readonly sharp: (signal: number, template: number, massFactor: number) => number;
}

export interface ScanRequest {
  readonly signals: readonly Side[];
  readonly factors: readonly number[];
  readonly request: TemplateRequest & { readonly response: Exclude<Response, 'complex'> };
  readonly store: SpectrumStore;
  readonly numerics: Numerics;
}

/** Of a signal's weighted power, what may be left out at each end of its bins: it changes no match by more than the root. */
const LEFT_OUT = 1e-9;

/** Numbers of the stretched sides that are kept at once, at several factors: 32 MB. */
const MOST_KEPT = 1 << 22;

interface Bench {
  readonly signals: readonly PackedSide[];
  readonly templates: readonly PackedSide[];
  readonly weights: { readonly first: number; readonly values: Float64Array };
}

interface Weighed {
  readonly first: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly norm: number;
}

/** A signal times the weights, cut to where it has power. */
function weighed(side: PackedSide, { first, values }: Bench['weights']): Weighed {
  const from = Math.max(side.first, first);
  const to = Math.max(from, Math.min(side.first + side.re.length, first + values.length));
  const powers = new Float64Array(to - from);
  let norm = 0;
  for (let k = from; k < to; k++) norm += powers[k - from] = values[k - first]! * side.power[k - side.first]!;
  let low = 0;
  for (let left = 0; low < powers.length && (left += Math.abs(powers[low]!)) < LEFT_OUT * norm; ) low++;
  let high = powers.length;
  for (let left = 0; high > low && (left += Math.abs(powers[high - 1]!)) < LEFT_OUT * norm; ) high--;
  const re = new Float64Array(high - low);
  const im = new Float64Array(high - low);
  for (let i = 0; i < re.length; i++) {
    const k = from + low + i;
    re[i] = values[k - first]! * side.re[k - side.first]!;
    im[i] = values[k - first]! * side.im[k - side.first]!;
  }
  return { first: from + low, re, im, norm };
}

function normOf({ first, power }: PackedSide, { first: lowest, values }: Bench['weights']): number {
  const from = Math.max(first, lowest);
  const to = Math.min(first + power.length, lowest + values.length);
  let sum = 0;
  for (let k = from; k < to; k++) sum += values[k - lowest]! * power[k - first]!;
  return sum;
}

interface Buffers {
  re: Float64Array;
  im: Float64Array;
}

/** The product of a weighted signal with a template, in buffers that the next one overwrites. */
function productOf(a: Weighed, b: PackedSide, normB: number, buffers: Buffers): CrossSpectrum {
  const from = Math.max(a.first, b.first);
  const n = Math.max(0, Math.min(a.first + a.re.length, b.first + b.re.length) - from);
  if (buffers.re.length < n) [buffers.re, buffers.im] = [new Float64Array(2 * n), new Float64Array(2 * n)];
  const re = buffers.re.subarray(0, n);
  const im = buffers.im.subarray(0, n);
  const { re: ar, im: ai } = a;
  const { re: br, im: bi } = b;
  const [i0, j0] = [from - a.first, from - b.first];
  for (let k = 0; k < n; k++) {
    const p = ar[i0 + k]!;
    const q = ai[i0 + k]!;
    const r = br[j0 + k]!;
    const s = bi[j0 + k]!;
    re[k] = p * r + q * s;
    im[k] = q * r - p * s;
  }
  return { first: from, n, plusRe: re, plusIm: im, minusRe: null, minusIm: null, normA: a.norm, normB };
}

const normalised = (value: number, { normA, normB }: CrossSpectrum): number => (normA > 0 && normB > 0 ? value / Math.sqrt(normA * normB) : 0);

/** Spectra and weights of one factor; those of the held sides are made once, the others kept while there is room. */
function benchMaker({ signals, factors, request, store, numerics }: ScanRequest): (factor: number) => Bench {
  const { templates, band, response, rescale } = request;
  const frame = templateFrame(signals, templates, factors, store, numerics);
  const weigher = store.weigher(band.noise, numerics.noiseTableHalvings);
  const packing = { band, response, store, numerics };
  const dFOf = (side: Side, factor: number): number => Number((frame.dfHz(factor) * side.secondsPerUnit).toPrecision(14));
  const sources = (sides: readonly Side[]): ResponseSource[] => sides.map((side) => responseSource(side, dFOf(side, 1), packing));
  const [signalSources, templateSources] = [sources(signals), sources(templates)];
  /** Bins that the band asks for at some of the factors. */
  const read = (side: Side, source: ResponseSource, factor: number, reach: readonly [number, number]): PackedSide => {
    const dF = dFOf(side, factor);
    const lowest = Math.floor((band.fLowHz * side.secondsPerUnit * reach[0]) / dF) - numerics.edgeOrder;
    return source.spectrum(dF, Math.max(1, lowest), Math.ceil((band.fHighHz * side.secondsPerUnit * reach[1]) / dF) + numerics.edgeOrder);
  };
  const still = [1, 1] as const;
  const range = [factors[0]!, factors[factors.length - 1]!] as const;
  const heldSignals = frame.held === 'signals' ? signals.map((side, i) => read(side, signalSources[i]!, 1, still)) : null;
  const heldTemplates = frame.held === 'templates' ? templates.map((side, i) => read(side, templateSources[i]!, 1, range)) : null;
  const made = (factor: number): Bench => {
    const dfHz = frame.dfHz(factor);
    const readSignals = heldSignals ?? signals.map((side, i) => read(side, signalSources[i]!, factor, still));
    const readTemplates = heldTemplates ?? templates.map((given, i) => read(factor === 1 ? given : rescale(given, factor), templateSources[i]!, factor, still));
    const last = Math.max(...[...readTemplates, ...readSignals].map(({ first, re }) => first + re.length - 1));
    const bins = { dfHz, fLowHz: band.fLowHz, fHighHz: Math.min(band.fHighHz, last * dfHz), firstBin: 1, lastBin: last, curveLowHz: band.noise.fLowHz, curveHighHz: band.noise.fHighHz, order: numerics.edgeOrder };
    return { signals: readSignals, templates: readTemplates, weights: binWeights(weigher, bins) };
  };
  const benches = new Map<number, Bench>();
  return (factor) => {
    const known = benches.get(factor);
    if (known) return known;
    const bench = made(factor);
    const stretched = frame.held === 'templates' ? bench.signals : bench.templates;
    const numbers = stretched.reduce((sum, { re }) => sum + 3 * re.length, bench.weights.values.length);
    if ((benches.size + 1) * numbers > MOST_KEPT) benches.clear();
    benches.set(factor, bench);
    return bench;
  };
}

/**
 * Looks at every signal with every template at every factor on the template's mass.
 * Shape:  time-domain sides in one real response, time and phase free.
 * Units:  dimensionless.
 * Error:  rough: low by some 0.5 % of the match at its tops, 1 % beside them; sharp: 2e-5, the bins' own.
 * Fails:  never; sides without power in the band give 0.
 * Source: engine design: spectra of all templates once; a mass only stretches the frequencies.
 */
export function scanTemplates({ signals, factors, request, store, numerics }: ScanRequest): TemplateScan {
  const { templates, onStep } = request;
  const benchAt = benchMaker({ signals, factors, request, store, numerics });
  const buffers: Buffers = { re: new Float64Array(0), im: new Float64Array(0) };
  const rough = new RoughValues(signals.length, templates.length, factors.length);
  const lookAt = (g: number, wanted: (s: number, t: number) => boolean): void => {
    const bench = benchAt(factors[g]!);
    const norms = bench.templates.map((template) => normOf(template, bench.weights));
    bench.signals.forEach((signal, s) => {
      const a = weighed(signal, bench.weights);
      bench.templates.forEach((template, t) => {
        if (!wanted(s, t)) return;
        const product = productOf(a, template, norms[t]!, buffers);
        rough.set(s, t, g, normalised(glanceAtLag(product), product));
      });
    });
  };
  const first = factors.map((_, g) => g).filter((g) => rough.isFirst(g));
  const then = factors.map((_, g) => g).filter((g) => !rough.isFirst(g));
  first.forEach((g, i) => {
    onStep?.(i / factors.length);
    lookAt(g, () => true);
  });
  const between = rough.intervals();
  then.forEach((g, i) => {
    onStep?.((first.length + i) / factors.length);
    lookAt(g, (s, t) => between.matters(s, t, g));
  });
  const sharp = (s: number, t: number, factor: number): number => {
    const bench = benchAt(factor);
    const product = productOf(weighed(bench.signals[s]!, bench.weights), bench.templates[t]!, normOf(bench.templates[t]!, bench.weights), buffers);
    return normalised(findLag(product, 'modulus', 1).value, product);
  };
  return { rough: rough.values, sharp };
}
