/**
 * Runs: the members of a series, told apart by their grid spacing or by their extraction radius. A
 * claim about a series is measured run by run, by both routes, and the numbers are then compared or
 * carried to the limit, again by two ways of arithmetic.
 */
import { areal } from '../budget/areal-radius';
import type { Waveform } from '../contract/waveform';

export type Apart = 'resolution' | 'radius';

export interface Run {
  readonly waveform: Waveform;
  /** Grid spacing or areal radius, in M. */
  readonly place: number;
}

export interface Runs {
  /** Coarsest first, or nearest first. */
  readonly runs: readonly Run[];
  /** They differ in the other respect too, and others stand in their place. */
  readonly leftOut: readonly Waveform[];
  /** They do not say where they stand. */
  readonly unplaced: readonly Waveform[];
}

/** Grid spacing, or areal radius, as far as the sheet says. */
export const placeOf = (apart: Apart, waveform: Waveform): number | null => (apart === 'resolution' ? (waveform.resolution ?? null) : areal(waveform));

/** Closer than this is the same place. */
const SAME = 1e-9;

export const isSamePlace = (p: number, q: number): boolean => Math.abs(p - q) <= SAME * Math.max(p, q);

const severalPlaces = (runs: readonly Run[]): number => runs.filter(({ place }, i) => !runs.slice(0, i).some((other) => isSamePlace(other.place, place))).length;

/** Where a place is taken twice: the runs that agree in the other respect, as many places as can be; of two such sets the finer, or the one farther out. */
function ofOneKind(apart: Apart, runs: readonly Run[]): readonly Run[] {
  const other: Apart = apart === 'resolution' ? 'radius' : 'resolution';
  if (severalPlaces(runs) === runs.length) return runs;
  const sets = new Map<number | null, Run[]>();
  for (const run of runs) {
    const key = placeOf(other, run.waveform);
    sets.set(key, [...(sets.get(key) ?? []), run]);
  }
  const better = (key: number | null): number => (key === null ? -Infinity : other === 'radius' ? key : -key);
  const [best] = [...sets].sort(([p, a], [q, b]) => severalPlaces(b) - severalPlaces(a) || better(q) - better(p));
  return best?.[1] ?? [];
}

/**
 * The members of a series in order of what tells them apart.
 * Shape:  every member is in one of the three lists.
 * Units:  places in M; radii areal.
 * Error:  none.
 * Fails:  never.
 * Source: settings.md section 6; that a series may hold both kinds of runs is our reading.
 */
export function runsApart(apart: Apart, series: readonly Waveform[]): Runs {
  const placed = series.flatMap((waveform): Run[] => {
    const place = placeOf(apart, waveform);
    return place === null ? [] : [{ waveform, place }];
  });
  const kept = ofOneKind(apart, placed);
  const runs = [...kept].sort((p, q) => (apart === 'resolution' ? q.place - p.place : p.place - q.place));
  return { runs, leftOut: placed.filter((run) => !kept.includes(run)).map(({ waveform }) => waveform), unplaced: series.filter((waveform) => placeOf(apart, waveform) === null) };
}
