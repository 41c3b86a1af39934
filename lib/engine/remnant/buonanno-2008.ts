import type { Binary } from '../synthesis/binary';
import { circularMomentum, spinWhere } from './kerr-orbit';

/**
 * Spin of the remnant as an estimate: the bodies' own spins, and the angular momentum of the reduced mass
 * on the innermost stable orbit around the remnant itself.
 * Shape:  one binary; returns a scalar.
 * Units:  dimensionless, along the orbital angular momentum.
 * Error:  about 3 % low without spin: an estimate, not a fit to simulations.
 * Fails:  never.
 * Source: Buonanno, Kidder & Lehner 2008, arXiv:0709.3839 (abstract read; formula from memory).
 */
export function buonannoSpin({ m1, m2, eta, chi1z, chi2z }: Binary): number {
  const own = chi1z * m1 * m1 + chi2z * m2 * m2;
  return spinWhere((a) => own + eta * circularMomentum(a));
}
