import type { Side, Sight, SightMatch, SightMatcher, SightRequest } from '../../contract/route';
import { bestShift, productsOf } from './best-shift';
import { normSquared, type Channel } from './channels';
import { goldenMaximum, simplexMaximum } from './climb-hill';
import type { FrequencyNodes } from './frequency-panels';
import { freedomOf, type Freedom } from './moving-side';
import { nodesFor } from './shared-nodes';
import { SERIES_PHASE, shiftSeries, TERMS, type ShiftSeries } from './shift-series';
import { partsOf, type Complex, type Element } from './sight-elements';
import type { RouteBKnobs, Source } from './spectrum';

/** Rule 2.7: 24 azimuths, 19 inclinations, refined to 1e-5. */
const AZIMUTHS = 24;
const INCLINATIONS = 19;
const REFINED = 1e-6;
const REFINED_STARTS = 3;
/** Share of the power that decides how far a series reaches. */
const BULK = 0.999;
/** Shifts tried over one reach of a series, over six tenths of half a cycle on either side: beyond, another azimuth of b does the same. */
const TRIED_PER_REACH = 3;

interface Table {
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

function tableOf(request: SightRequest, sourceOf: (side: Side) => Source, knobs: RouteBKnobs): Table | null {
  const { a, b, band, inclinationRad } = request;
  const freedom = freedomOf({ a, b, band, response: 'complex', maximise: request.maximise, templateMassRange: [1, 1], rescale: (side) => side });
  const [sourceA, sourceB] = [sourceOf(a), sourceOf(b)];
  const unmoved = sourceB.centreS - sourceA.centreS;
  // A free shift reaches as far as the records overlap at all.
  const extraLagS = freedom.time ? Math.min(sourceA.spanS, sourceB.spanS) : Math.abs(unmoved);
  const nodes = nodesFor([sourceA, sourceB], band, knobs, { allModes: true, extraLagS });
  const { f, weight } = nodes;
  if (f.length === 0) return null;
  const parts = [partsOf(a, sourceA, f, weight, inclinationRad), partsOf(b, sourceB, f, weight, freedom.inclination ? null : inclinationRad)] as const;
  if (parts.some((list) => list.length === 0)) return null;
  const start = freedom.time ? startingShift(parts, nodes, freedom, inclinationRad ?? FIRST.inclinationRad, (sourceA.spanS + sourceB.spanS) / 2) : unmoved;
  const { mean, bulk } = spread(parts[0], f, weight);
  const reachS = SERIES_PHASE / (2 * Math.PI * bulk);
  const made = new Map<number, ShiftSeries>();
  const seriesAt = (shiftS: number): ShiftSeries => {
    const index = Math.round(shiftS / (2 * reachS));
    const known = made.get(index) ?? shiftSeries(parts[0], parts[1], f, weight, 2 * index * reachS, reachS);
    made.set(index, known);
    return known;
  };
  const halfCycleS = 0.5 / mean;
  return { a: parts[0], b: parts[1], formA: formOf(parts[0], weight), formB: formOf(parts[1], weight), freedom, start, unmoved, reachS, halfCycleS, seriesAt };
}

interface Tried {
  readonly sight: Sight;
  readonly shiftS: number;
  readonly value: number;
}

/** a from one direction against b from any, as polynomials in the shift. */
class View {
  private readonly sums = new Map<ShiftSeries, Float64Array>();
  private readonly weights: readonly Complex[];
  readonly power: number;

  constructor(
    private readonly table: Table,
    sight: Sight,
  ) {
    this.weights = table.a.map((part) => part.weigh(sight));
    this.power = table.formA(this.weights);
  }

  private sumsOf(series: ShiftSeries): Float64Array {
    const known = this.sums.get(series);
    if (known) return known;
    const n = 2 * TERMS * this.table.b.length;
    const out = new Float64Array(n);
    this.weights.forEach(([re, im], j) => {
      for (let i = 0; i < n; i += 2) {
        const [x, y] = [series.coefficients[j * n + i]!, series.coefficients[j * n + i + 1]!];
        out[i] = out[i]! + re * x - im * y;
        out[i + 1] = out[i + 1]! + re * y + im * x;
      }
    });
    this.sums.set(series, out);
    return out;
  }

  /** The polynomial of one pose on one series. */
  private polynomial(series: ShiftSeries, c: readonly Complex[]): Float64Array {
    const sums = this.sumsOf(series);
    const out = new Float64Array(2 * TERMS);
    c.forEach(([re, im], k) => {
      for (let i = 0; i < out.length; i += 2) {
        const [x, y] = [sums[2 * TERMS * k + i]!, sums[2 * TERMS * k + i + 1]!];
        out[i] = out[i]! + re * x + im * y;
        out[i + 1] = out[i + 1]! + re * y - im * x;
      }
    });
    return out;
  }

  private read(polynomial: Float64Array, y: number): number {
    let [re, im] = [0, 0];
    for (let i = polynomial.length - 2; i >= 0; i -= 2) [re, im] = [re * y + polynomial[i]!, im * y + polynomial[i + 1]!];
    return this.table.freedom.turn ? Math.hypot(re, im) : re;
  }

  /** The match with b from a direction at given shifts, the best of them. */
  at(sight: Sight, shifts: readonly number[]): Tried {
    const { table } = this;
    const c = table.b.map((part) => part.weigh(sight));
    const scale = Math.sqrt(this.power * table.formB(c));
    const known = new Map<ShiftSeries, Float64Array>();
    const tried = shifts.map((shiftS): Tried => {
      const series = table.seriesAt(shiftS);
      const polynomial = known.get(series) ?? this.polynomial(series, c);
      known.set(series, polynomial);
      return { sight, shiftS, value: this.read(polynomial, (shiftS - series.centre) / table.reachS) / scale };
    });
    return tried.reduce((best, next) => (next.value > best.value ? next : best));
  }

