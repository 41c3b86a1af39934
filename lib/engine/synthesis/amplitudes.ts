import type { Binary } from './binary';
import type { TabulatedMode } from '../remnant/quasi-normal';

/** Constant phase of each mode relative to e^{−imφ}, as (re, im). */
export const modePhase: Record<TabulatedMode, readonly [number, number]> = {
  22: [1, 0],
  21: [0, 1],
  33: [0, -1],
  44: [-1, 0],
  32: [1, 0],
};

/**
 * Real post-Newtonian amplitude Ĥ_ℓm(x), relative to the leading order of (2,2).
 * Shape:  one mode of one binary gives a function of x; it may pass through zero and change sign.
 * Units:  dimensionless.
 * Error:  post-Newtonian truncation: second order for (2,2), leading for the others.
 * Fails:  never.
 * Source: domain reference, appendix B (standard post-Newtonian, from memory).
 */
export function relativeAmplitude(mode: TabulatedMode, binary: Binary): (x: number) => number {
  const { eta, delta, chi1z, chi2z } = binary;
  const symmetric = (chi1z + chi2z) / 2;
  const antisymmetric = (chi1z - chi2z) / 2;
  switch (mode) {
    case '22': {
      const c2 = -107 / 42 + (55 / 42) * eta;
      const c4 = -2173 / 1512 - (1069 / 216) * eta + (2047 / 1512) * eta * eta;
      return (x) => 1 + x * (c2 + 2 * Math.PI * Math.sqrt(x) + x * c4);
    }
    case '21':
      return (x) => (Math.sqrt(x) / 3) * (delta - 1.5 * Math.sqrt(x) * (antisymmetric + delta * symmetric));
    case '33':
      return (x) => (3 / 4) * Math.sqrt(15 / 14) * delta * Math.sqrt(x);
    case '44':
      return (x) => (8 / 9) * Math.sqrt(5 / 7) * (1 - 3 * eta) * x;
    case '32':
      return (x) => (1 / 3) * Math.sqrt(5 / 7) * (1 - 3 * eta) * x;
  }
}

/** |rh/M| of the (2,2) mode at merger, from numerical simulations of non-spinning binaries (appendix B). */
export const peakAmplitude22 = (eta: number): number => eta * (1.45 + 0.49 * eta);

export interface Join {
  readonly t: number;
  readonly value: number;
  readonly slope: number;
}

/**
 * From the inspiral's amplitude to the peak: a cubic Hermite in ln|H| with the inspiral's slope at
 * the start and none at the peak. Where the sign changes in between, in H itself.
 */
export function riseToPeak(from: Join, to: { readonly t: number; readonly value: number }): (t: number) => number {
  const span = to.t - from.t;
  const sameSign = from.value * to.value > 0;
  const a = sameSign ? Math.log(Math.abs(from.value)) : from.value;
  const b = sameSign ? Math.log(Math.abs(to.value)) : to.value;
  const slope = (sameSign ? from.slope / from.value : from.slope) * span;
  return (t) => {
    const s = Math.min(Math.max((t - from.t) / span, 0), 1);
    const y = a + s * (slope + s * (3 * (b - a) - 2 * slope + s * (slope - 2 * (b - a))));
    return sameSign ? Math.sign(to.value) * Math.exp(y) : y;
  };
}
