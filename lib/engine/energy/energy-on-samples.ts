import { quadratureWeights } from './local-calculus';
import type { Fluxes } from './flux-on-samples';

export interface ModeEnergy {
  readonly l: number;
  readonly m: number;
  /** Fraction of M. */
  readonly energy: number;
}

export const ENERGY_FACTOR = 1 / (16 * Math.PI);

function weightedSum(weights: Float64Array, values: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < values.length; i++) sum += weights[i]! * values[i]!;
  return sum;
}

/**
 * Route A: energy of each mode from startM to the last sample.
 * Shape:  one entry a mode.
 * Units:  startM in M; energies as fractions of M.
 * Error:  quadrature of the stated order in the sample step.
 * Fails:  never; a start after the record gives zero.
 * Source: Q12; Ruiz et al. 2008, arXiv:0707.4654.
 */
export function energyOnSamples(fluxes: Fluxes, startM: number, order: 4 | 6 | 8 = 8): ModeEnergy[] {
  const weights = quadratureWeights(fluxes.axis, startM, order, fluxes.isEven);
  return fluxes.perMode.map(({ l, m, power }) => ({ l, m, energy: ENERGY_FACTOR * weightedSum(weights, power) }));
}

export const totalEnergy = (modes: readonly ModeEnergy[]): number => modes.reduce((sum, { energy }) => sum + energy, 0);
