import type { Side, Sight, SightRequest } from '../../contract/route';
import { bestShift, productsOf } from './best-shift';
import { normSquared, type Channel } from './channels';
import type { FrequencyNodes } from './frequency-panels';
import { freedomOf, type Freedom } from './moving-side';
import { nodesFor } from './shared-nodes';
import { SERIES_PHASE, shiftSeries, type ShiftSeries } from './shift-series';
import { partsOf, type Complex, type Element } from './sight-elements';
import type { RouteBKnobs, Source } from './spectrum';

/** Share of the power that decides how far a series reaches. */
const BULK = 0.999;

/** Two waveforms at one mass: their parts, norms and correlations by shift. */
export interface Table {
  readonly a: readonly Element[];
  readonly b: readonly Element[];
  readonly formA: (c: readonly Complex[]) => number;
  readonly formB: (c: readonly Complex[]) => number;
  readonly freedom: Freedom;
  /** Shift, between the records' centres, around which searches start. */
  readonly start: number;
  /** Shift between centres at which the files stand by their own times. */
  readonly unmoved: number;
  readonly reachS: number;
  readonly halfCycleS: number;
  readonly seriesAt: (shiftS: number) => ShiftSeries;
}

/** Σ_jk c_j c_k* ⟨j|k⟩ over both halves. */
function formOf(parts: readonly Element[], weight: Float64Array): (c: readonly Complex[]) => number {
  const table = parts.map((u) =>
    parts.map((v): Complex => {
      let [re, im] = [0, 0];
      for (let i = 0; i < weight.length; i++) {
        re += weight[i]! * (u.pRe[i]! * v.pRe[i]! + u.pIm[i]! * v.pIm[i]! + u.qRe[i]! * v.qRe[i]! + u.qIm[i]! * v.qIm[i]!);
        im += weight[i]! * (u.pIm[i]! * v.pRe[i]! - u.pRe[i]! * v.pIm[i]! - u.qIm[i]! * v.qRe[i]! + u.qRe[i]! * v.qIm[i]!);
      }
      return [re, im];
    }),
  );
  return (c) => {
    let sum = 0;
    c.forEach(([p, q], j) => c.forEach(([r, s], k) => (sum += (p * r + q * s) * table[j]![k]![0] - (q * r - p * s) * table[j]![k]![1])));
    return sum;
  };
}

/** The frequency below which the bulk of a's power lies, and its mean. */
function spread(parts: readonly Element[], f: Float64Array, weight: Float64Array): { mean: number; bulk: number } {
  const power = Array.from(f, (_, i) => parts.reduce((sum, u) => sum + weight[i]! * (u.pRe[i]! ** 2 + u.pIm[i]! ** 2 + u.qRe[i]! ** 2 + u.qIm[i]! ** 2), 0));
  const all = power.reduce((p, q) => p + q, 0);
  let [sum, i] = [0, 0];
  while (i < f.length - 1 && (sum += power[i]!) < BULK * all) i++;
  return { mean: power.reduce((total, p, k) => total + p * f[k]!, 0) / all, bulk: f[i]! };
}

const FIRST: Sight = { inclinationRad: 1.1, azimuthRad: 0.5 };
/** Turns of b by which the highest hill over all shifts is looked for. */
const FIRST_TURNS = [0, 1, 2, 3].map((k) => (k * Math.PI) / 8);

/** All parts along one direction, as channels. */
function wholeFrom(parts: readonly Element[], sight: Sight): readonly Channel[] {
  const n = parts[0]!.pRe.length;
  const sums = Array.from({ length: 4 }, () => new Float64Array(n));
  const [pRe, pIm, qRe, qIm] = sums as [Float64Array, Float64Array, Float64Array, Float64Array];
  for (const part of parts) {
    const [c, s] = part.weigh(sight);
    for (let i = 0; i < n; i++) {
      pRe[i] = pRe[i]! + c * part.pRe[i]! - s * part.pIm[i]!;
      pIm[i] = pIm[i]! + c * part.pIm[i]! + s * part.pRe[i]!;
      // q is a conjugate, and turns the other way.
      qRe[i] = qRe[i]! + c * part.qRe[i]! + s * part.qIm[i]!;
      qIm[i] = qIm[i]! + c * part.qIm[i]! - s * part.qRe[i]!;
    }
  }
  return [
    { prefactor: 2, turn: 1, re: pRe, im: pIm },
    { prefactor: 2, turn: -1, re: qRe, im: qIm },
  ];
}

