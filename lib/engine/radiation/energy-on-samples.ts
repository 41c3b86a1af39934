import type { Mode } from '../contract/waveform';
import { quadratureWeights } from './local-calculus';
import type { SampledRadiation } from './news-on-samples';

export interface ModeEnergy {
  readonly l: number;
  readonly m: number;
  /** Fraction of M. */
  readonly energy: number;
}

export const ENERGY_FACTOR = 1 / (16 * Math.PI);

/**
 * Route A: energy of each mode from startM to the last sample.
 * Shape:  one entry a mode.
 * Units:  startM in M; energies as fractions of M.
 * Error:  quadrature of the stated order in the sample step.
 * Fails:  never; a start after the record gives zero.
 * Source: Q12; Ruiz et al. 2008, arXiv:0707.4654.
 */
export function energyOnSamples({ axis, isEven, news }: SampledRadiation, startM: number, order: 4 | 6 | 8 = 8): ModeEnergy[] {
  const weights = quadratureWeights(axis, startM, order, isEven);
  return news.map((mode) => ({ l: mode.l, m: mode.m, energy: ENERGY_FACTOR * weightedPower(weights, mode) }));
}

function weightedPower(weights: Float64Array, { re, im }: Mode): number {
  let sum = 0;
  for (let i = 0; i < weights.length; i++) sum += weights[i]! * (re[i]! * re[i]! + im[i]! * im[i]!);
  return sum;
}

export const totalEnergy = (modes: readonly ModeEnergy[]): number => modes.reduce((sum, { energy }) => sum + energy, 0);
