import type { Sight, SightMatch, SightMatcher, SightRequest } from '@/lib/engine/contract/route';
import { massGrid } from './joint-search';
import { crestOf, ladderPoints } from './mass-ladder';
import type { Numerics } from './numerics';
import { sightBench, withoutSpectra, type Growing, type SightBench } from './sight-bench';
import { nothingSeen, SightSearch, type Top } from './sight-matcher';
import type { SpectrumStore } from './spectrum-store';

/** What the rough values of a scan may be low by. */
const ROUGH_ROOM = 0.02;
/** Hills over mass that are climbed, so many grid points apart. */
const KEPT_HILLS = 3;
const APART = 2;
/** Of the match, what the last terms of the series over a stretch of masses may come to. */
const RESOLVED = 3e-10;
/** A stretch reaches one step of the grid to either side, halved so often at most. */
const MOST_HALVINGS = 7;
const MOST_STRETCHES = 64;
/** Without a shift to take it up, phase runs with the mass: rad from one mass to the next, and masses at most. */
const PHASE_STEP = 1;
const MOST_MASSES = 600;
/** A maximum this close to a bound, in ln of the mass, is on it. */
const ON_BOUND = 1e-6;

/** Around a sight whose whole grid was looked at, only masses that came near its best are looked at again. */
const NEIGHBOUR_RAD = 0.3;
const NEAR_BEST = 0.15;

type MassRequest = NonNullable<SightRequest['mass']>;

interface Found {
  readonly log: number;
  readonly value: number;
  readonly search: SightSearch;
  readonly top: Top;
}

/** Where a climb over the mass begins. */
interface Start {
  readonly log: number;
  readonly b: Sight;
  readonly halvings: number;
}

/** Angle between two directions. */
function apart(p: Sight, q: Sight): number {
  const cosine = Math.cos(p.inclinationRad) * Math.cos(q.inclinationRad) + Math.sin(p.inclinationRad) * Math.sin(q.inclinationRad) * Math.cos(p.azimuthRad - q.azimuthRad);
  return Math.acos(Math.min(1, Math.max(-1, cosine)));
}

class MassSights implements SightMatcher {
  private readonly searches = new Map<number, SightSearch | null>();
  private last: { log: number; halvings: number } | null = null;
  private looked: { sight: Sight; live: readonly number[] } | null = null;
  private readonly low: number;
  private readonly high: number;
  private readonly step: number;

  constructor(
    private readonly request: SightRequest,
    private readonly benchAt: (factor: number) => SightBench | null,
    private readonly factors: readonly number[],
  ) {
    this.low = Math.log(factors[0]!);
    this.high = Math.log(factors[factors.length - 1]!);
    this.step = (this.high - this.low) / Math.max(1, factors.length - 1);
  }

  /** Products of modes at one mass, taken when it is first asked for. */
  private at(factor: number): SightSearch | null {
    const known = this.searches.get(factor);
    if (known !== undefined) return known;
    this.request.onStep?.();
    const bench = this.benchAt(factor);
    const made = bench === null ? null : new SightSearch(withoutSpectra(bench, () => this.benchAt(factor)!));
    this.searches.set(factor, made);
    return made;
  }

  /** The grid of masses, roughly: those whose ceiling lies below what was found are not gone over. */
  private scanned(a: Sight): { g: number; top: Top }[] {
    const known = this.looked !== null && apart(this.looked.sight, a) < NEIGHBOUR_RAD ? this.looked.live : null;
    const views = (known ?? this.factors.map((_, g) => g)).flatMap((g) => {
      const search = this.at(this.factors[g]!);
      if (search === null) return [];
      const seen = search.seen(a);
      return [{ g, search, seen, ceiling: search.ceiling(seen, a) }];
    });
    views.sort((p, q) => q.ceiling - p.ceiling);
    const found: { g: number; top: Top }[] = [];
    let most = -Infinity;
    for (const { g, search, seen, ceiling } of views) {
      if (!(ceiling > most - ROUGH_ROOM)) break;
      const top = search.rough(seen, a);
      if (top === null) continue;
      found.push({ g, top });
      most = Math.max(most, top.value);
    }
    if (known === null) this.looked = { sight: a, live: views.flatMap(({ g, ceiling }) => (ceiling > most - NEAR_BEST ? [g] : [])) };
    return found.filter(({ top }) => top.value > most - ROUGH_ROOM).sort((p, q) => q.top.value - p.top.value);
  }

  /** The crest over one stretch of masses, with the direction of b at the point nearest to it. */
  private stretch(a: Sight, from: number, to: number, b: Sight): { log: number; value: number; tail: number; near: Found | null } {
    const logs = Array.from(ladderPoints, (y) => (from + to) / 2 + ((to - from) / 2) * y);
    const rows = logs.map((log): Found | null => {
      const search = this.at(Math.exp(log));
      const top = search?.near(search.seen(a), b) ?? null;
      return search === null || top === null ? null : { log, value: top.value, search, top };
    });
    const { y, value, tail } = crestOf(rows.map((row) => row?.value ?? Number.NaN));
    const log = (from + to) / 2 + ((to - from) / 2) * y;
    const near = rows.reduce((best, row) => (row !== null && (best === null || Math.abs(row.log - log) < Math.abs(best.log - log)) ? row : best), null);
    return { log: y === 1 ? to : y === -1 ? from : log, value, tail, near };
  }

