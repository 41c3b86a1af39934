/**
 * Route B of the detector quantities: its own interpolation (global B-splines), its own
 * transform (direct Fourier sums, blocked so that they stay affordable), its own quadrature
 * (Gauss panels between the kinks of the noise curve) and its own search (residual
 * minimisation). It shares with route A the parsed samples, the harmonics, the noise rule and
 * the numbers of the taper window, and nothing else. This file: the interpolation.
 */

/** Degree 7: at ten samples a cycle its error is 2e-8 of the amplitude, a cubic's 4e-4. */
const DEGREE = 7;

export interface SplineBasis {
  readonly degree: number;
  readonly knots: Float64Array;
  /** LU factors of the collocation matrix by diagonals, `2 * half + 1` a row. */
  readonly factors: Float64Array;
  readonly half: number;
  readonly n: number;
}

export interface Spline {
  readonly basis: SplineBasis;
  readonly coefficients: Float64Array;
}

/** Not-a-knot: the (degree − 1)/2 sites next to each end carry no knot. */
function knotsFor(sites: Float64Array, degree: number): Float64Array {
  const n = sites.length;
  const knots = new Float64Array(n + degree + 1);
  const left = (degree + 1) / 2;
  for (let i = 0; i <= degree; i++) {
    knots[i] = sites[0]!;
    knots[n + i] = sites[n - 1]!;
  }
  for (let i = degree + 1; i < n; i++) knots[i] = sites[i - left]!;
  return knots;
}

/** The degree + 1 basis functions that live at x, by the Cox–de Boor triangle, into `out`. */
function basisAt(knots: Float64Array, degree: number, span: number, x: number, out: Float64Array): void {
  out[0] = 1;
  for (let d = 1; d <= degree; d++) {
    let saved = 0;
    for (let r = 0; r < d; r++) {
      const right = knots[span + r + 1]!;
      const left = knots[span + 1 - d + r]!;
      const share = out[r]! / (right - left);
      out[r] = saved + (right - x) * share;
      saved = (x - left) * share;
    }
    out[d] = saved;
  }
}

const spanFrom = (knots: Float64Array, last: number, from: number, x: number): number => {
  let span = from;
  while (span < last && x >= knots[span + 1]!) span++;
  return span;
};

/**
 * Collocation matrix of the interpolating spline on strictly increasing sites, factored once an axis.
 * Shape:  n sites (n ≥ 2); degree 7, or the highest odd degree below n.
 * Units:  those of the axis.
 * Error:  none of its own: totally positive, so elimination without exchanges is stable.
 * Fails:  never on a strictly increasing axis.
 * Source: de Boor, A Practical Guide to Splines (1978), chapter XIII [from memory].
 */
export function splineBasis(sites: Float64Array): SplineBasis {
  const n = sites.length;
  const degree = Math.min(DEGREE, n % 2 === 0 ? n - 1 : n - 2) || 1;
  // Near the ends, where sites carry no knot, the band is as wide as the degree allows.
  const half = degree - 1;
  const width = 2 * half + 1;
  const knots = knotsFor(sites, degree);
  const factors = new Float64Array(n * width);
  const values = new Float64Array(degree + 1);
  let span = degree;
  for (let i = 0; i < n; i++) {
    span = spanFrom(knots, n - 1, span, sites[i]!);
    basisAt(knots, degree, span, sites[i]!, values);
    for (let j = 0; j <= degree; j++) {
      const column = span - degree + j - i + half;
      if (column >= 0 && column < width) factors[i * width + column] = values[j]!;
    }
  }
  eliminate(factors, n, half);
  return { degree, knots, factors, half, n };
}

function eliminate(factors: Float64Array, n: number, half: number): void {
  const width = 2 * half + 1;
  for (let pivot = 0; pivot < n; pivot++) {
    const top = factors[pivot * width + half]!;
    for (let row = pivot + 1; row <= Math.min(n - 1, pivot + half); row++) {
      const at = row * width + half - row;
      const ratio = factors[at + pivot]! / top;
      factors[at + pivot] = ratio;
      if (ratio === 0) continue;
      for (let column = pivot + 1; column <= Math.min(n - 1, pivot + half); column++) {
        factors[at + column] = factors[at + column]! - ratio * factors[pivot * width + half + column - pivot]!;
      }
    }
  }
}

