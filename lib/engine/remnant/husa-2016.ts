import type { Binary } from '../synthesis/binary';
import { polynomial } from './polynomial';

/** Coefficients from the constant term upwards: rows of `spin` are powers of S, entries powers of η. */
export const husa2016 = {
  spin: [
    [0, 3.4641016151377544, -4.399247300629289, 9.397292189321194, -13.180949901606242],
    [1, -0.0850917821418767, -5.837029316602263],
    [0, 0.1014665242971878, -2.0967746996832157],
    [0, -1.3546806617824356, 4.108962025369336],
    [0, -0.8676969352555539, 2.064046835273906],
  ],
  energy: [0, 0.055974469826360077, 0.5809510763115132, -0.9606726679372312, 3.352411249771192],
  above: [-0.0030302335878845507, -2.0066110851351073, 7.7050567802399215],
  below: [-0.6714403054720589, -1.4756929437702908, 7.304676214885011],
} as const;

/**
 * Spin of the remnant from the aligned-spin fit.
 * Shape:  one binary; returns a scalar.
 * Units:  dimensionless, along the orbital angular momentum.
 * Error:  the fit's own scatter, about 1e-3; other published fits agree to 1e-3.
 * Fails:  never.
 * Source: Husa et al. 2016, arXiv:1508.07250, Eqs. (3.6), (3.8) as quoted in public source text.
 */
export function husaSpin({ m1, m2, eta, chi1z, chi2z }: Binary): number {
  const s = chi1z * m1 * m1 + chi2z * m2 * m2;
  const [orbital, ...powers] = husa2016.spin;
  return polynomial(eta, orbital) + polynomial(s, [0, ...powers.map((row) => polynomial(eta, row))]);
}

/**
 * Energy radiated since infinite separation, so that the remnant's mass is 1 minus it.
 * Shape:  one binary; returns a scalar.
 * Units:  fraction of the total mass.
 * Error:  the fit's own scatter, about 1e-3.
 * Fails:  never.
 * Source: as `husaSpin`.
 */
export function husaRadiatedEnergy({ m1, m2, eta, chi1z, chi2z }: Binary): number {
  const s = (chi1z * m1 * m1 + chi2z * m2 * m2) / (1 - 2 * eta);
  const above = 1 + polynomial(eta, husa2016.above) * s;
  const below = 1 + polynomial(eta, husa2016.below) * s;
  return (polynomial(eta, husa2016.energy) * above) / below;
}
