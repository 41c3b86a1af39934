/** Chebyshev points of the first kind on (−1, 1), rising, with what a plain integral over (−1, 1) counts at each. */
export interface ChebyshevRule {
  readonly points: Float64Array;
  readonly weights: Float64Array;
}

const rules = new Map<number, ChebyshevRule>();

/**
 * Fejér's first rule.
 * Shape:  `n` points.
 * Units:  none.
 * Error:  exact for polynomials below n.
 * Fails:  never.
 * Source: term-by-term integration of the interpolating series (our derivation; sums of polynomials are tested).
 */
export function chebyshevRule(n: number): ChebyshevRule {
  const known = rules.get(n);
  if (known) return known;
  const angles = Array.from({ length: n }, (_, j) => Math.PI * (1 - (j + 0.5) / n));
  const weights = angles.map((angle) => {
    let sum = 1;
    for (let m = 1; 2 * m < n; m++) sum -= (2 * Math.cos(2 * m * angle)) / (4 * m * m - 1);
    return (2 * sum) / n;
  });
  const made = { points: Float64Array.from(angles, Math.cos), weights: Float64Array.from(weights) };
  rules.set(n, made);
  return made;
}
