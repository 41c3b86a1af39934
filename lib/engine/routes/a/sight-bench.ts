import type { SightRequest, Sight, Side } from '@/lib/engine/contract/route';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import { freedomOf, type Freedom } from './alignment';
import { crossSpectrum } from './cross-spectrum';
import { roughLag } from './lag-search';
import type { BinWeights } from './bin-weights';
import { lagPanel, type LagPanel } from './lag-panels';
import { modeBank } from './mode-bank';
import type { Numerics } from './numerics';
import { prepare } from './prepare';
import { elementsOf, gramOfElements, type Element, type Weigh, type Weight } from './sight-elements';
import type { Spectrum } from './spectrum';
import { marginOf, thinnedWeights, type ThinnedWeights } from './thinned-weights';
import type { SpectrumStore } from './spectrum-store';

/** Two waveforms taken apart on common bins, with their products by lag. */
export interface SightBench {
  readonly a: readonly Weigh[];
  readonly b: readonly Weigh[];
  readonly powerA: (weights: readonly Weight[]) => number;
  readonly powerB: (weights: readonly Weight[]) => number;
  readonly freedom: Freedom;
  readonly azimuthFree: boolean;
  readonly inclinationFree: boolean;
  /** Strain² of one unit of `powerA`. */
  readonly scaleA: number;
  readonly dfHz: number;
  /** Lag, in cycles per bin, at which the files stand as they time themselves. */
  readonly unmovedX: number;
  /** Lags at which some sight has its highest hill. */
  readonly hills: readonly number[];
  /** Half a panel, and half a cycle of the signal, in cycles per bin. */
  readonly half: number;
  readonly halfCycle: number;
  readonly panelAt: (x: number) => LagPanel;
}

/** A direction from which every mode is seen; used to lay out bins, not for a result. */
const PLAN: Sight = { inclinationRad: 1, azimuthRad: 0.3 };
/** Phase over half a panel, in rad, of the frequency below which all but a thousandth of the power lies. */
const PANEL_PHASE = 5;
/** The kept bins are this many times closer than the longest lag of the records needs. */
const OVERSAMPLED = 4;
const BULK = 0.999;
const SEED_AZIMUTHS = [0.2];
const SEED_INCLINATIONS = [0.4, 1.2];
const SEED_TURNS = 6;

const seenFrom = (side: Side, sight: Sight): Side => ({ ...side, ...sight });

/** Mean bin of the power, and the bin below which its bulk lies. */
function spread({ zRe, zIm, yRe, yIm }: Spectrum, { first, values }: BinWeights): { mean: number; bulk: number } {
  const power = Array.from(values, (v, j) => v * (zRe[first + j]! ** 2 + zIm[first + j]! ** 2 + yRe[first + j]! ** 2 + yIm[first + j]! ** 2));
  const all = power.reduce((p, q) => p + q, 0);
  const mean = power.reduce((sum, p, j) => sum + p * (first + j), 0) / all;
  let bulk = first;
  for (let sum = 0, j = 0; j < power.length && sum < BULK * all; j++, bulk++) sum += power[j]!;
  return { mean, bulk };
}

function sumOf(elements: readonly Element[], sight: Sight, { first, values }: BinWeights): Spectrum {
  const base = elements[0]!.spectrum;
  const n = base.zRe.length;
  const sum = { ...base, zRe: new Float64Array(n), zIm: new Float64Array(n), yRe: new Float64Array(n), yIm: new Float64Array(n) };
  for (const { spectrum: s, weigh } of elements) {
    const { re, im } = weigh(sight);
    for (let k = first; k < first + values.length; k++) {
      sum.zRe[k]! += re * s.zRe[k]! - im * s.zIm[k]!;
      sum.zIm[k]! += re * s.zIm[k]! + im * s.zRe[k]!;
      sum.yRe[k]! += re * s.yRe[k]! + im * s.yIm[k]!;
      sum.yIm[k]! += re * s.yIm[k]! - im * s.yRe[k]!;
    }
  }
  return sum;
}

interface Laid {
  readonly a: readonly Element[];
  readonly b: readonly Element[];
  readonly weights: BinWeights;
  readonly lagStride: number;
  readonly freedom: Freedom;
}

/** The lag of the best of a few turns of b, for a few sights: where later searches begin. */
function hillsOf({ a, b, weights, lagStride, freedom }: Laid, inclinationRad: number | null, azimuthFree: boolean): number[] {
  const sights = (inclinationRad === null ? SEED_INCLINATIONS : [inclinationRad]).flatMap((ι) => SEED_AZIMUTHS.map((azimuthRad) => ({ inclinationRad: ι, azimuthRad })));
  return sights.map((sight) => {
    const whole = sumOf(a, sight, weights);
    const turns = azimuthFree ? Array.from({ length: SEED_TURNS }, (_, i) => (i * Math.PI) / SEED_TURNS) : [0];
    const found = turns.map((turn) => {
      const c = crossSpectrum(whole, sumOf(b, { ...sight, azimuthRad: sight.azimuthRad + turn }, weights), 'complex', weights);
      const { x, height } = roughLag(c, freedom.turn ? 'modulus' : 'real', lagStride);
      return { x, value: height / Math.sqrt(c.normB) };
    });
    return found.reduce((p, q) => (q.value > p.value ? q : p)).x;
  });
}

function distinct(lags: readonly number[], apart: number): number[] {
  return lags.filter((x, i) => lags.slice(0, i).every((y) => Math.abs(x - y) > apart));
}

function panels(a: readonly Element[], b: readonly Element[], weights: ThinnedWeights, half: number): (x: number) => LagPanel {
  const made = new Map<number, LagPanel>();
  return (x) => {
    const index = Math.floor(x / (2 * half));
    const known = made.get(index) ?? lagPanel(a, b, weights, (2 * index + 1) * half, half);
    made.set(index, known);
    return known;
  };
}

