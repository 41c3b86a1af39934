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

const spread = (n: number, always: readonly number[], others: number): number[] => {
  const chosen = new Set(always);
  for (let k = 1; k <= others; k++) chosen.add(Math.round((k * (n - 1)) / (others + 1)));
  return [...chosen].sort((p, q) => p - q);
};

/** Where route B runs: every point up to ten; of more, both ends, the worst and eight spread between. */
export const routeBIndices = (n: number, worst: number): number[] =>
  n <= 10 ? Array.from({ length: n }, (_, i) => i) : spread(n, [0, worst, n - 1], 8);

/** Where the error bar is measured: every point up to five; of more, both ends, the worst and two between. */
export const errorBarIndices = (n: number, worst: number): number[] =>
  n <= 5 ? Array.from({ length: n }, (_, i) => i) : spread(n, [0, worst, n - 1], 2);

/** The larger of the two measured neighbours. */
export function fromNeighbours(n: number, measured: ReadonlyMap<number, number>): number[] {
  const indices = [...measured.keys()].sort((p, q) => p - q);
  return Array.from({ length: n }, (_, i) => {
    const below = indices.filter((k) => k <= i).at(-1) ?? indices[0]!;
    const above = indices.find((k) => k >= i) ?? indices[indices.length - 1]!;
    return Math.max(measured.get(below)!, measured.get(above)!);
  });
}
