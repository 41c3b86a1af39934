import { err, ok, type Result } from '@/lib/kernel/result';

export interface RadiusFit {
  /** The constant term: the value at infinite radius. */
  readonly atInfinity: number;
  /** The constant term of the fit of one degree less; null for degree 0. */
  readonly previousOrder: number | null;
  /** Standard deviation about the fit; null where it goes through every point. */
  readonly scatter: number | null;
}

const dot = (p: readonly number[], q: readonly number[]): number => p.reduce((sum, x, i) => sum + x * q[i]!, 0);

/**
 * Least-squares polynomial in 1/r, each value counting alike. Built from polynomials that are orthogonal over the radii, so
 * that every degree adds one term to the one before and nothing has to be inverted.
 * Shape:  radii and values are parallel.
 * Units:  radii in one unit; the rest in that of the values.
 * Error:  rounding only.
 * Fails:  with the reason where there are not more different radii than the degree, or something is not finite.
 * Source: Q21; Forsythe 1957 (from memory) for the orthogonal polynomials.
 */
export function fitInInverseRadius(radii: readonly number[], values: readonly number[], degree: number): Result<RadiusFit, string> {
  if (radii.length !== values.length || !radii.every((r) => Number.isFinite(r) && r > 0) || !values.every(Number.isFinite)) return err('radii and values must be finite, radii positive');
  if (new Set(radii).size <= degree) return err(`a polynomial of degree ${degree} needs ${degree + 1} different radii; there are ${new Set(radii).size}`);
  const nearest = Math.min(...radii);
  const xs = radii.map((r) => nearest / r);
  let [before, here] = [xs.map(() => 0), xs.map(() => 1)];
  let [beforeAtZero, hereAtZero] = [0, 1];
  let normBefore = 1;
  let rest = [...values];
  const constants: number[] = [];
  for (let k = 0; k <= degree; k++) {
    const norm = dot(here, here);
    // Against what is left, not against the values: the same number, with less rounding.
    const coefficient = dot(rest, here) / norm;
    rest = rest.map((y, i) => y - coefficient * here[i]!);
    constants.push((constants.at(-1) ?? 0) + coefficient * hereAtZero);
    const centre = dot(xs.map((x, i) => x * here[i]!), here) / norm;
    const step = k === 0 ? 0 : norm / normBefore;
    const next = xs.map((x, i) => (x - centre) * here[i]! - step * before[i]!);
    [beforeAtZero, hereAtZero] = [hereAtZero, -centre * hereAtZero - step * beforeAtZero];
    [before, here, normBefore] = [here, next, norm];
  }
  const free = radii.length - degree - 1;
  return ok({ atInfinity: constants.at(-1)!, previousOrder: constants.at(-2) ?? null, scatter: free > 0 ? Math.sqrt(dot(rest, rest) / free) : null });
}
