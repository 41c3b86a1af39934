import type { Side, Sight, SightMatch, SightMatcher, SightRequest } from '../../contract/route';
import { simplexMaximum } from './climb-hill';
import { groundOf, tableOn, type Table } from './sight-table';
import { View, type Tried } from './sight-view';
import type { RouteBKnobs, Source } from './spectrum';

/** Rule 2.7: 24 azimuths, 19 inclinations, refined to 1e-5. */
const AZIMUTHS = 24;
const INCLINATIONS = 19;
const REFINED = 1e-6;
const REFINED_STARTS = 3;
/** Shifts tried over one reach of a series, over six tenths of half a cycle on either side: beyond, another azimuth of b does the same. */
const TRIED_PER_REACH = 3;

export function startingSights({ freedom }: Table, { inclinationRad, azimuthRad }: Sight): Sight[] {
  const inclinations = freedom.inclination ? Array.from({ length: INCLINATIONS }, (_, i) => (Math.PI * i) / (INCLINATIONS - 1)) : [inclinationRad];
  const azimuths = freedom.azimuth ? Array.from({ length: AZIMUTHS }, (_, i) => azimuthRad + (2 * Math.PI * i) / AZIMUTHS) : [azimuthRad];
  return inclinations.flatMap((ι) => azimuths.map((φ) => ({ inclinationRad: ι, azimuthRad: φ })));
}

export function shiftsAround({ start, reachS, halfCycleS, freedom }: Table): number[] {
  if (!freedom.time) return [start];
  const step = reachS / TRIED_PER_REACH;
  const n = Math.ceil((0.6 * halfCycleS) / step);
  return Array.from({ length: 2 * n + 1 }, (_, i) => start + (i - n) * step);
}

const into = (x: number, low: number, high: number): number => Math.min(Math.max(x, low), high);

/** b's angles and shift together: shifts count in half cycles, so that a simplex sees them like angles. */
export function refined(view: View, table: Table, start: Tried): Tried {
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

const blind: SightMatch = { match: Number.NaN, powerA: 0, b: { inclinationRad: 0, azimuthRad: 0 }, timeShiftS: 0 };
export const nothingSeen: SightMatcher = { best: () => blind, held: () => blind };

/** In the words of the contract. */
export const told = ({ table, power }: View, { value, sight, shiftS }: Tried): SightMatch => ({
  match: value,
  powerA: 2 * power,
  b: sight,
  timeShiftS: table.freedom.time ? shiftS - table.unmoved : 0,
});

/**
 * Matches of two waveforms from many sights by route B: correlations of all pairs of modes as power series in the shift.
 * Shape:  see SightMatcher.
 * Units:  dimensionless; powers as SNR²; shifts in s.
 * Error:  series to 1e-12 of the content; angles and shifts to 1e-6 of a radian and of half a cycle, which enters squared.
 * Fails:  never; a side that is silent gives NaN.
 * Source: settings.md rule 2.7; our derivation.
 */
export function sightMatcher(request: SightRequest, sourceOf: (side: Side) => Source, knobs: RouteBKnobs): SightMatcher {
  const ground = groundOf(request, [request.b], sourceOf, knobs);
  const table = ground === null ? null : tableOn(ground, request.b, sourceOf);
  return table === null ? nothingSeen : matcherOn(table);
}

/** The same on a table that is there already. */
export function matcherOn(table: Table): SightMatcher {
  const shifts = shiftsAround(table);
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
