/** Chebyshev points of the first kind on (−1, 1): matches are read at so many masses of a stretch. */
const POINTS = 9;
export const ladderPoints = Float64Array.from({ length: POINTS }, (_, n) => Math.cos((Math.PI * (n + 0.5)) / POINTS));

/** Places tried between −1 and 1, and how far the highest is then narrowed down. */
const TRIED = 64;
const NARROWED = 1e-9;

export interface Crest {
  /** In (−1, 1), or exactly an end. */
  readonly y: number;
  readonly value: number;
  /** What the last two terms of the series come to: how far the points resolve the curve. */
  readonly tail: number;
}

function coefficients(values: readonly number[]): number[] {
  return values.map((_, j) => ((j === 0 ? 1 : 2) / POINTS) * values.reduce((sum, v, n) => sum + v * Math.cos((Math.PI * j * (n + 0.5)) / POINTS), 0));
}

/** Clenshaw's sum. */
function seriesAt(c: readonly number[], y: number): number {
  let [b1, b2] = [0, 0];
  for (let j = c.length - 1; j > 0; j--) [b1, b2] = [c[j]! + 2 * y * b1 - b2, b1];
  return c[0]! + y * b1 - b2;
}

/**
 * The maximum between −1 and 1 of the polynomial through values at the ladder's points.
 * Shape:  as many values as points.
 * Units:  those of the values.
 * Error:  `tail` of the values where they are smooth; the place to 1e-9.
 * Fails:  never; values that are not finite give a tail of Infinity.
 * Source: Chebyshev series on points of the first kind (from memory); golden section.
 */
export function crestOf(values: readonly number[]): Crest {
  const c = coefficients(values);
  const tail = Math.abs(c[POINTS - 1]!) + Math.abs(c[POINTS - 2]!);
  if (!Number.isFinite(tail)) {
    const n = values.reduce((best, v, i) => (v > values[best]! ? i : best), 0);
    return { y: ladderPoints[n]!, value: values[n]!, tail: Infinity };
  }
  const step = 2 / TRIED;
  let y = -1;
  for (let i = 1; i <= TRIED; i++) if (seriesAt(c, i * step - 1) > seriesAt(c, y)) y = i * step - 1;
  let [low, high] = [Math.max(-1, y - step), Math.min(1, y + step)];
  while (high - low > NARROWED) {
    const [p, q] = [high - 0.618 * (high - low), low + 0.618 * (high - low)];
    if (seriesAt(c, p) >= seriesAt(c, q)) high = q;
    else low = p;
  }
  const inner = (low + high) / 2;
  y = [-1, inner, 1].reduce((best, x) => (seriesAt(c, x) > seriesAt(c, best) ? x : best), inner);
  return { y, value: seriesAt(c, y), tail };
}
