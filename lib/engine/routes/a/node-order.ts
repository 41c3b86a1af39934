import { nodeOffsets, spreadOf } from './chebyshev-blocks';
import type { NoiseWeigher } from './noise-weigher';

/** Widest half of a block by its middle: sixteen bins from bin 128 on. */
const WIDEST = 7.5 / 135.5;
/** Turn of the phase over half a block that the nodes still carry. */
export const MOST_TURN_RAD = 1.6;
/** Of the largest value in a block: below it nothing is left to a sum of a hundred blocks at 1e-13. */
const RESOLVED = 5e-14;
const ORDERS = [10, 12, 14, 16];
/** Blocks are tried at as many places in an octave, each overlapping the next; a kink or line cannot hide between them. */
const PLACES_AN_OCTAVE = 32;
/** Places between the nodes at which the polynomial is compared: the bins of a small block. */
const BINS = 48;

/** The largest error of the polynomial through `order` nodes of 1/S times a turning phase, over blocks at all places of the band, by the block's largest value. */
function worstError(weigher: NoiseWeigher, logLow: number, logHigh: number, order: number, enough: number): number {
  const step = Math.LN2 / PLACES_AN_OCTAVE;
  const [below, above] = [Math.log1p(-WIDEST), Math.log1p(WIDEST)];
  const places = Math.max(1, Math.ceil((logHigh - above - (logLow - below)) / step));
  const half = (BINS - 1) / 2;
  const logs = new Float64Array(order + BINS);
  nodeOffsets(BINS, order).forEach((x, j) => (logs[j] = Math.log1p((WIDEST * x) / half)));
  for (let i = 0; i < BINS; i++) logs[order + i] = Math.log1p((WIDEST * (i - half)) / half);
  const turn = logs.map((log) => Math.cos((MOST_TURN_RAD * Math.expm1(log)) / WIDEST + 0.5));
  const values = new Float64Array(order + BINS);
  const spread = spreadOf(BINS, order);
  let worst = 0;
  for (let p = 0; p <= places && worst < enough; p++) {
    const middle = logLow - below + (p * (logHigh - above - (logLow - below))) / places;
    weigher.fill(values, logs, 0, order + BINS - 1, middle);
    let top = 0;
    for (let i = 0; i < values.length; i++) top = Math.max(top, Math.abs(values[i]!));
    for (let i = 0; i < BINS; i++) {
      let read = 0;
      for (let j = 0; j < order; j++) read += spread[order * i + j]! * values[j]! * turn[j]!;
      worst = Math.max(worst, Math.abs(read - values[order + i]! * turn[order + i]!) / top);
    }
  }
  return worst;
}

const found = new WeakMap<NoiseWeigher, Map<string, number | null>>();

/**
 * How many nodes a block needs for a noise curve, or that no number does: a measured curve with lines, or any table that is not smooth.
 * Shape:  one number for all masses: only the curve and the band are looked at.
 * Units:  Hz.
 * Error:  1/S times a phase of up to 1.6 rad over half a block is a polynomial below that order to 5e-14 of its largest value there.
 * Fails:  null for a curve that 16 nodes do not resolve, or a band narrower than a block.
 * Source: our rule; the first order that suffices.
 */
export function nodeOrder(weigher: NoiseWeigher, fLowHz: number, fHighHz: number): number | null {
  const byBand = found.get(weigher) ?? new Map<string, number | null>();
  found.set(weigher, byBand);
  const key = `${fLowHz},${fHighHz}`;
  const known = byBand.get(key);
  if (known !== undefined) return known;
  const [logLow, logHigh] = [Math.log(fLowHz), Math.log(fHighHz)];
  const wide = logHigh - logLow > Math.log1p(WIDEST) - Math.log1p(-WIDEST);
  const made = (wide ? ORDERS.find((order) => worstError(weigher, logLow, logHigh, order, RESOLVED) < RESOLVED) : null) ?? null;
  byBand.set(key, made);
  return made;
}
