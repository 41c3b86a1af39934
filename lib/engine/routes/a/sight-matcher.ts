import type { Sight, SightMatch, SightMatcher, SightRequest } from '@/lib/engine/contract/route';
import { climbSimplex } from '@/lib/engine/series/simplex-search';
import { interpolationWeights, NODES, chebyshevPoints, type LagPanel } from './lag-panels';
import type { Numerics } from './numerics';
import { sightBench, type SightBench, type Weight } from './sight-bench';
import type { SpectrumStore } from './spectrum-store';

const AZIMUTHS = 24;
const INCLINATIONS = 19;
const KEPT_STARTS = 3;
/** Of the first steps: 1e-6 of a cycle and of a radian. */
const TOLERANCE = 2e-5;
const LAG_STEP = 0.06;
/** Of half a cycle on either side of a hill: further away another azimuth of b does the same. */
const SCANNED = 0.5;
const AZIMUTH_STEP = Math.PI / 24;
const INCLINATION_STEP = Math.PI / 36;

/** b from one direction. */
interface Pose {
  readonly sight: Sight;
  readonly weights: readonly Weight[];
  readonly norm: number;
}

interface Point {
  readonly x: number;
  readonly sight: Sight;
}

const blind: SightMatch = { match: Number.NaN, powerA: 0, b: { inclinationRad: 0, azimuthRad: 0 }, timeShiftS: 0 };

