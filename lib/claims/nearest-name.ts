/** The known name that a misspelt one most likely means, or null when none is near. */
export function nearestName(name: string, known: readonly string[]): string | null {
  const lower = name.toLowerCase();
  const allowed = name.length <= 4 ? 1 : name.length <= 8 ? 2 : 3;
  let best: string | null = null;
  let bestDistance = allowed + 1;
  for (const candidate of known) {
    const distance = editDistance(lower, candidate.toLowerCase(), allowed);
    if (distance < bestDistance) {
      best = candidate;
      bestDistance = distance;
    }
  }
  return best;
}

export const didYouMean = (name: string, known: readonly string[]): string | undefined => {
  const near = nearestName(name, known);
  return near === null ? undefined : `Did you mean "${near}"?`;
};

/** Insertions, deletions, replacements and swaps of neighbours; gives up above `limit`. */
function editDistance(a: string, b: string, limit: number): number {
  if (Math.abs(a.length - b.length) > limit) return limit + 1;
  let before: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i++) {
    const current = [i];
    for (let j = 1; j <= b.length; j++) {
      const replace = (previous[j - 1] ?? 0) + (a[i - 1] === b[j - 1] ? 0 : 1);
      let least = Math.min(replace, (previous[j] ?? 0) + 1, (current[j - 1] ?? 0) + 1);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1]) least = Math.min(least, (before[j - 2] ?? 0) + 1);
      current.push(least);
    }
    before = previous;
    previous = current;
  }
  return previous[b.length] ?? limit + 1;
}