/**
 * The spline through samples at the sites of a basis.
 * Shape:  one sample a site.
 * Units:  those of the samples.
 * Error:  (ωΔt)⁸·8e-7 of the amplitude at the local step Δt.
 * Fails:  never.
 * Source: as splineBasis.
 */
export function fitSpline(basis: SplineBasis, samples: Float64Array): Spline {
  const { n, half, factors } = basis;
  const width = 2 * half + 1;
  const c = Float64Array.from(samples);
  for (let row = 0; row < n; row++) {
    let sum = c[row]!;
    for (let j = Math.max(0, row - half); j < row; j++) sum -= factors[row * width + half + j - row]! * c[j]!;
    c[row] = sum;
  }
  for (let row = n - 1; row >= 0; row--) {
    let sum = c[row]!;
    for (let j = row + 1; j <= Math.min(n - 1, row + half); j++) sum -= factors[row * width + half + j - row]! * c[j]!;
    c[row] = sum / factors[row * width + half]!;
  }
  return { basis, coefficients: c };
}

/**
 * Spline of the first derivative: one degree lower on the inner knots.
 * Shape:  one coefficient fewer.
 * Units:  sample unit over axis unit.
 * Error:  one order below the spline's.
 * Fails:  never for two sites or more.
 * Source: as splineBasis.
 */
export function derivativeOf(spline: Spline): Spline {
  const { degree, knots, n } = spline.basis;
  const c = new Float64Array(n - 1);
  for (let i = 0; i < n - 1; i++) {
    const gap = knots[i + degree + 1]! - knots[i + 1]!;
    c[i] = (degree * (spline.coefficients[i + 1]! - spline.coefficients[i]!)) / gap;
  }
  const basis = { ...spline.basis, degree: degree - 1, knots: knots.slice(1, -1), n: n - 1 };
  return { basis, coefficients: c };
}

/**
 * Spline of the integral from the first site: one degree higher, its end knots repeated once more.
 * Shape:  one coefficient more.
 * Units:  sample unit times axis unit.
 * Error:  one order above the spline's.
 * Fails:  never.
 * Source: as splineBasis.
 */
export function antiderivativeOf(spline: Spline): Spline {
  const { degree, knots, n } = spline.basis;
  const c = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) c[i + 1] = c[i]! + (spline.coefficients[i]! * (knots[i + degree + 1]! - knots[i]!)) / (degree + 1);
  const wider = new Float64Array(knots.length + 2);
  wider.set(knots, 1);
  wider[0] = knots[0]!;
  wider[wider.length - 1] = knots[knots.length - 1]!;
  return { basis: { ...spline.basis, degree: degree + 1, knots: wider, n: n + 1 }, coefficients: c };
}

/** First span whose upper knot lies above x: points may begin far into a long axis. */
function spanOf(knots: Float64Array, from: number, last: number, x: number): number {
  let [low, high] = [from, last];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (knots[middle + 1]! > x) high = middle;
    else low = middle + 1;
  }
  return low;
}

/**
 * Values of splines that share a basis at ascending points inside the axis.
 * Shape:  one row of `points.length` a spline.
 * Units:  those of the samples.
 * Error:  rounding; the interpolation error is that of the fit.
 * Fails:  never; points outside the axis continue the end pieces.
 * Source: as splineBasis.
 */
export function evaluateSplines(splines: readonly Spline[], points: Float64Array): Float64Array[] {
  const rows = splines.map(() => new Float64Array(points.length));
  const basis = splines[0]?.basis;
  if (basis === undefined) return rows;
  const { degree, knots, n } = basis;
  const values = new Float64Array(degree + 1);
  let span = points.length === 0 ? degree : spanOf(knots, degree, n - 1, points[0]!);
  for (let p = 0; p < points.length; p++) {
    span = spanFrom(knots, n - 1, span, points[p]!);
    basisAt(knots, degree, span, points[p]!, values);
    for (let s = 0; s < splines.length; s++) {
      const c = splines[s]!.coefficients;
      let sum = 0;
      for (let j = 0; j <= degree; j++) sum += values[j]! * c[span - degree + j]!;
      rows[s]![p] = sum;
    }
  }
  return rows;
}
