import type { Side, Sight, SightMatch, SightMatcher, SightRequest } from '../../contract/route';
import { hillTop, WIDE } from './mass-hill';
import { matcherOn, nothingSeen, refined, shiftsAround, startingSights, told } from './sight-matcher';
import { groundOf, tableOn, type Ground, type Table } from './sight-table';
import { View, type Tried } from './sight-view';
import type { RouteBKnobs, Source } from './spectrum';

/** Rule 2.7; one mass more than it asks for, so that ends apart the grid is no other program's. */
const MASS_RATIO = 1.02;
const MOST_MASSES = 700;
/** Without a free shift: turns, in cycles, of what lies furthest from t = 0, from one mass to the next. */
const TURNED = 0.12;
/** What untried shifts and directions may add to a rough value, and to a ceiling. */
const ROUGH = 0.03;
const CEILING_ROOM = 1.08;
/** A whole look at the grid serves sights whose angles both differ by less than this, in rad; masses that came within this of the best are kept. */
const SERVED = 0.25;
const KEPT = 0.2;
const HILLS = 3;
/** Of the match, what seven masses leave open before their step is halved. */
const SETTLED = 2e-9;
const MOST_HALVINGS = 9;
const MOST_STEPS = 200;
const ON_BOUND = 1e-6;

interface Priced {
  readonly table: Table;
  readonly shifts: readonly number[];
  /** Largest weights over the smallest norm by inclination, for one sight's starting directions. */
  sizes: { readonly key: string; readonly rows: readonly (readonly number[])[] } | null;
}

interface Hill {
  readonly log: number;
  readonly tried: Tried;
}

interface Climbed extends Hill {
  readonly view: View;
  readonly value: number;
  readonly step: number;
}

function sizesFor(table: Table, sights: readonly Sight[]): number[][] {
  const rows = new Map<number, { sizes: number[]; norm: number }>();
  for (const sight of sights) {
    const c = table.b.map((part) => part.weigh(sight));
    const row = rows.get(sight.inclinationRad) ?? { sizes: c.map(() => 0), norm: Infinity };
    row.sizes = c.map(([re, im], k) => Math.max(row.sizes[k]!, Math.hypot(re, im)));
    row.norm = Math.min(row.norm, Math.sqrt(table.formB(c)));
    rows.set(sight.inclinationRad, row);
  }
  return [...rows.values()].map(({ sizes, norm }) => sizes.map((x) => x / norm));
}

class MassSights implements SightMatcher {
  private readonly tables = new Map<number, Priced | null>();
  private readonly low: number;
  private readonly high: number;
  private whole: { readonly sight: Sight; readonly live: readonly number[] } | null = null;
  private known: { readonly log: number; readonly step: number } | null = null;

  constructor(
    private readonly request: SightRequest,
    private readonly tableAt: (factor: number) => Table | null,
    private readonly grid: readonly number[],
  ) {
    this.low = grid[0]!;
    this.high = grid[grid.length - 1]!;
  }

  private at(log: number): Priced | null {
    const known = this.tables.get(log);
    if (known !== undefined) return known;
    this.request.onStep?.();
    const table = this.tableAt(Math.exp(log));
    const made = table === null ? null : { table, shifts: shiftsAround(table), sizes: null };
    this.tables.set(log, made);
    return made;
  }

  private ceiling(priced: Priced, view: View, a: Sight): number {
    const { freedom } = priced.table;
    const key = `${freedom.inclination ? '' : a.inclinationRad}|${freedom.azimuth ? '' : a.azimuthRad}`;
    // Starting azimuths count from a's own; what they can reach together does not.
    if (priced.sizes?.key !== key) priced.sizes = { key, rows: sizesFor(priced.table, startingSights(priced.table, a)) };
    return CEILING_ROOM * view.ceiling(priced.sizes.rows, priced.shifts);
  }

  /** The grid from its most promising mass down to where nothing can be better. */
  private hills(a: Sight): Hill[] {
    const { whole } = this;
    const served = whole !== null && Math.abs(whole.sight.inclinationRad - a.inclinationRad) < SERVED && Math.abs(Math.sin((whole.sight.azimuthRad - a.azimuthRad) / 2)) < Math.sin(SERVED / 2);
    const looks = (served ? whole.live : this.grid.map((_, i) => i)).flatMap((i) => {
      const log = this.grid[i]!;
      const priced = this.at(log);
      if (priced === null) return [];
      const view = new View(priced.table, a);
      return [{ i, log, priced, view, ceiling: this.ceiling(priced, view, a) }];
    });
    let best = -Infinity;
    const tried: (Hill & { i: number })[] = [];
    for (const { i, log, priced, view, ceiling } of looks.sort((p, q) => q.ceiling - p.ceiling)) {
      if (ceiling < best - ROUGH) break;
      const top = startingSights(priced.table, a).map((sight) => view.at(sight, priced.shifts)).reduce((p, q) => (q.value > p.value ? q : p));
      best = Math.max(best, top.value);
      tried.push({ i, log, tried: top });
    }
    if (!served) this.whole = { sight: a, live: looks.flatMap(({ i, ceiling }) => (ceiling > best - KEPT ? [i] : [])) };
    const kept: (Hill & { i: number })[] = [];
    for (const hill of tried.sort((p, q) => q.tried.value - p.tried.value)) {
      if (kept.length < HILLS && hill.tried.value > best - ROUGH && kept.every(({ i }) => Math.abs(i - hill.i) > 2)) kept.push(hill);
    }
    return kept;
  }