function thinned(weights: BinWeights, elements: readonly Element[], stride: number): ThinnedWeights {
  const lowest = Math.max(...elements.map(({ spectrum }) => spectrum.firstBin));
  const highest = Math.min(...elements.map(({ spectrum }) => spectrum.lastBin));
  return thinnedWeights(weights, stride, lowest, highest);
}

interface Parts {
  readonly a: readonly Element[];
  readonly power: (weights: readonly Weight[]) => number;
}

const partsOf = (a: readonly Element[], weights: BinWeights): Parts => ({ a, power: gramOfElements(a, weights) });

/** Of a search over b's mass: how long b may grow, and a's parts by the bins they stand on. */
export interface Growing {
  readonly longestS?: number;
  readonly parts?: Map<string, Parts>;
}

const has = (maximise: readonly MaximiseOver[], what: MaximiseOver): boolean => maximise.includes(what);

/**
 * Lays two waveforms out for matches from many sights; null when one of them is silent in the band.
 * Shape:  products by lag are summed when a lag is first asked for; see `Growing` for a b whose mass is free.
 * Units:  lags in cycles per bin.
 * Error:  see `lagPanel`.
 * Fails:  never.
 * Source: settings.md rule 2.7; the product of two mode sums is a double sum of products of modes.
 */
export function sightBench(request: SightRequest, store: SpectrumStore, numerics: Numerics, { longestS, parts }: Growing = {}): SightBench | null {
  const { band, maximise, inclinationRad } = request;
  const plan = inclinationRad === null ? PLAN : { ...PLAN, inclinationRad };
  const sides = [seenFrom(request.a, plan), seenFrom(request.b, plan)] as const;
  const prepared = prepare({ sides, band, absoluteTimes: !has(maximise, 'time'), ...(longestS === undefined ? {} : { longestS }) }, store, numerics);
  const { weights, dfHz, lagStride } = prepared;
  const stride = Math.floor(lagStride / OVERSAMPLED);
  const modes = request.b.waveform.content.kind === 'modes';
  const inclinationFree = modes && has(maximise, 'inclination');
  const azimuthFree = modes && has(maximise, 'phase');
  const elements = (i: 0 | 1): Element[] =>
    elementsOf(
      sides[i],
      modeBank(sides[i], prepared.dF[i]!, band.fHighHz * sides[i].secondsPerUnit, store, numerics),
      prepared.spectra[i]!,
      i === 1 && inclinationFree ? null : inclinationRad,
      weights,
      marginOf(stride),
    );
  const place = `${prepared.spectra[0]!.dF}|${dfHz}|${weights.first}|${weights.values.length}|${stride}`;
  const ofA = parts?.get(place) ?? partsOf(elements(0), weights);
  parts?.set(place, ofA);
  const { a } = ofA;
  const b = elements(1);
  if (a.length === 0 || b.length === 0 || weights.values.length === 0) return null;
  const freedom = freedomOf('complex', maximise, modes);
  const secondsPerUnit = [sides[0].secondsPerUnit, sides[1].secondsPerUnit] as const;
  const { mean, bulk } = spread(sumOf(a, plan, weights), weights);
  const half = PANEL_PHASE / (2 * Math.PI * Math.max(bulk, 1));
  const unmovedX = (b[0]!.spectrum.referenceTime * secondsPerUnit[1] - a[0]!.spectrum.referenceTime * secondsPerUnit[0]) * dfHz;
  const hills = freedom.time ? hillsOf({ a, b, weights, lagStride, freedom }, inclinationRad, azimuthFree) : [unmovedX];
  return {
    a: a.map(({ weigh }) => weigh),
    b: b.map(({ weigh }) => weigh),
    powerA: ofA.power,
    powerB: gramOfElements(b, weights),
    freedom,
    azimuthFree,
    inclinationFree,
    scaleA: 2 * dfHz * (request.a.strainPerUnit * request.a.secondsPerUnit) ** 2,
    dfHz,
    unmovedX,
    hills: distinct(hills, 0.25 / mean),
    half,
    halfCycle: 0.5 / mean,
    panelAt: panels(a, b, thinned(weights, [...a, ...b], stride), half),
  };
}

/** Of half a cycle on either side of a hill: what scans and their climbs reach. */
const KEPT = 0.8;

/**
 * The same bench without its spectra: the products around its hills are summed now.
 * Shape:  a lag elsewhere lays the bench out again.
 * Units:  as `SightBench`.
 * Error:  none.
 * Fails:  never.
 * Source: a search over masses holds a hundred of them.
 */
export function withoutSpectra({ panelAt, ...bench }: SightBench, again: () => SightBench): SightBench {
  const { hills, half, halfCycle, freedom } = bench;
  const kept = new Map<number, LagPanel>();
  const indexOf = (x: number): number => Math.floor(x / (2 * half));
  const reach = freedom.time ? KEPT * halfCycle : 0;
  for (const x of hills) for (let i = indexOf(x - reach); i <= indexOf(x + reach); i++) kept.set(i, panelAt((2 * i + 1) * half));
  return withPanels(bench, kept, indexOf, again);
}

/** Apart, so that nothing here holds the first bench. */
const withPanels = (bench: Omit<SightBench, 'panelAt'>, kept: Map<number, LagPanel>, indexOf: (x: number) => number, again: () => SightBench): SightBench => ({
  ...bench,
  panelAt: (x) => {
    const panel = kept.get(indexOf(x)) ?? again().panelAt(x);
    kept.set(indexOf(x), panel);
    return panel;
  },
});
