import type { Binary } from '../synthesis/binary';
import { polynomial } from './polynomial';

/** Powers of η upwards; the linear terms are those of a test particle. */
export const pan2011 = {
  mass: [1, Math.sqrt(8 / 9) - 1, -0.4333, -0.4392],
  spin: [0, Math.sqrt(12), -3.871, 4.028],
} as const;

/**
 * Mass of the remnant of two bodies without spin.
 * Shape:  one binary, of which the spins are not read; returns a scalar.
 * Units:  fraction of the total mass.
 * Error:  the fit's own scatter, below 1e-3.
 * Fails:  never; it does not apply to bodies that spin, and the caller sees to that.
 * Source: Pan et al. 2011, PRD 84, 124052, Eq. (29a) as quoted in public source text.
 */
export const panMass = ({ eta }: Binary): number => polynomial(eta, pan2011.mass);

/**
 * Spin of that remnant.
 * Shape:  as `panMass`.
 * Units:  dimensionless.
 * Error:  as `panMass`.
 * Fails:  as `panMass`.
 * Source: the same, Eq. (29b).
 */
export const panSpin = ({ eta }: Binary): number => polynomial(eta, pan2011.spin);