  /** The best shift for a direction of b, and from there the top. */
  private topAt(a: Sight, log: number, b: Sight): { view: View; tried: Tried } | null {
    const priced = this.at(log);
    if (priced === null) return null;
    const view = new View(priced.table, a);
    return { view, tried: refined(view, priced.table, view.at(b, priced.shifts)) };
  }

  /** Along equal steps of the mass to their highest, through which a polynomial is laid; steps are halved until that settles. */
  private climbed(a: Sight, hill: Hill, firstStep: number): Climbed | null {
    let [step, centreLog, b] = [firstStep, hill.log, hill.tried.sight];
    for (let halvings = 0, moves = 0; ; halvings++, step /= 2) {
      const last = Math.round((this.high - this.low) / step);
      const values = new Map<number, { view: View; tried: Tried } | null>();
      const at = (i: number): number => {
        if (!values.has(i)) values.set(i, this.topAt(a, i === last ? this.high : this.low + i * step, b));
        return values.get(i)?.tried.value ?? Number.NaN;
      };
      let centre = Math.min(last, Math.max(0, Math.round((centreLog - this.low) / step)));
      for (; moves < MOST_STEPS; moves++) {
        const next = [centre - 1, centre + 1].find((i) => i >= 0 && i <= last && at(i) > at(centre));
        if (next === undefined) break;
        centre = next;
      }
      const here = values.get(centre) ?? this.topAt(a, this.low + centre * step, b);
      if (here === null) return null;
      b = here.tried.sight;
      if (last < WIDE - 1) {
        centreLog = this.low + centre * step;
        continue;
      }
      const first = Math.min(last - WIDE + 1, Math.max(0, centre - (WIDE - 1) / 2));
      const top = hillTop(Array.from({ length: WIDE }, (_, k) => at(first + k)), centre - first);
      const log = Math.min(this.high, Math.max(this.low, this.low + (first + top.at) * step));
      if (top.doubt < SETTLED || halvings >= MOST_HALVINGS) return { ...here, log, value: top.value, step: top.doubt < SETTLED / 1000 ? 2 * step : step };
      centreLog = log;
    }
  }

  best(a: Sight): SightMatch {
    const { known, grid } = this;
    const gridStep = (this.high - this.low) / (grid.length - 1);
    const tops = this.hills(a).map((hill) => {
      const near = known !== null && Math.abs(known.log - hill.log) < 2 * gridStep ? known : null;
      return this.climbed(a, near === null ? hill : { log: near.log, tried: hill.tried }, Math.min(gridStep / 2, near?.step ?? gridStep / 2));
    });
    const best = tops.reduce((p, q) => (q !== null && (p === null || q.value > p.value) ? q : p), null);
    if (best === null) return nothingSeen.best(a);
    this.known = best;
    const onBound = best.log - this.low < ON_BOUND || this.high - best.log < ON_BOUND;
    return { ...told(best.view, { ...best.tried, value: best.value }), massFactor: Math.exp(best.log), onBound };
  }

  held(a: Sight, at: SightMatch): SightMatch {
    const massFactor = at.massFactor ?? 1;
    const priced = this.at(Math.log(massFactor));
    return { ...(priced === null ? nothingSeen : matcherOn(priced.table)).held(a, at), massFactor };
  }
}

function gridOf({ b }: SightRequest, { freedom, meanHz }: Ground, [low, high]: readonly [number, number]): number[] {
  const width = Math.log(high / low);
  let steps = Math.ceil(width / Math.log(MASS_RATIO)) + 1;
  if (!freedom.time && b.waveform.domain === 'time') {
    const { axis } = b.waveform;
    const farS = high * b.secondsPerUnit * Math.max(Math.abs(axis[0]!), Math.abs(axis[axis.length - 1]!));
    steps = Math.max(steps, Math.min(MOST_MASSES, Math.ceil((width * meanHz * farS) / TURNED)));
  }
  return Array.from({ length: steps + 1 }, (_, i) => Math.log(low) + (width * i) / steps);
}

/**
 * Matches from many sights with b's mass free, by route B: a power series in the shift for every pair of modes at every mass of
 * an even grid in ln M, then at ever closer even steps about the hill.
 * Shape:  see SightMatcher.
 * Units:  as `sightMatcher`; factors on b's mass.
 * Error:  2e-9 of the match where steps of a thousandth of the grid's resolve it.
 * Fails:  never; a side that is silent at every mass gives NaN.
 * Source: settings.md rule 2.7; our derivation.
 */
export function massSights(request: SightRequest, { templateMassRange: range, rescale }: NonNullable<SightRequest['mass']>, sourceOf: (side: Side) => Source, knobs: RouteBKnobs): SightMatcher {
  const ground = groundOf(request, range.map((factor) => rescale(request.b, factor)), sourceOf, knobs);
  if (ground === null) return nothingSeen;
  return new MassSights(request, (factor) => tableOn(ground, rescale(request.b, factor), sourceOf), gridOf(request, ground, range));
}
