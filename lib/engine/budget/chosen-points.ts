import type { SweptValue } from '@/lib/kernel/place';

/**
 * The point furthest from its claim in units of the tolerance; the first where nothing is claimed as a value.
 * Shape:  values and claimed are parallel; an index comes back.
 * Units:  values, claimed and tolerance share the unit of the quantity.
 * Error:  none: comparisons only.
 * Fails:  never; a value or claim that is null is passed over.
 * Source: our definition of the worst point (settings: which points route B takes).
 */
export function worstIndex(
  values: readonly (number | null)[],
  claimed: readonly (number | null)[],
  tolerance: (claimed: number) => number,
): number {
  let worst = 0;
  let furthest = -1;
  values.forEach((value, i) => {
    const target = claimed[i] ?? null;
    if (value === null || target === null) return;
    const scale = tolerance(target);
    const apart = Math.abs(value - target) / (scale > 0 ? scale : 1);
    if (apart > furthest) [worst, furthest] = [i, apart];
  });
  return worst;
}

/** Some of a list of places: all up to `most`; of more both ends, those that must be there and some between. */
function chosenOf(places: readonly number[], most: number, between: number, always: number): number[] {
  const n = places.length;
  if (n <= most) return [...places];
  const chosen = new Set([places[0]!, places[n - 1]!, ...(places.includes(always) ? [always] : [])]);
  for (let k = 1; k <= between; k++) chosen.add(places[Math.round((k * (n - 1)) / (between + 1))]!);
  return [...chosen].sort((p, q) => p - q);
}

/** Nothing lies between words of a sweep: each is asked by itself, and the numbers among themselves. */
function chosen(n: number, alone: readonly number[], most: number, between: number, always: number): number[] {
  const numbers = Array.from({ length: n }, (_, i) => i).filter((i) => !alone.includes(i));
  return [...alone, ...chosenOf(numbers, most, between, always)].sort((p, q) => p - q);
}

/** Points of a sweep that stand at a word. */
export const atWords = (values: readonly SweptValue[]): number[] => values.flatMap((value, i) => (typeof value === 'string' ? [i] : []));

/** Where route B runs: every point up to ten; of more, both ends, the worst and eight spread between; every word. */
export const routeBIndices = (n: number, worst: number, alone: readonly number[] = []): number[] => chosen(n, alone, 10, 8, worst);

/** Where the error bar is measured: every point up to five; of more, both ends, the worst and two between; every word. */
export const errorBarIndices = (n: number, worst: number, alone: readonly number[] = []): number[] => chosen(n, alone, 5, 2, worst);

/**
 * The larger of the two measured neighbours; a point at a word is nobody's neighbour.
 * Shape:  one number a point; every point in `alone` is among the measured.
 * Units:  those of what was measured.
 * Error:  none: comparisons only.
 * Fails:  never.
 * Source: ours: an error bar changes slowly along a number, and nothing lies between words.
 */
export function fromNeighbours(n: number, measured: ReadonlyMap<number, number>, alone: readonly number[] = []): number[] {
  const indices = [...measured.keys()].filter((i) => !alone.includes(i)).sort((p, q) => p - q);
  return Array.from({ length: n }, (_, i) => {
    if (alone.includes(i)) return measured.get(i)!;
    const below = indices.filter((k) => k <= i).at(-1) ?? indices[0]!;
    const above = indices.find((k) => k >= i) ?? indices[indices.length - 1]!;
    return Math.max(measured.get(below)!, measured.get(above)!);
  });
}
