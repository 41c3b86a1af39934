import type { CompressedBins } from './compressed-bins';
import type { LagAnchor, LagGrid } from './lag-anchor';
import type { NodeBand } from './node-band';
import { BB, DD, RE } from './node-lag';

/** Two anchors with the masses between them, and the lags at which either is high, highest first. */
export interface Bracket {
  readonly low: LagAnchor;
  readonly high: LagAnchor;
  readonly places: readonly number[];
  readonly heights: readonly number[];
  /** No lag left out is higher at either anchor. */
  readonly rest: number;
}

/** The grid of lags sees every stride-th bin: what that leaves open of ‖a‖‖b‖, and a curve's bend between two nodes. */
const GRID_SLACK = 0.01;
const CUT_ROOM = 1.5;

/** The lags of two anchors, each with the larger of both heights; where one did not list a lag, it is at most as high there as what it left out. */
export function bracketOf(low: LagAnchor, high: LagAnchor): Bracket {
  const listed = [...new Set([...low.heights.keys(), ...high.heights.keys()])];
  const heightAt = (i: number): number => Math.max(low.heights.get(i) ?? low.rest, high.heights.get(i) ?? high.rest);
  const found = listed.map((place) => ({ place, height: heightAt(place) })).sort((p, q) => q.height - p.height || p.place - q.place);
  return { low, high, places: found.map(({ place }) => place), heights: found.map(({ height }) => height), rest: Math.max(low.rest, high.rest) };
}

/** Σ|a|² and Σ|b|² of each block of an aligned pair. */
export interface BlockPowers {
  readonly a: Float64Array;
  readonly b: Float64Array;
}

/** Sums over bins are sums over nodes: a constant is a polynomial. */
export function blockPowers({ blocks, run }: CompressedBins): BlockPowers {
  const a = new Float64Array(blocks.length);
  const b = new Float64Array(blocks.length);
  blocks.forEach(({ offset, nodes }, i) => {
    for (let j = offset; j < offset + nodes; j++) {
      a[i]! += run.columns[DD]![j]! + 2 * run.columns[RE]![j]! + run.columns[BB]![j]!;
      b[i]! += run.columns[BB]![j]!;
    }
  });
  return { a, b };
}

type Reach = LagAnchor['band'];
const holds = ({ from, to }: Reach, block: number): boolean => block >= from && block <= to;
const touches = ({ touchedFrom, touchedTo }: Reach, block: number): boolean => block >= touchedFrom - 1 && block <= touchedTo + 1;

/**
 * How far the normalised product at a mass can lie, at any lag, from the mean of those at two anchors.
 * Shape:  `share` of the upper anchor in the mean; scale = ‖a‖‖b‖ of the spectra as they are, at the mass; powers likewise.
 * Units:  of a normalised product.
 * Error:  an upper bound, but for how a smooth curve bends between neighbouring nodes, which is allowed for by their largest step.
 * Fails:  never.
 * Source: |Σ a b* ΔV e^{iωτ}|² ≤ Σ|a|²|ΔV| · Σ|b|²|ΔV| (Cauchy and Schwarz).
 */
export function distanceBound(bins: CompressedBins, powers: BlockPowers, band: NodeBand, scale: number, { low, high }: Bracket, share: number): number {
  const { weight } = band;
  const first = Math.min(band.touchedFrom, low.band.touchedFrom, high.band.touchedFrom);
  const last = Math.max(band.touchedTo, low.band.touchedTo, high.band.touchedTo);
  let a = 0;
  let b = 0;
  for (let i = Math.max(0, first - 1); i <= Math.min(bins.blocks.length - 1, last + 1); i++) {
    const { offset, nodes } = bins.blocks[i]!;
    const whole = holds(band, i) && holds(low.band, i) && holds(high.band, i);
    let most = 0;
    if (whole) {
      let step = 0;
      let before = 0;
      for (let j = offset; j < offset + nodes; j++) {
        const d = weight[j]! / scale - (1 - share) * low.weight[j]! - share * high.weight[j]!;
        most = Math.max(most, Math.abs(d));
        if (j > offset) step = Math.max(step, Math.abs(d - before));
        before = d;
      }
      most += step;
    } else {
      const [own, lower, upper] = [touches(band, i) ? 1 : 0, touches(low.band, i) ? 1 - share : 0, touches(high.band, i) ? share : 0];
      for (let j = offset; j < offset + nodes; j++)
        most = Math.max(most, (own * Math.abs(weight[j]!)) / scale, lower * Math.abs(low.weight[j]!) + upper * Math.abs(high.weight[j]!));
      most *= CUT_ROOM;
    }
    a += most * Math.max(0, powers.a[i]!);
    b += most * Math.max(0, powers.b[i]!);
  }
  return Math.sqrt(a * b);
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
 * Error:  see `distanceBound`.
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
