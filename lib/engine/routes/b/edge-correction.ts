/**
 * What the plain sum Σ h(t_n)e^{−iωt_n} misses where the series starts, ends or has a kink. The
 * difference between a half-infinite sum and the integral of u^k e^{−xu} is known in closed form
 * (generating function of the Bernoulli polynomials), so the sum becomes as good at an edge as a
 * polynomial of degree 7 through eight samples there.
 */
export interface Edge {
  /** Time of the edge from the middle of the series, in steps. */
  readonly at: number;
  /** +1: the function lives after the edge, −1: before it. */
  readonly inward: 1 | -1;
  /** Distance of the first grid point inward from the edge, in steps, in [0, 1). */
  readonly offset: number;
  /** Taylor coefficients of the two series in inward steps. */
  readonly x: Float64Array;
  readonly y: Float64Array;
}

const TERMS = 64;

/** B_j(s)/j!, from the Fourier series of the Bernoulli polynomials; closed forms where that converges slowly. */
function scaledBernoulli(j: number, s: number): number {
  if (j === 1) return s - 0.5;
  if (j === 2) return (s * s - s + 1 / 6) / 2;
  if (j === 3) return (s * (s - 0.5) * (s - 1)) / 6;
  if (j === 4) return (s * s * (s - 1) ** 2 - 1 / 30) / 24;
  if (j === 5) return (s * (s - 0.5) * (s - 1) * (s * s - s - 1 / 3)) / 120;
  if (j === 6) return (s * s * (s * s * (s * s - 3 * s + 2.5) - 0.5) + 1 / 42) / 720;
  if (j === 7) return (s * (s * s * (s * s * (s * s - 3.5 * s + 3.5) - 7 / 6) + 1 / 6)) / 5040;
  let sum = 0;
  for (let n = 1; n ** -j > 1e-18; n++) sum += Math.cos(2 * Math.PI * n * s - (Math.PI * j) / 2) * n ** -j;
  return -2 * sum * (2 * Math.PI) ** -j;
}

/** Coefficients e_m of the correction Σ e_m x^m for a function Σ c_k u^k. */
function correctionSeries(taylor: Float64Array, beta: Float64Array): Float64Array {
  const series = new Float64Array(TERMS - taylor.length);
  for (let m = 0; m < series.length; m++) {
    let sum = 0;
    let rising = 1;
    for (let k = 0; k < taylor.length; k++) {
      sum -= (k % 2 === 0 ? 1 : -1) * taylor[k]! * beta[m + k + 1]! * rising;
      rising *= m + k + 1;
    }
    series[m] = sum;
  }
  return series;
}

/** Σ e_m (i·theta)^m as [re, im]. */
function atImaginary(series: Float64Array, theta: number): readonly [number, number] {
  const t2 = -theta * theta;
  let even = 0;
  let odd = 0;
  for (let m = series.length - 1; m >= 0; m--) {
    if (m % 2 === 0) even = series[m]! + t2 * even;
    else odd = series[m]! + t2 * odd;
  }
  return [even, theta * odd];
}

/**
 * The correction of one edge as a function of angle per step, for both series.
 * Shape:  theta = 2πf·step in [0, π]; out receives x re, x im, y re, y im to be added to the sums.
 * Units:  sample unit (multiply by the step as the sum is).
 * Error:  that of the degree-7 polynomial at the edge; the series in theta is exact to 1e-13 for theta ≤ π/2.
 * Fails:  never.
 * Source: Euler–Maclaurin summation with an oscillating factor; our derivation.
 */
export function edgeCorrection(edge: Edge): (theta: number, out: Float64Array) => void {
  const beta = Float64Array.from({ length: TERMS + 1 }, (_, j) => (j === 0 ? 1 : scaledBernoulli(j, 1 - edge.offset)));
  const xs = correctionSeries(edge.x, beta);
  const ys = correctionSeries(edge.y, beta);
  return (theta, out) => {
    const [ar, ai] = atImaginary(xs, edge.inward * theta);
    const [br, bi] = atImaginary(ys, edge.inward * theta);
    const c = Math.cos(theta * edge.at);
    const s = -Math.sin(theta * edge.at);
    out[0] = ar * c - ai * s;
    out[1] = ar * s + ai * c;
    out[2] = br * c - bi * s;
    out[3] = br * s + bi * c;
  };
}

/**
 * Monomial coefficients of the polynomial through (u_i, v_i), by Newton's divided differences.
 * Shape:  as many coefficients as points.
 * Units:  those of v over powers of those of u.
 * Error:  that of the polynomial.
 * Fails:  never for distinct points.
 * Source: Newton [textbook].
 */
export function taylorThrough(u: Float64Array, v: Float64Array): Float64Array {
  const n = u.length;
  const d = Float64Array.from(v);
  for (let k = 1; k < n; k++) for (let i = n - 1; i >= k; i--) d[i] = (d[i]! - d[i - 1]!) / (u[i]! - u[i - k]!);
  const c = new Float64Array(n);
  for (let i = n - 1; i >= 0; i--) {
    for (let k = n - 1; k > 0; k--) c[k] = c[k - 1]! - u[i]! * c[k]!;
    c[0] = d[i]! - u[i]! * c[0]!;
  }
  return c;
}
