import type { Binary } from './binary';

const eulerGamma = 0.5772156649015329;
const { PI } = Math;

/**
 * Rate of change of x = (MΩ)^{2/3} for quasi-circular, aligned-spin orbits.
 * Shape:  one binary gives a function of x.
 * Units:  t in M, so the rate is 1/M.
 * Error:  post-Newtonian truncation (order 7/2 without spins, 2 with them).
 * Fails:  never; meaningless beyond the last stable orbit, where the caller stops.
 * Source: domain reference, appendix B (standard post-Newtonian, from memory).
 */
export function orbitalDecay(binary: Binary): (x: number) => number {
  const { m1, m2, eta, chi1z, chi2z } = binary;
  const beta = ((113 / 12) * m1 * m1 + (25 / 4) * eta) * chi1z + ((113 / 12) * m2 * m2 + (25 / 4) * eta) * chi2z;
  const sigma = (79 / 8) * eta * chi1z * chi2z + (81 / 16) * (m1 * m1 * chi1z * chi1z + m2 * m2 * chi2z * chi2z);
  const eta2 = eta * eta;
  const c2 = -(743 / 336 + (11 / 4) * eta);
  const c3 = 4 * PI - beta;
  const c4 = 34103 / 18144 + (13661 / 2016) * eta + (59 / 18) * eta2 + sigma;
  const c5 = -PI * (4159 / 672 + (189 / 8) * eta);
  const c6 =
    16447322263 / 139708800 -
    (1712 / 105) * eulerGamma +
    (16 * PI * PI) / 3 +
    (-56198689 / 217728 + (451 * PI * PI) / 48) * eta +
    (541 / 896) * eta2 -
    (5605 / 2592) * eta2 * eta;
  const c7 = PI * (-4415 / 4032 + (358675 / 6048) * eta + (91495 / 1512) * eta2);
  return (x) => {
    const v = Math.sqrt(x);
    const sixth = c6 - (856 / 105) * Math.log(16 * x);
    const series = 1 + x * (c2 + v * (c3 + v * (c4 + v * (c5 + v * (sixth + v * c7)))));
    return (64 / 5) * eta * x ** 5 * series;
  };
}

/**
 * x at times 0, step, 2·step, … up to and including the first value at or beyond `endX`.
 * Shape:  scalars in; a series as long as it takes comes back.
 * Units:  x dimensionless, (MΩ)^(2/3); step and time in M.
 * Error:  fourth order in the step.
 * Fails:  does not end where `decay` is not positive; the series above is positive for the demonstration’s range.
 * Source: classical Runge–Kutta of fourth order (common practice).
 */
export function integrateInspiral(decay: (x: number) => number, startX: number, endX: number, stepM: number): Float64Array {
  const xs = [startX];
  for (let x = startX; x < endX; xs.push(x)) {
    const k1 = decay(x);
    const k2 = decay(x + (stepM / 2) * k1);
    const k3 = decay(x + (stepM / 2) * k2);
    const k4 = decay(x + stepM * k3);
    x += (stepM / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
  }
  return Float64Array.from(xs);
}
