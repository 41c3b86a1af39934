import type { LagAnchor, LagGrid } from './lag-anchor';

/** Two anchors with the masses between them, and the lags at which either is high, highest first. */
export interface Bracket<Mark = unknown> {
  readonly low: LagAnchor<Mark>;
  readonly high: LagAnchor<Mark>;
  readonly places: readonly number[];
  readonly heights: readonly number[];
  /** No lag left out is higher at either anchor. */
  readonly rest: number;
}

/** The grid of lags sees every stride-th bin: what that leaves open of ‖a‖‖b‖, and a curve's bend between two nodes. */
const GRID_SLACK = 0.01;

/** The lags of two anchors, each with the larger of both heights; where one did not list a lag, it is at most as high there as what it left out. */
export function bracketOf(low: LagAnchor, high: LagAnchor): Bracket {
  const listed = [...new Set([...low.heights.keys(), ...high.heights.keys()])];
  const heightAt = (i: number): number => Math.max(low.heights.get(i) ?? low.rest, high.heights.get(i) ?? high.rest);
  const found = listed.map((place) => ({ place, height: heightAt(place) })).sort((p, q) => q.height - p.height || p.place - q.place);
  return { low, high, places: found.map(({ place }) => place), heights: found.map(({ height }) => height), rest: Math.max(low.rest, high.rest) };
}

/** Between two lags of the grid |ẑ| can stand this much above the nearer: ½ (half a step)² × the largest bend. */
export function riseBetween({ low, high }: Bracket, { size, stride }: LagGrid): number {
  const turn = Math.PI / (size * stride);
  return 0.5 * turn * turn * 1.5 * Math.max(low.spread, high.spread);
}

/**
 * Lags of the grid at which the product could still reach `value`, further than a step from where it stands.
 * Shape:  shifts from `x` in cycles per bin; null when too many are left to look at.
 * Units:  cycles per bin.
 * Error:  as the bound.
 * Fails:  never.
 * Source: a lag that is lower than `value` by more than the bound at both anchors is lower between them.
 */
export function rivals(bracket: Bracket, { size, stride }: LagGrid, value: number, bound: number, x: number): number[] | null {
  const least = value - bound - GRID_SLACK;
  if (bracket.rest >= least) return null;
  const cells = size * stride;
  const found: number[] = [];
  for (let r = 0; r < bracket.places.length && bracket.heights[r]! >= least; r++) {
    const away = bracket.places[r]! / cells - x;
    const delta = away - Math.round(away * stride) / stride;
    if (Math.abs(delta) * cells > 1.01) found.push(delta);
    if (found.length > MOST_RIVALS) return null;
  }
  return found;
}

const MOST_RIVALS = 32;
