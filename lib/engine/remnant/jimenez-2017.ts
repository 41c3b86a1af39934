import type { Binary } from '../synthesis/binary';
import { polynomial } from './polynomial';

/** Coefficients of the published version; those of g and k are (f₀, f₁) and (f₁, f₂), of k₅ (f₀, f₁). */
export const jimenez2017 = {
  energy: {
    a: [0.5609904135, -0.8466756376, 3.1451452243],
    b: [-0.2091189048, -0.1970913636, -0.1588185739, 2.9852925538],
    g: [[1.8083565299, 15.7380822044], [4.2713133085, 0], [31.0898757028, -243.6299258831], [1.5673498395, -0.5808669013]],
    d: [-0.0980373045, -3.2283713378, 0.0111853034, -0.0197823897, -4.9166774902],
    scale: [0.346, 0.211, 0.128, -0.212],
  },
  spin: {
    a: [3.8326341619, -9.4873641556, 2.5134875146],
    b: [1.0009563703, 0.7877509372, 0.6540138407, 0.8396665723],
    k: [[4.4091601742, 0.5118334707], [8.7736732011, -32.0606482777], [22.8300332505, -153.8372266903]],
    k5: [1.8804718792, -4.7702468564],
    d: [0.3223660563, 9.3325759564, -0.0598083226, 2.3170397515, -3.2624649876],
    scale: [-0.194, 0.0851, 0.00954, -0.579],
    orbital: [5.24, 1.3, 2.88],
  },
} as const;

/** Spins weighted by squared masses, S/(m₁² + m₂²). */
export const weightedSpin = ({ m1, m2, chi1z, chi2z }: Binary): number => (chi1z * m1 * m1 + chi2z * m2 * m2) / (m1 * m1 + m2 * m2);

interface Unequal {
  readonly d: readonly [d10: number, d11: number, d20: number, d30: number, d31: number];
  /** Power of η before d₃₀. */
  readonly power: 1 | 3;
}

/** What a difference of spins adds; √(1 − 4η) is δ, which keeps its digits near equal masses. */
function spinDifference({ eta, delta, chi1z, chi2z }: Binary, spin: number, { d: [d10, d11, d20, d30, d31], power }: Unequal): number {
  const difference = chi1z - chi2z;
  return d10 * delta * eta ** 2 * (1 + d11 * eta) * difference + d30 * spin * delta * eta ** power * (1 + d31 * eta) * difference + d20 * eta ** 3 * difference ** 2;
}

/**
 * Energy radiated since infinite separation.
 * Shape:  one binary; returns a scalar.
 * Units:  fraction of the total mass.
 * Error:  the fit's own scatter, about 3e-4; made from mass ratios to 18 and spins to 0.98.
 * Fails:  never.
 * Source: Jiménez-Forteza et al. 2017, PRD 95, 064024, arXiv:1611.00332, coefficients of the published version as quoted in public source text.
 */
export function jimenezRadiatedEnergy(binary: Binary): number {
  const { eta } = binary;
  const { a, b, g, d, scale } = jimenez2017.energy;
  const s = weightedSpin(binary);
  const [g1, g2, g3, g5] = g.map(([f0, f1]) => polynomial(eta, [f0, f1, 16 - 16 * f0 - 4 * f1])) as [number, number, number, number];
  const orbital = polynomial(eta, [0, 1 - (2 * Math.SQRT2) / 3, ...a]);
  const above = polynomial(s, [1, scale[0] * b[0] * g1, scale[1] * b[1] * g2, scale[2] * b[2] * g3]);
  const below = 1 + scale[3] * b[3] * s * g5;
  return (orbital * above) / below + spinDifference(binary, s, { d, power: 1 });
}

/**
 * Spin of the remnant.
 * Shape:  one binary; returns a scalar.
 * Units:  dimensionless, along the orbital angular momentum.
 * Error:  as `jimenezRadiatedEnergy`.
 * Fails:  never.
 * Source: as `jimenezRadiatedEnergy`.
 */
export function jimenezSpin(binary: Binary): number {
  const { m1, m2, eta, chi1z, chi2z } = binary;
  const { a, b, k, k5, d, scale, orbital } = jimenez2017.spin;
  const s = weightedSpin(binary);
  const [k1, k2, k3] = k.map(([f1, f2]) => polynomial(eta, [0, f1, f2, 64 - 16 * f1 - 4 * f2])) as [number, number, number];
  const last = polynomial(eta, [k5[0], k5[1], 0, 64 - 64 * k5[0] - 16 * k5[1]]);
  const orbiting = polynomial(eta, [0, 2 * Math.sqrt(3), orbital[0] * a[0], orbital[1] * a[1]]) / (1 + orbital[2] * a[2] * eta);
  const spinning = polynomial(s, [0, scale[0] * b[0] * k1, scale[1] * b[1] * k2, scale[2] * b[2] * k3]) / (1 + scale[3] * b[3] * s * last);
  return chi1z * m1 * m1 + chi2z * m2 * m2 + orbiting + spinning + spinDifference(binary, s, { d, power: 3 });
}
