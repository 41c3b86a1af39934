/** One file of a series: ln of its field and of its energy. */
export interface LogPoint {
  readonly field: number;
  readonly energy: number;
}

const mean = (values: readonly number[]): number => values.reduce((sum, x) => sum + x, 0) / values.length;

/**
 * Route A: slope of the least-squares line, from the sums about the means.
 * Shape:  two points or more at fields that differ.
 * Units:  dimensionless.
 * Error:  rounding.
 * Fails:  not finite where all fields are one.
 * Source: least squares.
 */
export function slopeAboutMeans(points: readonly LogPoint[]): number {
  const [x0, y0] = [mean(points.map(({ field }) => field)), mean(points.map(({ energy }) => energy))];
  let [xx, xy] = [0, 0];
  for (const { field, energy } of points) [xx, xy] = [xx + (field - x0) ** 2, xy + (field - x0) * (energy - y0)];
  return xy / xx;
}

/**
 * Route B: the same slope as the mean of the slopes between all pairs, each by the square of its reach. No
 * mean is subtracted and no normal equation is solved.
 * Shape:  two points or more at fields that differ.
 * Units:  dimensionless.
 * Error:  rounding.
 * Fails:  not finite where all fields are one.
 * Source: identity of the least-squares slope with the weighted mean of pairwise slopes; our derivation.
 */
export function slopeBetweenPairs(points: readonly LogPoint[]): number {
  let [weights, sum] = [0, 0];
  points.forEach((p, i) => {
    for (const q of points.slice(i + 1)) {
      const reach = p.field - q.field;
      if (reach === 0) continue;
      weights += reach * reach;
      sum += reach * reach * ((p.energy - q.energy) / reach);
    }
  });
  return sum / weights;
}

/** Sum of squares of the fields about their mean: what a slope's error is measured by. */
export const reachOf = (points: readonly LogPoint[]): number => {
  const x0 = mean(points.map(({ field }) => field));
  return points.reduce((sum, { field }) => sum + (field - x0) ** 2, 0);
};

/** What the line leaves of ln E, point by point. */
export function residualsOf(points: readonly LogPoint[], slope: number): number[] {
  const [x0, y0] = [mean(points.map(({ field }) => field)), mean(points.map(({ energy }) => energy))];
  return points.map(({ field, energy }) => energy - y0 - slope * (field - x0));
}

/** Standard deviation about the line; two points lie on it whatever they are, which says nothing. */
export function scatterOf(points: readonly LogPoint[], slope: number): number | null {
  if (points.length < 3) return null;
  return Math.sqrt(residualsOf(points, slope).reduce((sum, r) => sum + r * r, 0) / (points.length - 2));
}
