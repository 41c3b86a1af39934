import type { Element } from './sight-elements';

/** Terms of a Taylor series in the shift; below 2.5 rad of phase the last is 1e-14. */
export const TERMS = 24;
export const SERIES_PHASE = 2.5;

/** All pairs' correlations about one shift: coefficients of (shift − centre)^p, interleaved re, im by [pair][p]. */
export interface ShiftSeries {
  readonly centre: number;
  readonly coefficients: Float64Array;
}

/** Powers (2πf·unit)^p/p! by [node][p]: with the shift in units, coefficients stay of one size. */
function powers(f: Float64Array, unit: number): Float64Array {
  const out = new Float64Array(f.length * TERMS);
  for (let i = 0; i < f.length; i++) {
    const x = 2 * Math.PI * f[i]! * unit;
    let term = 1;
    for (let p = 0; p < TERMS; p++) {
      out[i * TERMS + p] = term;
      term *= x / (p + 1);
    }
  }
  return out;
}

/** i^p (re + i·im), added to the p-th coefficient; conjugated where the content lies at −f. */
function addTerm(re: number, im: number, p: number, conjugate: boolean, out: Float64Array, at: number): void {
  const [a, b] = p % 4 === 0 ? [re, im] : p % 4 === 1 ? [-im, re] : p % 4 === 2 ? [-re, -im] : [im, -re];
  out[at] = out[at]! + a;
  out[at + 1] = out[at + 1]! + (conjugate ? -b : b);
}

/** Σ w a b* e^{2πifs} by node. */
function turned(a: readonly [Float64Array, Float64Array], b: readonly [Float64Array, Float64Array], weight: Float64Array, cos: Float64Array, sin: Float64Array): readonly [Float64Array, Float64Array] {
  const re = new Float64Array(weight.length);
  const im = new Float64Array(weight.length);
  for (let i = 0; i < weight.length; i++) {
    const x = weight[i]! * (a[0][i]! * b[0][i]! + a[1][i]! * b[1][i]!);
    const y = weight[i]! * (a[1][i]! * b[0][i]! - a[0][i]! * b[1][i]!);
    re[i] = x * cos[i]! - y * sin[i]!;
    im[i] = x * sin[i]! + y * cos[i]!;
  }
  return [re, im];
}

function moments([re, im]: readonly [Float64Array, Float64Array], power: Float64Array, conjugate: boolean, out: Float64Array, at: number): void {
  const terms = TERMS;
  const sumRe = new Float64Array(terms);
  const sumIm = new Float64Array(terms);
  for (let i = 0; i < re.length; i++) {
    const [x, y, base] = [re[i]!, im[i]!, i * terms];
    for (let p = 0; p < terms; p++) {
      const size = power[base + p]!;
      sumRe[p] = sumRe[p]! + size * x;
      sumIm[p] = sumIm[p]! + size * y;
    }
  }
  for (let p = 0; p < terms; p++) addTerm(sumRe[p]!, sumIm[p]!, p, conjugate, out, at + 2 * p);
}

/**
 * Correlations of every pair of parts as power series in the shift of b, from moments over the quadrature nodes.
 * Shape:  `unitS` is half the width over which the series is used; coefficients belong to (shift − centre)/unitS.
 * Units:  f in Hz, shifts in s.
 * Error:  2.5^24/24! of what turns by 2.5 rad over the unit; the rest of the content enters by its own share.
 * Fails:  never.
 * Source: Σ q e^{2πif(s₀+τ)} = Σ_p τ^p Σ q (2πif)^p e^{2πifs₀}/p!.
 */
export function shiftSeries(a: readonly Element[], b: readonly Element[], f: Float64Array, weight: Float64Array, centre: number, unitS: number): ShiftSeries {
  const power = powers(f, unitS);
  const cos = f.map((x) => Math.cos(2 * Math.PI * x * centre));
  const sin = f.map((x) => Math.sin(2 * Math.PI * x * centre));
  const coefficients = new Float64Array(2 * TERMS * a.length * b.length);
  a.forEach((u, j) =>
    b.forEach((v, k) => {
      const at = 2 * TERMS * (j * b.length + k);
      moments(turned([u.pRe, u.pIm], [v.pRe, v.pIm], weight, cos, sin), power, false, coefficients, at);
      moments(turned([u.qRe, u.qIm], [v.qRe, v.qIm], weight, cos, sin), power, true, coefficients, at);
    }),
  );
  return { centre, coefficients };
}
