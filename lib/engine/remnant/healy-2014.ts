import type { Binary } from '../synthesis/binary';
import { healySum, healyVariables } from './healy-basis';
import { orbitEnergy, orbitMomentum, spinWhere } from './kerr-orbit';

/** In the order of `healyPowers`. */
export const healy2014 = {
  spin: [0.68671, 0.613247, -0.145427, -0.115689, -0.005254, 0.801838, -0.073839, 0.004759, -0.078377, 1.585809, -0.00305, -0.002968, 0.004364, -0.047204, -0.053099, 0.953458, -0.067998, 0.001629, -0.066693],
  mass: [0.951507, -0.051379, -0.004804, -0.054522, -0.000022, 1.995246, 0.007064, -0.017599, -0.119175, 0.025, -0.068981, -0.011383, -0.002284, -0.165658, 0.019403, 2.98099, 0.02025, -0.004091, 0.078441],
} as const;

/**
 * Spin of the remnant; the fit holds the orbit around that very remnant, so it is solved for.
 * Shape:  one binary; returns a scalar.
 * Units:  dimensionless, along the orbital angular momentum.
 * Error:  the fit's own scatter, about 1e-3.
 * Fails:  never.
 * Source: Healy, Lousto & Zlochower 2014, PRD 90, 104004, Table XI and Eq. (14) as quoted in public source text; orbit from Ori & Thorne 2000.
 */
export function healySpin(binary: Binary): number {
  const variables = healyVariables(binary);
  const { s, delta } = variables;
  const { eta } = binary;
  const fixed = (4 * eta) ** 2 * healySum(healy2014.spin, variables) + s * (1 + 8 * eta) * delta ** 4;
  return spinWhere((a) => fixed + eta * orbitMomentum(a) * delta ** 6);
}

/**
 * Mass of the remnant, with the orbit around a hole of the spin above.
 * Shape:  as `healySpin`.
 * Units:  fraction of the total mass.
 * Error:  as `healySpin`.
 * Fails:  never.
 * Source: as `healySpin`.
 */
export function healyMass(binary: Binary): number {
  const variables = healyVariables(binary);
  const { eta } = binary;
  return (4 * eta) ** 2 * healySum(healy2014.mass, variables) + (1 + eta * (orbitEnergy(healySpin(binary)) + 11)) * variables.delta ** 6;
}
