import type { Binary } from '../synthesis/binary';
import { healySum, healyVariables } from './healy-basis';

/** 10³ times the coefficients, in the order of `healyPowers`. */
export const healy2017 = [
  1.02101737, 0.897428902, -0.0977467, 0.920883841, 0.0186983, -0.391316975, -0.120214144, 0.148102239, 1.37901473, -0.493730555, 0.884792724, 0.000329254, 0.0170170729, 1.51484008, -0.148456828, 0.136659593, 0.160343115, -0.0618531,
  -1.03602521,
] as const;

/**
 * Peak luminosity.
 * Shape:  one binary; returns a scalar.
 * Units:  c⁵/G.
 * Error:  the fit's own scatter, about 1 %.
 * Fails:  never.
 * Source: Healy & Lousto 2017, arXiv:1610.09713, as quoted in public source text.
 */
export const healyLuminosity = (binary: Binary): number => ((4 * binary.eta) ** 2 * healySum(healy2017, healyVariables(binary))) / 1000;
