import { interpolatePair } from '../series/local-interpolation';
import { ENERGY_FACTOR } from './energy-on-samples';
import { energyFlux } from './flux-figure';
import type { SampledRadiation } from './news-on-samples';
import { countedNodes, type ContinuousRadiation } from './news-on-panels';

export interface FluxPeak {
  readonly timeM: number;
  /** c⁵/G. */
  readonly flux: number;
  /** The flux is largest where the interval begins or ends: beyond it may be more. */
  readonly atEdge: 'start' | 'end' | null;
}

/** A curve that varies less than this of its height has no peak; its end is taken (rule 2.10). */
const FLAT = 1e-6;
/** Samples kept on either side of the highest one. */
const MARGIN = 12;
const GOLDEN = (Math.sqrt(5) - 1) / 2;

interface Highest {
  readonly at: number;
  readonly isFlat: boolean;
}

function highest(values: Float64Array, from: number): Highest {
  let [at, top, low] = [from, -Infinity, Infinity];
  for (let i = from; i < values.length; i++) {
    // A flux that is no number must not be passed over for the next largest.
    if (Number.isNaN(values[i]!)) return { at: i, isFlat: false };
    if (values[i]! > top) [at, top] = [i, values[i]!];
    if (values[i]! < low) low = values[i]!;
  }
  return { at, isFlat: top - low <= FLAT * top };
}

/** Where the flux is no number, nothing is read around it. */
const noPeak = (timeM: number): FluxPeak => ({ timeM, flux: Number.NaN, atEdge: null });

/** Golden section: the largest value between two times around a maximum. */
function climb(f: (t: number) => number, from: number, to: number): FluxPeak {
  let [low, high] = [from, to];
  for (let pass = 0; pass < 60; pass++) {
    const [p, q] = [high - GOLDEN * (high - low), low + GOLDEN * (high - low)];
    if (f(p) < f(q)) low = p;
    else high = q;
  }
  const timeM = (low + high) / 2;
  return { timeM, flux: f(timeM), atEdge: null };
}

/**
 * Route A: largest flux after startM, on the local polynomial through the samples around the highest one.
 * Shape:  one peak; of a flat curve the end of the record.
 * Units:  startM and timeM in M; flux in c⁵/G.
 * Error:  of the stated order in the step.
 * Fails:  never for a start inside the record.
 * Source: Q15; settings.md rule 2.10.
 */
export function peakOnSamples(radiation: SampledRadiation, startM: number, order: 6 | 8): FluxPeak {
  const { axis } = radiation;
  const values = energyFlux(radiation);
  const last = axis.length - 1;
  const start = Math.max(startM, axis[0]!);
  const first = axis.findIndex((t) => t >= start);
  const { at, isFlat } = highest(values, first);
  if (!Number.isFinite(values[at]!)) return noPeak(axis[at]!);
  if (at === last || isFlat) return { timeM: axis[last]!, flux: values[last]!, atEdge: isFlat ? null : 'end' };
  const [from, to] = [Math.max(0, at - MARGIN), Math.min(axis.length, at + MARGIN + 1)];
  const near = { axis: axis.subarray(from, to), first: values.subarray(from, to), second: values.subarray(from, to) };
  const fluxAt = (t: number): number => interpolatePair(near, { t0: t, dt: 1, n: 1 }, order)[0][0]!;
  const found = climb(fluxAt, Math.max(start, axis[Math.max(0, at - 1)]!), axis[at + 1]!);
  const begins = at === first ? fluxAt(start) : -Infinity;
  return begins >= found.flux ? { timeM: start, flux: begins, atEdge: 'start' } : found;
}

function fluxOf({ modes }: ContinuousRadiation, t: Float64Array): Float64Array {
  const flux = new Float64Array(t.length);
  for (const { news } of modes) {
    const { re, im } = news(t);
    for (let i = 0; i < t.length; i++) flux[i] = flux[i]! + ENERGY_FACTOR * (re[i]! * re[i]! + im[i]! * im[i]!);
  }
  return flux;
}

/** Eight parts of the interval, then two of them, and again. */
const PARTS = 8;
const PASSES = 18;

/**
 * Route B: largest flux after startM, by splines read at the Gauss nodes and then ever more closely around the highest.
 * Shape:  one peak; of a flat curve the end of the record.
 * Units:  startM and timeM in M; flux in c⁵/G.
 * Error:  that of radiationOnPanels.
 * Fails:  never for a start inside the record.
 * Source: Q15; settings.md rule 2.10.
 */
export function peakOnPanels(radiation: ContinuousRadiation, startM: number, axis: Float64Array): FluxPeak {
  const [start, end] = [Math.max(startM, axis[0]!), axis[axis.length - 1]!];
  const { t: nodes } = countedNodes(radiation.nodes);
  let times = new Float64Array(nodes.length + 2);
  times.set(nodes, 1);
  [times[0], times[times.length - 1]] = [start, end];
  let values = fluxOf(radiation, times);
  const { at: top, isFlat } = highest(values, 0);
  if (!Number.isFinite(values[top]!)) return noPeak(times[top]!);
  if (isFlat || top === times.length - 1) return { timeM: end, flux: values[values.length - 1]!, atEdge: isFlat ? null : 'end' };
  let at = top;
  for (let pass = 0; pass < PASSES; pass++) {
    const [from, to] = [times[Math.max(0, at - 1)]!, times[Math.min(times.length - 1, at + 1)]!];
    times = Float64Array.from({ length: PARTS + 1 }, (_, k) => from + ((to - from) * k) / PARTS);
    values = fluxOf(radiation, times);
    at = highest(values, 0).at;
  }
  return { timeM: times[at]!, flux: values[at]!, atEdge: times[at]! === start ? 'start' : null };
}
