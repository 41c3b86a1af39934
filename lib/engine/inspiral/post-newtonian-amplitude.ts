/**
 * The inspiral room: what is known in closed form of the signal long before the merger.
 */
import { C_M_PER_S, MPC_M, MSUN_S } from '@/lib/engine/units/constants';

export interface InspiralParameters {
  /** As the detector sees it: M(1 + z). */
  readonly massMsun: number;
  readonly distanceMpc: number;
  /** m₁/m₂; the amplitude is the same for its inverse. */
  readonly massRatio: number;
  /** 0: the quadrupole alone; 1: with the first correction. */
  readonly order: number;
}

export type InspiralAmplitude = (fHz: number) => number;

/**
 * |h̃(f)| of a quasi-circular binary in the stationary-phase approximation, plus polarisation, face-on.
 * Shape:  one binary gives a function of f.
 * Units:  f in Hz, amplitude in 1/Hz.
 * Error:  post-Newtonian truncation after order 0 or 1; spins do not enter.
 * Fails:  never; NaN where a parameter is.
 * Source: domain reference Q22: √(5η/24) π^{−2/3} (GM/c³)^{5/6} (c/D) f^{−7/6} [1 + (−323/224 + 451η/168)(πMf)^{2/3}]; the correction as in Santamaría et al. 2010, arXiv:1005.3306 (abstract seen, coefficients from memory).
 */
export function inspiralAmplitude({ massMsun, distanceMpc, massRatio, order }: InspiralParameters): InspiralAmplitude {
  const eta = massRatio / (1 + massRatio) ** 2;
  const massS = massMsun * MSUN_S;
  const size = (Math.sqrt((5 * eta) / 24) * Math.PI ** (-2 / 3) * massS ** (5 / 6)) / (distanceMpc * (MPC_M / C_M_PER_S));
  const first = order === 0 ? 0 : -323 / 224 + (451 / 168) * eta;
  return (fHz) => size * fHz ** (-7 / 6) * (1 + first * (Math.PI * massS * fHz) ** (2 / 3));
}
