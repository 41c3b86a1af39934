import { edgeRule } from '@/lib/engine/series/edge-weights';
import type { BinRange } from './bin-weights';
import { logNear } from './log-near';
import { JUMP_TERMS, type NoiseWeigher } from './noise-weigher';

const MOST_KINK_ORDER = 8;
/** A kink whose end weights would move the sum by less than this fraction of one bin is left to the plain sum. */
const LEAST_KINK = 1e-16;

/** Steep lines on coarse bins are continued over fewer of them: a power law of hundreds is no polynomial over eight bins. */
function kinkOrder(change: number, order: number): number {
  if (change * 4 < 2) return Math.min(order, MOST_KINK_ORDER);
  return change * 2 < 2 ? 4 : 2;
}

/** How far so many terms of the series of a jump reach: the next would be 1e-14 of 1/S. */
const FEW = 5;
const FEW_REACH = 0.01;
const ALL_REACH = 0.25;
/** The factors of a binomial coefficient grow by one a term. */
const GROWTH = 8;

const few = (c: Float64Array, o: number, x: number): number => x * (c[o]! + x * (c[o + 1]! + x * (c[o + 2]! + x * (c[o + 3]! + x * c[o + 4]!))));
const all = (c: Float64Array, o: number, x: number): number => {
  const xx = x * x;
  return few(c, o, x) + xx * xx * x * few(c, o + FEW, x);
};
const ofEight = (c: Float64Array, o: number, x: number): number =>
  c[o]! + x * (c[o + 1]! + x * (c[o + 2]! + x * (c[o + 3]! + x * (c[o + 4]! + x * (c[o + 5]! + x * (c[o + 6]! + x * (c[o + 7]! + x * c[o + 8]!)))))));

const EIGHT = edgeRule(8, -4);

interface Stencil {
  readonly at: number;
  /** Bins from the kink to the first bin of the stencil. */
  readonly away: number;
  readonly most: number;
  readonly step: number;
}

/**
 * End weights at every kink of a table: the law above stands in for the one below, bins to either side of it make up for the step between them.
 * Shape:  adds to the values of bins first … last.
 * Units:  1/S.
 * Error:  as `binWeights`.
 * Fails:  never.
 * Source: engine design (fractional end weights).
 */
export function addKinks(values: Float64Array, weigher: NoiseWeigher, range: BinRange, first: number, last: number): void {
  const { kinksHz } = weigher;
  const { dfHz } = range;
  for (let i = weigher.firstKinkAbove(range.fLowHz); i < kinksHz.length && kinksHz[i]! < range.fHighHz; i++) {
    const f = kinksHz[i]!;
    if (f <= range.fLowHz) continue;
    const step = dfHz / f;
    const steepness = weigher.steepnessAt(i);
    const change = steepness * step;
    if (change * step < LEAST_KINK) continue;
    const most = Math.min(kinkOrder(change, range.order), last - first + 1);
    const place = f / dfHz;
    const inside = Math.ceil(place);
    const offset = Math.max(first - inside, Math.min(last - inside - most + 1, -(most >> 1)));
    const at = inside + offset - first;
    const away = inside + offset - place;
    const size = (steepness + GROWTH) * step * Math.max(-away, away + most - 1);
    if (most === 8 && offset === -4) addEight(values, weigher, i, at, away, step, size);
    else addOther(values, weigher, i, { at, away, most, step }, offset);
  }
}

/** The common case, with nothing looked up or allocated; three loops, so that each is compiled as one. */
function addEight(values: Float64Array, weigher: NoiseWeigher, kink: number, at: number, away: number, step: number, size: number): void {
  if (size < FEW_REACH) addByFew(values, weigher.jumps, JUMP_TERMS * kink, at, away, step);
  else if (size < ALL_REACH) addByAll(values, weigher.jumps, JUMP_TERMS * kink, at, away, step);
  else addSteep(values, weigher, kink, at, away, step);
}

function addByFew(values: Float64Array, jumps: Float64Array, from: number, at: number, away: number, step: number): void {
  const { powers } = EIGHT;
  for (let j = 0; j < 8; j++) values[at + j]! += ofEight(powers, 9 * j, -4 - away) * few(jumps, from, (away + j) * step);
}

function addByAll(values: Float64Array, jumps: Float64Array, from: number, at: number, away: number, step: number): void {
  const { powers } = EIGHT;
  for (let j = 0; j < 8; j++) values[at + j]! += ofEight(powers, 9 * j, -4 - away) * all(jumps, from, (away + j) * step);
}

function addSteep(values: Float64Array, weigher: NoiseWeigher, kink: number, at: number, away: number, step: number): void {
  const { powers } = EIGHT;
  for (let j = 0; j < 8; j++) values[at + j]! += ofEight(powers, 9 * j, -4 - away) * weigher.jumpAt(kink, logNear((away + j) * step));
}

const share = new Float64Array(MOST_KINK_ORDER);

function addOther(values: Float64Array, weigher: NoiseWeigher, kink: number, { at, away, most, step }: Stencil, offset: number): void {
  edgeRule(most, offset).weightsAt(away - offset, share);
  for (let j = 0; j < most; j++) values[at + j]! += share[j]! * weigher.jumpAt(kink, logNear((away + j) * step));
}
