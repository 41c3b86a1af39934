/** The orbital state at which the inspiral hands over: time in M, orbital frequency and its rate. */
export interface HandOver {
  readonly t0: number;
  readonly omega0: number;
  readonly omegaDot0: number;
}

/** Frequency of one mode through merger and ringdown, in orbital terms (the mode's own frequency over m). */
export interface MergerFrequency {
  readonly omega: (t: number) => number;
  readonly omegaDot: (t: number) => number;
  /** Centre of the transition and decay time, in M. */
  readonly tp: number;
  readonly tau: number;
}

/**
 * Smooth passage from the inspiral's frequency to the mode's quasi-normal one, continuous with its rate.
 * Shape:  scalars in, functions of t out.
 * Units:  M throughout; `ringOmega` is ω_R/m and `tau` 1/ω_I of the remnant in units of the total mass.
 * Error:  a model, not an approximation with an order.
 * Fails:  throws when the inspiral is too fast at the hand-over for a continuous rate.
 * Source: McWilliams 2019, arXiv:1810.00040 for the form; matching as in the domain reference, appendix B.
 */
export function mergerFrequency({ t0, omega0, omegaDot0 }: HandOver, ringOmega: number, tau: number): MergerFrequency {
  const span = ringOmega ** 4 - omega0 ** 4;
  const rate = (4 * tau * omega0 ** 3 * omegaDot0) / span;
  if (!(rate > 0 && rate < 2)) throw new RangeError(`no smooth merger: hand-over rate ${rate} outside 0…2`);
  const u0 = -0.5 * Math.log(2 / rate - 1);
  const tp = t0 - tau * u0;
  const k = span / (1 - Math.tanh(u0));
  const base = omega0 ** 4 - k * Math.tanh(u0);
  const omega = (t: number) => Math.sqrt(Math.sqrt(base + k * Math.tanh((t - tp) / tau)));
  const omegaDot = (t: number) => {
    const sech = 1 / Math.cosh((t - tp) / tau);
    return (k * sech * sech) / (4 * tau * omega(t) ** 3);
  };
  return { omega, omegaDot, tp, tau };
}

/**
 * Time of the last maximum of sech((t−tp)/τ)/Ω^{3/2}, left of tp; tp itself when the shape only falls.
 * Its logarithmic slope is monotone near tp, so bisection on a bracket found by walking back is safe.
 */
export function amplitudePeak({ omega, omegaDot, tp, tau }: MergerFrequency, t0: number): number {
  const slope = (t: number) => -Math.tanh((t - tp) / tau) / tau - (1.5 * omegaDot(t)) / omega(t);
  let right = tp;
  let left = tp - tau / 8;
  while (left > t0 && slope(left) <= 0) {
    right = left;
    left -= tau / 8;
  }
  if (left <= t0) return tp;
  for (let i = 0; i < 60; i++) {
    const middle = (left + right) / 2;
    if (slope(middle) > 0) left = middle;
    else right = middle;
  }
  return (left + right) / 2;
}