  /** The hill that a shift stands on, by golden section. */
  hill(sight: Sight, shiftS: number, within: number): Tried {
    const top = goldenMaximum((s) => this.at(sight, [s]).value, shiftS - within, shiftS + within, 1e-7 * this.table.halfCycleS);
    return this.at(sight, [top.x[0]!]);
  }
}

function startingSights({ freedom }: Table, { inclinationRad, azimuthRad }: Sight): Sight[] {
  const inclinations = freedom.inclination ? Array.from({ length: INCLINATIONS }, (_, i) => (Math.PI * i) / (INCLINATIONS - 1)) : [inclinationRad];
  const azimuths = freedom.azimuth ? Array.from({ length: AZIMUTHS }, (_, i) => azimuthRad + (2 * Math.PI * i) / AZIMUTHS) : [azimuthRad];
  return inclinations.flatMap((ι) => azimuths.map((φ) => ({ inclinationRad: ι, azimuthRad: φ })));
}

function shiftsAround({ start, reachS, halfCycleS, freedom }: Table): number[] {
  if (!freedom.time) return [start];
  const step = reachS / TRIED_PER_REACH;
  const n = Math.ceil((0.6 * halfCycleS) / step);
  return Array.from({ length: 2 * n + 1 }, (_, i) => start + (i - n) * step);
}

const into = (x: number, low: number, high: number): number => Math.min(Math.max(x, low), high);

/** b's angles and shift together: shifts count in half cycles, so that a simplex sees them like angles. */
function refined(view: View, table: Table, start: Tried): Tried {
  const { freedom, halfCycleS } = table;
  const free = [
    ...(freedom.time ? [{ from: start.shiftS / halfCycleS, step: 0.1 }] : []),
    ...(freedom.azimuth ? [{ from: start.sight.azimuthRad, step: Math.PI / AZIMUTHS }] : []),
    ...(freedom.inclination ? [{ from: start.sight.inclinationRad, step: start.sight.inclinationRad > 3 ? -0.09 : 0.09 }] : []),
  ];
  if (free.length === 0) return start;
  if (free.length === 1 && freedom.time) return view.hill(start.sight, start.shiftS, halfCycleS / 4);
  const read = (x: readonly number[]): Tried => {
    const left = [...x];
    const shiftS = freedom.time ? left.shift()! * halfCycleS : start.shiftS;
    const azimuthRad = freedom.azimuth ? left.shift()! : start.sight.azimuthRad;
    const inclinationRad = freedom.inclination ? into(left.shift()!, 0, Math.PI) : start.sight.inclinationRad;
    return view.at({ inclinationRad, azimuthRad }, [shiftS]);
  };
  const climb = (from: readonly number[], steps: readonly number[]) => simplexMaximum((x) => read(x).value, from, steps, (x) => x, REFINED);
  const first = climb(
    free.map(({ from }) => from),
    free.map(({ step }) => step),
  );
  // Once more from the top with a smaller simplex: a first one may have gone flat on a ridge.
  const again = climb(
    first.x,
    free.map(({ step }) => step / 16),
  );
  return read(again.x);
}

function startsOf(tried: readonly Tried[]): Tried[] {
  const kept: Tried[] = [];
  const near = (p: Tried, q: Tried): boolean => Math.abs(Math.sin((p.sight.azimuthRad - q.sight.azimuthRad) / 2)) < Math.sin(Math.PI / AZIMUTHS) * 1.1 && Math.abs(p.sight.inclinationRad - q.sight.inclinationRad) < 0.3;
  for (const next of [...tried].sort((p, q) => q.value - p.value)) {
    if (kept.length === REFINED_STARTS) break;
    if (!kept.some((other) => near(other, next))) kept.push(next);
  }
  return kept;
}

/**
 * Matches of two waveforms from many sights by route B: correlations of all pairs of modes as power series in the shift.
 * Shape:  see SightMatcher.
 * Units:  dimensionless; powers as SNR²; shifts in s.
 * Error:  series to 1e-12 of the content; angles and shifts to 1e-6 of a radian and of half a cycle, which enters squared.
 * Fails:  never; a side that is silent gives NaN.
 * Source: settings.md rule 2.7; our derivation.
 */
export function sightMatcher(request: SightRequest, sourceOf: (side: Side) => Source, knobs: RouteBKnobs): SightMatcher {
  const table = tableOf(request, sourceOf, knobs);
  if (table === null) {
    const blind: SightMatch = { match: Number.NaN, powerA: 0, b: { inclinationRad: 0, azimuthRad: 0 }, timeShiftS: 0 };
    return { best: () => blind, held: () => blind };
  }
  const shifts = shiftsAround(table);
  const told = (view: View, { value, sight, shiftS }: Tried): SightMatch => ({ match: value, powerA: 2 * view.power, b: sight, timeShiftS: table.freedom.time ? shiftS - table.unmoved : 0 });
  return {
    best: (a) => {
      const view = new View(table, a);
      const tops = startsOf(startingSights(table, a).map((sight) => view.at(sight, shifts))).map((start) => refined(view, table, start));
      return told(
        view,
        tops.reduce((best, next) => (next.value > best.value ? next : best)),
      );
    },
    held: (a, at) => {
      const view = new View(table, a);
      const shiftS = at.timeShiftS + table.unmoved;
      return told(view, table.freedom.time ? view.hill(at.b, shiftS, table.halfCycleS / 4) : view.at(at.b, [shiftS]));
    },
  };
}
