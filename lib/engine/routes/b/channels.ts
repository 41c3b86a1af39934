import type { Response } from '../../contract/settings';
import type { Spectrum } from './spectrum';

/**
 * What enters an inner product: one real response, or the two halves z(f) and z(−f)* of a complex
 * one. Rotating b's z by e^{iα} multiplies the first half by e^{iα} and the second by e^{−iα}.
 */
export interface Channel {
  /** 4 for one real response, 2 for each half of a complex one. */
  readonly prefactor: 2 | 4;
  readonly turn: 1 | -1;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const combine = (n: number, a: number, x: Float64Array, b: number, y: Float64Array): Float64Array => {
  const out = new Float64Array(n);
  for (let i = 0; i < n; i++) out[i] = a * x[i]! + b * y[i]!;
  return out;
};

/** h₊ = x and h× = −y. */
export function channelsOf(spectrum: Spectrum, response: Response): Channel[] {
  const { xRe, xIm, yRe, yIm } = spectrum;
  const n = xRe.length;
  if (response === 'complex') {
    return [
      { prefactor: 2, turn: 1, re: combine(n, 1, xRe, -1, yIm), im: combine(n, 1, xIm, 1, yRe) },
      { prefactor: 2, turn: -1, re: combine(n, 1, xRe, 1, yIm), im: combine(n, 1, xIm, -1, yRe) },
    ];
  }
  const plus = response === 'plus' ? 1 : response === 'cross' ? 0 : response.plus;
  const cross = response === 'plus' ? 0 : response === 'cross' ? 1 : response.cross;
  return [{ prefactor: 4, turn: 1, re: combine(n, plus, xRe, -cross, yRe), im: combine(n, plus, xIm, -cross, yIm) }];
}

/** ‖·‖² of a set of channels. */
export function normSquared(channels: readonly Channel[], weight: Float64Array): number {
  let total = 0;
  for (const { prefactor, re, im } of channels) {
    let sum = 0;
    for (let i = 0; i < weight.length; i++) sum += weight[i]! * (re[i]! * re[i]! + im[i]! * im[i]!);
    total += prefactor * sum;
  }
  return total;
}

/** How b is moved against a: later by `shiftS`, its z turned by `turnRad`. */
export interface Alignment {
  readonly shiftS: number;
  readonly turnRad: number;
}

/**
 * ‖a/A − b/B moved‖², summed as it stands: no difference of nearly equal sums.
 * Shape:  a and b have the same channels on the nodes f.
 * Units:  f in Hz, weight 1/Hz over S; dimensionless.
 * Error:  rounding of order 1e-15 of each term, so 1e-15 of the residual plus 1e-31.
 * Fails:  never.
 * Source: definition of the mismatch (Q03).
 */
export function residualSquared(a: readonly Channel[], A: number, b: readonly Channel[], B: number, f: Float64Array, weight: Float64Array, move: Alignment): number {
  let total = 0;
  for (let c = 0; c < a.length; c++) {
    const [p, q] = [a[c]!, b[c]!];
    let sum = 0;
    for (let i = 0; i < f.length; i++) {
      const angle = p.turn * move.turnRad - 2 * Math.PI * f[i]! * move.shiftS;
      const [co, si] = [Math.cos(angle) / B, Math.sin(angle) / B];
      const re = p.re[i]! / A - (q.re[i]! * co - q.im[i]! * si);
      const im = p.im[i]! / A - (q.re[i]! * si + q.im[i]! * co);
      sum += weight[i]! * (re * re + im * im);
    }
    total += p.prefactor * sum;
  }
  return total;
}