/** Inclinations past a pole come back on the other side. */
function folded(inclinationRad: number): number {
  const turn = ((inclinationRad % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
  return turn > Math.PI ? 2 * Math.PI - turn : turn;
}

/** One sight of a: its products with every element of b, by panel. */
class Seen {
  private readonly sums = new Map<LagPanel, Float64Array>();
  private readonly row = new Float64Array(NODES);
  readonly power: number;
  private readonly weights: readonly Weight[];

  constructor(
    private readonly bench: SightBench,
    private readonly poseAt: (sight: Sight) => Pose,
    sight: Sight,
  ) {
    this.weights = bench.a.map((element) => element.weigh(sight));
    this.power = bench.powerA(this.weights);
  }

  private sumsOn(panel: LagPanel): Float64Array {
    const known = this.sums.get(panel);
    if (known) return known;
    const n = 2 * NODES * this.bench.b.length;
    const sums = new Float64Array(n);
    this.weights.forEach(({ re, im }, j) => {
      for (let i = 0; i < n; i += 2) {
        const [p, q] = [panel.values[j * n + i]!, panel.values[j * n + i + 1]!];
        sums[i]! += re * p - im * q;
        sums[i + 1]! += re * q + im * p;
      }
    });
    this.sums.set(panel, sums);
    return sums;
  }

  /** Σ over the nodes with these weights, and over b's elements with the conjugates of the pose's. */
  private product(sums: Float64Array, pose: Pose, row: Float64Array): number {
    let [re, im] = [0, 0];
    pose.weights.forEach((w, k) => {
      let [p, q] = [0, 0];
      for (let n = 0, at = 2 * NODES * k; n < NODES; n++, at += 2) {
        p += row[n]! * sums[at]!;
        q += row[n]! * sums[at + 1]!;
      }
      re += w.re * p + w.im * q;
      im += w.re * q - w.im * p;
    });
    const size = this.bench.freedom.turn ? Math.hypot(re, im) : re;
    return size / (Math.sqrt(this.power) * pose.norm);
  }

  valueAt({ x, sight }: Point): number {
    const panel = this.bench.panelAt(x);
    interpolationWeights((x - panel.middle) / this.bench.half, this.row);
    const value = this.product(this.sumsOn(panel), this.poseAt(sight), this.row);
    return Number.isFinite(value) ? value : -Infinity;
  }

  /** Values at all nodes of the panels around the hills, for every pose. */
  scan(poses: readonly Pose[]): { point: Point; value: number }[] {
    const { hills, half, halfCycle, freedom } = this.bench;
    const found: { point: Point; value: number }[] = [];
    const reach = Math.ceil((SCANNED * halfCycle) / (2 * half));
    const middles = new Set(hills.flatMap((x) => Array.from({ length: 2 * reach + 1 }, (_, i) => this.bench.panelAt(x + 2 * (i - reach) * half).middle)));
    const lags = freedom.time ? [...middles].flatMap((middle) => Array.from(chebyshevPoints, (y) => middle + half * y).filter((_, i) => i % 3 === 1)) : hills;
    for (const { sight } of poses) for (const x of lags) found.push({ point: { x, sight }, value: this.valueAt({ x, sight }) });
    return found.sort((p, q) => q.value - p.value);
  }
}

class Search implements SightMatcher {
  private poses: { inclinationRad: number; list: readonly Pose[] } | null = null;
  private last: Pose | null = null;

  constructor(private readonly bench: SightBench) {}

  private readonly poseAt = (sight: Sight): Pose => {
    const { last, bench } = this;
    if (last !== null && last.sight.inclinationRad === sight.inclinationRad && last.sight.azimuthRad === sight.azimuthRad) return last;
    const weights = bench.b.map((element) => element.weigh(sight));
    return (this.last = { sight, weights, norm: Math.sqrt(bench.powerB(weights)) });
  };

  /** b's starting directions; with a free azimuth they are the same for every sight of one inclination. */
  private posesFor({ inclinationRad, azimuthRad }: Sight): readonly Pose[] {
    const { azimuthFree, inclinationFree } = this.bench;
    if (azimuthFree && this.poses?.inclinationRad === inclinationRad) return this.poses.list;
    const inclinations = inclinationFree ? Array.from({ length: INCLINATIONS }, (_, i) => (i * Math.PI) / (INCLINATIONS - 1)) : [inclinationRad];
    const azimuths = azimuthFree ? Array.from({ length: AZIMUTHS }, (_, i) => (i * 2 * Math.PI) / AZIMUTHS) : [azimuthRad];
    const list = inclinations.flatMap((ι) => azimuths.map((φ) => this.poseAt({ inclinationRad: ι, azimuthRad: φ })));
    this.poses = { inclinationRad, list };
    return list;
  }

  /** The best few starts that do not lie on one hill. */
  private startsIn(scanned: readonly { point: Point; value: number }[]): Point[] {
    const kept: Point[] = [];
    const apart = (p: Point, q: Point): boolean => {
      const turn = Math.abs(Math.sin((p.sight.azimuthRad - q.sight.azimuthRad) / 2)) > Math.sin(1.5 * AZIMUTH_STEP);
      return turn || Math.abs(p.x - q.x) > this.bench.halfCycle / 2 || Math.abs(p.sight.inclinationRad - q.sight.inclinationRad) > 2.5 * INCLINATION_STEP;
    };
    for (const { point } of scanned) {
      if (kept.length === KEPT_STARTS) break;
      if (kept.every((other) => apart(point, other))) kept.push(point);
    }
    return kept;
  }

  private climbed(seen: Seen, start: Point, free: { lag: boolean; azimuth: boolean; inclination: boolean }): { point: Point; value: number } {
    const kinds = (['lag', 'azimuth', 'inclination'] as const).filter((kind) => free[kind]);
    if (kinds.length === 0) return { point: start, value: seen.valueAt(start) };
    const first = { lag: start.x, azimuth: start.sight.azimuthRad, inclination: start.sight.inclinationRad };
    const steps = { lag: LAG_STEP * 2 * this.bench.halfCycle, azimuth: AZIMUTH_STEP, inclination: INCLINATION_STEP };
    const pointAt = (at: readonly number[]): Point => {
      const read = (kind: (typeof kinds)[number]): number => (free[kind] ? at[kinds.indexOf(kind)]! : first[kind]);
      return { x: read('lag'), sight: { inclinationRad: folded(read('inclination')), azimuthRad: read('azimuth') } };
    };
    const top = climbSimplex(
      (at) => seen.valueAt(pointAt(at)),
      kinds.map((kind) => first[kind]),
      kinds.map((kind) => steps[kind]),
      { tolerance: TOLERANCE, evaluations: 160 * kinds.length },
    );
    return { point: pointAt(top.at), value: top.value };
  }

  private told(seen: Seen, { point, value }: { point: Point; value: number }): SightMatch {
    const { dfHz, unmovedX, scaleA, freedom } = this.bench;
    const timeShiftS = freedom.time ? (point.x - unmovedX) / dfHz : 0;
    return { match: Number.isFinite(value) ? value : Number.NaN, powerA: scaleA * seen.power, b: point.sight, timeShiftS };
  }

  best(a: Sight): SightMatch {
    const { freedom, azimuthFree, inclinationFree } = this.bench;
    const seen = new Seen(this.bench, this.poseAt, a);
    const free = { lag: freedom.time, azimuth: azimuthFree, inclination: inclinationFree };
    const tops = this.startsIn(seen.scan(this.posesFor(a))).map((start) => this.climbed(seen, start, free));
    return this.told(
      seen,
      tops.reduce((p, q) => (q.value > p.value ? q : p)),
    );
  }

  held(a: Sight, at: SightMatch): SightMatch {
    const { freedom, dfHz, unmovedX } = this.bench;
    const seen = new Seen(this.bench, this.poseAt, a);
    const x = freedom.time ? at.timeShiftS * dfHz + unmovedX : unmovedX;
    return this.told(seen, this.climbed(seen, { x, sight: at.b }, { lag: freedom.time, azimuth: false, inclination: false }));
  }
}

/**
 * Matches of two waveforms from many sights by route A: products of modes at Chebyshev lags, summed once over the bins.
 * Shape:  see SightMatcher.
 * Units:  dimensionless; powers as SNR²; shifts in s.
 * Error:  1e-11 of the match where the noise does not weigh the lags' panels unevenly; angles to 1e-6, which enters squared.
 * Fails:  never; a side that is silent gives NaN.
 * Source: settings.md rule 2.7 (24 azimuths, 19 inclinations).
 */
export function sightMatcher(request: SightRequest, store: SpectrumStore, numerics: Numerics): SightMatcher {
  const bench = sightBench(request, store, numerics);
  return bench === null ? { best: () => blind, held: () => blind } : new Search(bench);
}