/** The highest hill of whole waveforms over all shifts, for a few turns of b: there the series begin. */
function startingShift(parts: readonly [readonly Element[], readonly Element[]], { f, weight }: FrequencyNodes, freedom: Freedom, inclinationRad: number, reachS: number): number {
  const sight = { ...FIRST, inclinationRad };
  const a = wholeFrom(parts[0], sight);
  const turns = freedom.azimuth ? FIRST_TURNS : [0];
  const peaks = turns.map((turn) => {
    const b = wholeFrom(parts[1], { ...sight, azimuthRad: sight.azimuthRad + turn });
    const peak = bestShift(productsOf(a, b, weight), f, reachS, freedom.turn ? 'modulus' : 'real');
    return { ...peak, value: peak.value / Math.sqrt(normSquared(b, weight)) };
  });
  return peaks.reduce((p, q) => (q.value > p.value ? q : p)).shiftS;
}

/** What every mass of b shares: nodes, and a taken apart. */
export interface Ground {
  readonly sourceA: Source;
  readonly nodes: FrequencyNodes;
  readonly a: readonly Element[];
  readonly formA: (c: readonly Complex[]) => number;
  readonly freedom: Freedom;
  readonly inclinationRad: number | null;
  readonly meanHz: number;
  readonly bulkHz: number;
}

/**
 * Nodes on which a stands beside b at each of the masses that it may take.
 * Shape:  null where nothing lies in the band, or a is silent there.
 * Units:  Hz.
 * Error:  as the knobs say.
 * Fails:  never.
 * Source: settings.md rules 2.5 and 2.7.
 */
export function groundOf(request: SightRequest, masses: readonly Side[], sourceOf: (side: Side) => Source, knobs: RouteBKnobs): Ground | null {
  const { a, b, band, inclinationRad } = request;
  const freedom = freedomOf({ a, b, band, response: 'complex', maximise: request.maximise, templateMassRange: [1, 1], rescale: (side) => side });
  const sourceA = sourceOf(a);
  const sources = masses.map(sourceOf);
  // A free shift reaches as far as the records overlap at all.
  const extraLagS = Math.max(...sources.map((source) => (freedom.time ? Math.min(sourceA.spanS, source.spanS) : Math.abs(source.centreS - sourceA.centreS))));
  const nodes = nodesFor([sourceA, ...sources], band, knobs, { allModes: true, extraLagS });
  const { f, weight } = nodes;
  if (f.length === 0) return null;
  const parts = partsOf(a, sourceA, f, weight, inclinationRad);
  if (parts.length === 0) return null;
  const { mean, bulk } = spread(parts, f, weight);
  return { sourceA, nodes, a: parts, formA: formOf(parts, weight), freedom, inclinationRad, meanHz: mean, bulkHz: bulk };
}

/** b at one mass beside a; null where it is silent. */
export function tableOn(ground: Ground, b: Side, sourceOf: (side: Side) => Source): Table | null {
  const { sourceA, nodes, a, formA, freedom, inclinationRad, meanHz, bulkHz } = ground;
  const { f, weight } = nodes;
  const source = sourceOf(b);
  const unmoved = source.centreS - sourceA.centreS;
  const parts = partsOf(b, source, f, weight, freedom.inclination ? null : inclinationRad);
  if (parts.length === 0) return null;
  const start = freedom.time ? startingShift([a, parts], nodes, freedom, inclinationRad ?? FIRST.inclinationRad, (sourceA.spanS + source.spanS) / 2) : unmoved;
  const reachS = SERIES_PHASE / (2 * Math.PI * bulkHz);
  const made = new Map<number, ShiftSeries>();
  const seriesAt = (shiftS: number): ShiftSeries => {
    const index = Math.round(shiftS / (2 * reachS));
    const known = made.get(index) ?? shiftSeries(a, parts, f, weight, 2 * index * reachS, reachS);
    made.set(index, known);
    return known;
  };
  return { a, b: parts, formA, formB: formOf(parts, weight), freedom, start, unmoved, reachS, halfCycleS: 0.5 / meanHz, seriesAt };
}
