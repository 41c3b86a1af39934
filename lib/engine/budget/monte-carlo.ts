import { seededDraws, type Draws } from './seeded-draws';

/** What is known of one contribution: its size and how it is spread. */
export interface Spread {
  readonly u: number;
  readonly degreesOfFreedom?: number | undefined;
  readonly shape: 'rectangular' | 'normal';
}

/** Where the quantity can lie at all; null on a side that is open. */
export interface PhysicalRange {
  readonly low: number | null;
  readonly high: number | null;
}

export interface Interval {
  readonly low: number;
  readonly high: number;
}

export const DRAWS = 10_000;
const SEED = 20_080_101;
const LEVEL = 0.95;
/** A value far beyond its range would never give so many draws inside. */
const MOST_TRIES = 100 * DRAWS;

/** A t-distribution for a size that is itself estimated: a normal number over the root of its own estimated variance. */
function scaled(draws: Draws, freedom: number | undefined): number {
  const z = draws.normal();
  if (freedom === undefined || !Number.isFinite(freedom) || freedom >= 100) return z;
  const whole = Math.max(1, Math.floor(freedom));
  let squares = 0;
  for (let i = 0; i < whole; i++) squares += draws.normal() ** 2;
  return z / Math.sqrt(squares / whole);
}

const drawn = (draws: Draws, { u, shape, degreesOfFreedom }: Spread): number =>
  u === 0 ? 0 : shape === 'rectangular' ? u * Math.sqrt(3) * (2 * draws.uniform() - 1) : u * scaled(draws, degreesOfFreedom);

/** The narrowest stretch that holds the level's share of sorted values. */
function shortest(sorted: Float64Array): Interval {
  const inside = Math.ceil(LEVEL * sorted.length);
  let best = 0;
  for (let i = 1; i + inside <= sorted.length; i++) {
    if (sorted[i + inside - 1]! - sorted[i]! < sorted[best + inside - 1]! - sorted[best]!) best = i;
  }
  return { low: sorted[best]!, high: sorted[best + inside - 1]! };
}

/**
 * Propagation of distributions: 10⁴ draws of every contribution added to the value, those outside the physical
 * range thrown away, and the shortest interval that holds 95 % of the rest. The seed is fixed.
 * Shape:  two limits; null where the value lies so far out that nothing falls into the range.
 * Units:  those of the value.
 * Error:  about 2 % of u at either limit; exactly a bound where the spread leans on it.
 * Fails:  null also where a size is not finite.
 * Source: JCGM 101:2008, 5.3.4 and 7.7; discarding impossible values is conditioning on the range.
 */
export function monteCarloInterval(value: number, spreads: readonly Spread[], { low, high }: PhysicalRange): Interval | null {
  if (!Number.isFinite(value) || !spreads.every(({ u }) => Number.isFinite(u))) return null;
  const draws = seededDraws(SEED);
  const kept = new Float64Array(DRAWS);
  let count = 0;
  for (let tries = 0; count < DRAWS && tries < MOST_TRIES; tries++) {
    let x = value;
    for (const spread of spreads) x += drawn(draws, spread);
    if ((low !== null && x < low) || (high !== null && x > high)) continue;
    kept[count++] = x;
  }
  if (count < DRAWS) return null;
  const found = shortest(kept.sort());
  // A density that falls from a bound begins at the bound, whichever draw came closest to it.
  const [first, last] = [found.low === kept[0], found.high === kept[DRAWS - 1]];
  return { low: first && low !== null ? low : found.low, high: last && high !== null ? high : found.high };
}
