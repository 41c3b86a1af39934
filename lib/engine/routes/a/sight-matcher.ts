import type { Sight, SightMatch, SightMatcher, SightRequest } from '@/lib/engine/contract/route';
import { climbSimplex } from '@/lib/engine/series/simplex-search';
import type { Numerics } from './numerics';
import { sightBench, type SightBench } from './sight-bench';
import { Seen, type Point, type Pose } from './sight-seen';
import type { SpectrumStore } from './spectrum-store';

const AZIMUTHS = 24;
const INCLINATIONS = 19;
const KEPT_STARTS = 3;
/** Of the first steps: 1e-6 of a cycle and of a radian. */
const TOLERANCE = 2e-5;
const LAG_STEP = 0.06;
const AZIMUTH_STEP = Math.PI / 24;
const INCLINATION_STEP = Math.PI / 36;

const blind: SightMatch = { match: Number.NaN, powerA: 0, b: { inclinationRad: 0, azimuthRad: 0 }, timeShiftS: 0 };

export const nothingSeen: SightMatcher = { best: () => blind, held: () => blind };

/** Inclinations past a pole come back on the other side. */
function folded(inclinationRad: number): number {
  const turn = ((inclinationRad % (2 * Math.PI)) + 2 * Math.PI) % (2 * Math.PI);
  return turn > Math.PI ? 2 * Math.PI - turn : turn;
}

/** Between nodes of a panel, and between starting azimuths, products and norms are a little higher and lower. */
const CEILING_ROOM = 1.05;

/** By inclination: each element's largest weight over the smallest norm. */
function sizesOf(poses: readonly Pose[]): Float64Array[] {
  const rows = new Map<number, { sizes: Float64Array; norm: number }>();
  for (const { sight, weights, norm } of poses) {
    const row = rows.get(sight.inclinationRad) ?? { sizes: new Float64Array(weights.length), norm: Infinity };
    weights.forEach(({ re, im }, k) => (row.sizes[k] = Math.max(row.sizes[k]!, Math.hypot(re, im))));
    rows.set(sight.inclinationRad, { sizes: row.sizes, norm: Math.min(row.norm, norm) });
  }
  return [...rows.values()].map(({ sizes, norm }) => sizes.map((x) => x / norm));
}

export interface Top {
  readonly point: Point;
  readonly value: number;
}

/** Searches over shift and direction of b at one mass. */
export class SightSearch implements SightMatcher {
  private poses: { inclinationRad: number; list: readonly Pose[] } | null = null;
  private last: Pose | null = null;
  private sized: { poses: readonly Pose[]; sizes: readonly Float64Array[] } | null = null;

  constructor(readonly bench: SightBench) {}

  private readonly poseAt = (sight: Sight): Pose => {
    const { last, bench } = this;
    if (last !== null && last.sight.inclinationRad === sight.inclinationRad && last.sight.azimuthRad === sight.azimuthRad) return last;
    const weights = bench.b.map((weigh) => weigh(sight));
    return (this.last = { sight, weights, norm: Math.sqrt(bench.powerB(weights)) });
  };

  /** b's starting directions; with a free azimuth they are the same for every sight of one inclination. */
  private posesFor({ inclinationRad, azimuthRad }: Sight): readonly Pose[] {
    const { azimuthFree, inclinationFree } = this.bench;
    const under = inclinationFree ? 0 : inclinationRad;
    if (azimuthFree && this.poses?.inclinationRad === under) return this.poses.list;
    const inclinations = inclinationFree ? Array.from({ length: INCLINATIONS }, (_, i) => (i * Math.PI) / (INCLINATIONS - 1)) : [inclinationRad];
    const azimuths = azimuthFree ? Array.from({ length: AZIMUTHS }, (_, i) => (i * 2 * Math.PI) / AZIMUTHS) : [azimuthRad];
    const list = inclinations.flatMap((ι) => azimuths.map((φ) => this.poseAt({ inclinationRad: ι, azimuthRad: φ })));
    this.poses = { inclinationRad: under, list };
    return list;
  }

  /** The best few starts that do not lie on one hill. */
  private startsIn(scanned: readonly Top[]): Point[] {
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

  private climbed(seen: Seen, start: Point, free: { lag: boolean; azimuth: boolean; inclination: boolean }): Top {
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

  told(seen: Seen, { point, value }: Top): SightMatch {
    const { dfHz, unmovedX, scaleA, freedom } = this.bench;
    const timeShiftS = freedom.time ? (point.x - unmovedX) / dfHz : 0;
    return { match: Number.isFinite(value) ? value : Number.NaN, powerA: scaleA * seen.power, b: point.sight, timeShiftS };
  }

  seen = (a: Sight): Seen => new Seen(this.bench, this.poseAt, a);

  private get free(): { lag: boolean; azimuth: boolean; inclination: boolean } {
    const { freedom, azimuthFree, inclinationFree } = this.bench;
    return { lag: freedom.time, azimuth: azimuthFree, inclination: inclinationFree };
  }

  /** What no direction and shift of b near the hills exceeds, to a twentieth. */
  ceiling(seen: Seen, a: Sight): number {
    const poses = this.posesFor(a);
    if (this.sized?.poses !== poses) this.sized = { poses, sizes: sizesOf(poses) };
    return CEILING_ROOM * seen.ceiling(this.sized.sizes);
  }

  /** The highest of the starting directions, roughly. */
  rough = (seen: Seen, a: Sight): Top | null => seen.rough(this.posesFor(a));

  /** The top of the hill on which b stands when seen from about there, whatever its shift. */
  near(seen: Seen, from: Sight): Top | null {
    const start = seen.rough([this.poseAt(from)]);
    return start === null ? null : this.climbed(seen, start.point, this.free);
  }

  best(a: Sight): SightMatch {
    const { free } = this;
    const seen = this.seen(a);
    const tops = this.startsIn(seen.scan(this.posesFor(a))).map((start) => this.climbed(seen, start, free));
    return this.told(
      seen,
      tops.reduce((p, q) => (q.value > p.value ? q : p)),
    );
  }

  held(a: Sight, at: SightMatch): SightMatch {
    const { freedom, dfHz, unmovedX } = this.bench;
    const seen = this.seen(a);
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
  return bench === null ? nothingSeen : new SightSearch(bench);
}
