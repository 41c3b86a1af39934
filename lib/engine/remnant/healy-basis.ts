import type { Binary } from '../synthesis/binary';

/** What the fits of this group are polynomials of: S/m², Δ = (m₂χ₂ − m₁χ₁)/m, δ = (m₁ − m₂)/m. */
export interface HealyVariables {
  readonly s: number;
  readonly difference: number;
  readonly delta: number;
}

export const healyVariables = ({ m1, m2, delta, chi1z, chi2z }: Binary): HealyVariables => ({ s: chi1z * m1 * m1 + chi2z * m2 * m2, difference: m2 * chi2z - m1 * chi1z, delta });

/** Powers of S, Δ and δ of each term, in the order in which the coefficients are printed: 0, 1, 2a–2d, 3a–3d, 4a–4i. */
export const healyPowers = [
  [0, 0, 0],
  [1, 0, 0],
  [0, 1, 1], [2, 0, 0], [0, 2, 0], [0, 0, 2],
  [1, 1, 1], [1, 2, 0], [3, 0, 0], [1, 0, 2],
  [2, 1, 1], [0, 3, 1], [0, 4, 0], [4, 0, 0], [2, 2, 0], [0, 0, 4], [0, 1, 3], [0, 2, 2], [2, 0, 2],
] as const;

/** Σ of the terms, each power multiplied out. */
export const healySum = (coefficients: readonly number[], { s, difference, delta }: HealyVariables): number =>
  healyPowers.reduce((sum, [i, j, k], term) => sum + coefficients[term]! * s ** i * difference ** j * delta ** k, 0);