  /** Follows the hill over the mass on which a start stands; stretches are halved until nine masses resolve it. */
  private climbed(a: Sight, start: Start): Found & { readonly halvings: number } | null {
    let { halvings, b } = start;
    let centre = start.log;
    for (let round = 0; ; round++) {
      const half = this.step / 2 ** halvings;
      const middle = this.low + Math.round((centre - this.low) / half) * half;
      const [from, to] = [Math.max(this.low, middle - half), Math.min(this.high, middle + half)];
      const { log, value, tail, near } = this.stretch(a, from, to, b);
      if (near === null) return null;
      b = near.top.point.sight;
      const further = (log === from && from > this.low) || (log === to && to < this.high);
      const rough = !(tail < RESOLVED) && halvings < MOST_HALVINGS;
      if (round >= MOST_STRETCHES || !(rough || further)) return { ...near, log, value, halvings: tail < RESOLVED / 1024 ? Math.max(0, halvings - 1) : halvings };
      // At an end of the stretch the next one begins in its middle.
      centre = log;
      if (rough && !further) halvings++;
    }
  }

  best(a: Sight): SightMatch {
    const { last, step } = this;
    const hills: { g: number; top: Top }[] = [];
    for (const one of this.scanned(a)) if (hills.length < KEPT_HILLS && hills.every(({ g }) => Math.abs(g - one.g) > APART)) hills.push(one);
    const tops = hills.map(({ g, top }) => {
      const log = Math.log(this.factors[g]!);
      const known = last !== null && Math.abs(last.log - log) < 1.5 * step ? last : { log, halvings: 0 };
      return this.climbed(a, { ...known, b: top.point.sight });
    });
    const best = tops.reduce((p, q) => (q !== null && (p === null || q.value > p.value) ? q : p), null);
    if (best === null) return nothingSeen.best(a);
    this.last = best;
    const told = best.search.told(best.search.seen(a), { point: best.top.point, value: best.value });
    const onBound = best.log - this.low < ON_BOUND || this.high - best.log < ON_BOUND;
    return { ...told, massFactor: Math.exp(best.log), onBound };
  }

  held(a: Sight, at: SightMatch): SightMatch {
    const massFactor = at.massFactor ?? 1;
    return { ...(this.at(massFactor) ?? nothingSeen).held(a, at), massFactor };
  }
}

/** Where no shift is free the grid follows the phase of what lies furthest from t = 0. */
function ratioOf({ b }: SightRequest, { freedom, dfHz, halfCycle }: SightBench, { templateMassRange: [low, high] }: MassRequest): number | undefined {
  if (freedom.time || b.waveform.domain !== 'time') return undefined;
  const { axis } = b.waveform;
  const farS = high * b.secondsPerUnit * Math.max(Math.abs(axis[0]!), Math.abs(axis[axis.length - 1]!));
  const meanHz = (0.5 * dfHz) / halfCycle;
  return Math.exp(Math.max(Math.log(high / low) / MOST_MASSES, Math.min(Math.log(1.02), PHASE_STEP / (2 * Math.PI * meanHz * farS))));
}

/**
 * Matches from many sights with b's mass free: products of modes tabulated at every mass of the grid, then at nine masses of a
 * stretch around the hill. A sight only combines tables.
 * Shape:  see SightMatcher.
 * Units:  as `sightMatcher`; factors on b's mass.
 * Error:  3e-10 of the match where nine masses of the shortest stretch resolve it.
 * Fails:  never; a side that is silent at every mass gives NaN.
 * Source: settings.md rule 2.7 (grid of ratio 1.02, then refined); our rule for a grid without a free shift.
 */
export function massSights(request: SightRequest, mass: MassRequest, store: SpectrumStore, numerics: Numerics): SightMatcher {
  const { waveform, secondsPerUnit } = mass.rescale(request.b, mass.templateMassRange[1]);
  const span = waveform.domain === 'frequency' ? store.frequency(waveform).span : store.time(waveform).span;
  const growing: Growing = { longestS: span * secondsPerUnit, parts: new Map() };
  const benchAt = (factor: number): SightBench | null => sightBench({ ...request, b: mass.rescale(request.b, factor) }, store, numerics, growing);
  for (const factor of massGrid(mass.templateMassRange)) {
    const first = benchAt(factor);
    if (first !== null) return new MassSights(request, benchAt, massGrid(mass.templateMassRange, ratioOf(request, first, mass)));
  }
  return nothingSeen;
}
