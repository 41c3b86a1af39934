import type { Binary } from '../synthesis/binary';
import { weightedSpin } from './jimenez-2017';
import { polynomial } from './polynomial';

/** g and h are (f₀, f₁); g is h plus 16 η². */
export const keitel2017 = {
  scale: 0.0163791972,
  a: [0.8742169581, -2.1117925749, 35.2141032728, -244.9493067823, 877.1061892201, -1172.5498964935],
  b: [0.9800204549, -0.1779843936, 1.7859209419],
  factors: [0.465, 0.107, -0.328],
  d: [3.7891162713, 0.4021412501, 4.2731166787],
  g: [[1.628104927, -3.6322940181], [31.7105374083, -273.8475878565], [3.090174079, -16.6646570551]],
  h: [[-0.2347085232, 6.9616267799], [0.211393342, 1.525588553], [0.8362061463, 0]],
} as const;

/**
 * Peak luminosity.
 * Shape:  one binary; returns a scalar.
 * Units:  c⁵/G.
 * Error:  the fit's own scatter, about 1 %.
 * Fails:  never.
 * Source: Keitel et al. 2017, PRD 96, 024006, arXiv:1612.09566, as quoted in public source text.
 */
export function keitelLuminosity(binary: Binary): number {
  const { eta, delta, chi1z, chi2z } = binary;
  const { scale, a, b, factors, d, g, h } = keitel2017;
  const s = weightedSpin(binary);
  const along = (more: number) => ([f0, f1]: readonly [number, number]): number => polynomial(eta, [f0, f1, more - 16 * f0 - 4 * f1]);
  const [g1, g2, g6] = g.map(along(16)) as [number, number, number];
  const [h3, h4, h7] = h.map(along(0)) as [number, number, number];
  const spinning = polynomial(s, [0, factors[0] * b[0] * g1, factors[1] * b[1] * g2, h3, h4]) / polynomial(s, [1, factors[2] * b[2] * g6, h7]);
  const difference = chi1z - chi2z;
  const unequal = eta ** 3 * ((d[0] + d[2] * s) * delta * difference + d[1] * difference ** 2);
  return scale * eta ** 2 * (polynomial(eta, a) + spinning + unequal);
}
