import type { ResponseGram } from '../../contract/route';
import { spinWeightedHarmonic } from '../../modes/spin-weighted-harmonic';
import type { ModeSpectrum } from './spectrum';

export interface Sight {
  readonly inclinationRad: number;
  readonly azimuthRad: number;
}

/** Σ weight·u·v* of two complex series. */
function product(u: HalfSpectrum, v: HalfSpectrum, weight: Float64Array): readonly [number, number] {
  let [re, im] = [0, 0];
  for (let i = 0; i < weight.length; i++) {
    const w = weight[i]!;
    re += w * (u.re[i]! * v.re[i]! + u.im[i]! * v.im[i]!);
    im += w * (u.im[i]! * v.re[i]! - u.re[i]! * v.im[i]!);
  }
  return [re, im];
}

interface HalfSpectrum {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** H(f) = X + iY and H(−f)* = X − iY of one mode. */
function halves({ spectrum: { xRe, xIm, yRe, yIm } }: ModeSpectrum): readonly [HalfSpectrum, HalfSpectrum] {
  const mix = (a: Float64Array, b: Float64Array, sign: number): Float64Array => a.map((x, i) => x + sign * b[i]!);
  return [
    { re: mix(xRe, yIm, -1), im: mix(xIm, yRe, 1) },
    { re: mix(xRe, yIm, 1), im: mix(xIm, yRe, -1) },
  ];
}

/** Σ_kl c_k M_kl d_l* for complex coefficients. */
function form(matrix: readonly (readonly (readonly [number, number])[])[], c: readonly (readonly [number, number])[], d: readonly (readonly [number, number])[]): readonly [number, number] {
  let [re, im] = [0, 0];
  for (let k = 0; k < c.length; k++) {
    for (let l = 0; l < d.length; l++) {
      const [mr, mi] = matrix[k]![l]!;
      const cr = c[k]![0] * d[l]![0] + c[k]![1] * d[l]![1];
      const ci = c[k]![1] * d[l]![0] - c[k]![0] * d[l]![1];
      re += cr * mr - ci * mi;
      im += cr * mi + ci * mr;
    }
  }
  return [re, im];
}

/**
 * Gram matrices of plus and cross on any line of sight, from sums over frequency taken once.
 * With p = z(f) and q = z(−f)*: x = (p + q)/2 and y = (p − q)/2i.
 * Shape:  modes on shared nodes; gives a function of the line of sight.
 * Units:  dimensionless (SNR²).
 * Error:  rounding; modes that cancel on a line of sight lose digits there as they do in the strain.
 * Fails:  never.
 * Source: settings.md rules 2.2 and 2.8; our algebra.
 */
export function modeGram(modes: readonly ModeSpectrum[], weight: Float64Array): (sight: Sight) => ResponseGram {
  const pairs = modes.map(halves);
  const table = (a: 0 | 1, b: 0 | 1) => pairs.map((u) => pairs.map((v) => product(u[a], v[b], weight)));
  const [pp, qq, pq] = [table(0, 0), table(1, 1), table(0, 1)];
  return ({ inclinationRad, azimuthRad }) => {
    const y = modes.map(({ l, m }) => {
      const { re, im } = spinWeightedHarmonic(l, m, inclinationRad, azimuthRad);
      return [re, im] as const;
    });
    const conjugate = y.map(([re, im]) => [re, -im] as const);
    const [p] = form(pp, y, y);
    const [q] = form(qq, conjugate, conjugate);
    const [crossRe, crossIm] = form(pq, y, conjugate);
    // h₊ = x, h× = −y; the prefactor 4 of the inner product meets the quarter of (p ± q)².
    return { plusPlus: p + q + 2 * crossRe, crossCross: p + q - 2 * crossRe, plusCross: -2 * crossIm };
  };
}
