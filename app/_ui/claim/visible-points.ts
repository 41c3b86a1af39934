import type { ResultPoint } from '@/lib/pipeline/result';

/** A sweep up to this length is shown whole in the table; a longer one is shown whole only when opened. */
export const mostRows = 8;

const badness: Record<ResultPoint['verdict'], number> = { 'not-computable': 4, 'routes-disagree': 3, differs: 2, unsettled: 1, agrees: 0 };

/** How far apart in tolerances: the worst point is the one a reader must not miss. */
const gap = (point: ResultPoint): number => (point.apart !== null && point.tolerance ? Math.abs(point.apart) / point.tolerance : 0);

/**
 * Indices of the points to show: all when few; else both ends, the worst ones, and the rest spread
 * evenly. In the sweep's own order.
 */
export function visiblePoints(count: number, points: readonly ResultPoint[] | null): readonly number[] {
  const all = Array.from({ length: count }, (_, i) => i);
  if (count <= mostRows) return all;
  const chosen = new Set([0, count - 1]);
  const worst = points ? [...all].sort((i, j) => rank(points[j]) - rank(points[i]) || i - j) : [];
  for (const i of worst) if (chosen.size < mostRows / 2 && rank(points?.[i]) > 0) chosen.add(i);
  for (let k = 1; chosen.size < mostRows && k < count; k++) chosen.add(Math.round((k * (count - 1)) / mostRows));
  return [...chosen].sort((i, j) => i - j);
}

const rank = (point: ResultPoint | undefined): number => (point ? badness[point.verdict] * 1e6 + Math.min(gap(point), 9e5) : 0);
