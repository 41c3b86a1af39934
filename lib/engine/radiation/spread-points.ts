const MOST_POINTS = 10;

/** The point that lies furthest from what was claimed; the first when nothing can be compared. */
export function worstIndex(values: readonly (number | null)[], claimed: readonly (number | null)[]): number {
  let worst = 0;
  let apart = -1;
  values.forEach((value, i) => {
    const target = claimed[i];
    if (value === null || target === null || target === undefined) return;
    const here = Math.abs(value - target);
    if (here > apart) [worst, apart] = [i, here];
  });
  return worst;
}

/** Where route B runs: every point up to ten; of more, both ends, the worst and others spread evenly. */
export function routeBIndices(n: number, worst: number): number[] {
  if (n <= MOST_POINTS) return Array.from({ length: n }, (_, i) => i);
  const chosen = new Set([0, n - 1, worst]);
  const spread = 8;
  for (let k = 1; k <= spread; k++) chosen.add(Math.round((k * (n - 1)) / (spread + 1)));
  return [...chosen].sort((a, b) => a - b);
}
