/**
 * Quasi-normal frequencies of Kerr holes by Leaver's two continued fractions, for checking the engine's
 * table: one fraction in angle, one in radius, solved together by Newton's method with the spin raised
 * in small steps from the Schwarzschild value. Shares nothing with the table's interpolation.
 * Source: Leaver 1985, Proc. R. Soc. Lond. A 402, 285, Eqs. (20), (21), (25)–(27) [from memory]; units 2M = 1 there.
 */
interface Complex {
  readonly re: number;
  readonly im: number;
}
const c = (re: number, im = 0): Complex => ({ re, im });
const add = (...terms: readonly Complex[]): Complex => terms.reduce((x, y) => c(x.re + y.re, x.im + y.im));
const times = (x: Complex, y: Complex): Complex => c(x.re * y.re - x.im * y.im, x.re * y.im + x.im * y.re);
const by = (k: number, x: Complex): Complex => c(k * x.re, k * x.im);
const minus = (x: Complex, y: Complex): Complex => c(x.re - y.re, x.im - y.im);
const over = (x: Complex, y: Complex): Complex => by(1 / (y.re * y.re + y.im * y.im), times(x, c(y.re, -y.im)));
const turned = (x: Complex): Complex => c(-x.im, x.re);

type Row = (n: number) => Complex;
const TERMS = 200;

/** β₀ − α₀γ₁/(β₁ − α₁γ₂/(…)) inverted at index k: the tail from above less the finite fraction from below. */
function fraction(alpha: Row, beta: Row, gamma: Row, k: number): Complex {
  let above = c(-1);
  for (let n = TERMS; n > k; n--) above = over(gamma(n), minus(beta(n), times(alpha(n), above)));
  let below = c(0);
  for (let n = 1; n <= k; n++) below = over(times(alpha(n - 1), gamma(n)), minus(beta(n - 1), below));
  return minus(minus(beta(k), times(alpha(k), above)), below);
}

const S = -2;

function angular(l: number, m: number, aw: Complex, separation: Complex): Complex {
  const [k1, k2] = [Math.abs(m - S) / 2, Math.abs(m + S) / 2];
  const k = k1 + k2;
  const alpha: Row = (n) => c(-2 * (n + 1) * (n + 2 * k1 + 1));
  const beta: Row = (n) => add(c(n * (n - 1) + 2 * n * (k + 1) + k * (k + 1) - S * (S + 1)), by(-4 * n - 2 * (2 * k1 + S + 1), aw), by(-1, times(aw, aw)), by(-1, separation));
  const gamma: Row = (n) => by(2 * (n + k + S), aw);
  return fraction(alpha, beta, gamma, l - Math.max(Math.abs(m), Math.abs(S)));
}

/** ω and a in units of 2M. */
function radial(m: number, a: number, w: Complex, separation: Complex): Complex {
  const b = Math.sqrt(1 - 4 * a * a);
  const iw = turned(w);
  const share = by(2 / b, minus(by(0.5, w), c(a * m)));
  const c0 = minus(minus(c(1 - S), iw), turned(share));
  const c1 = add(c(-4), by(2 * (2 + b), iw), by(2, turned(share)));
  const c2 = minus(minus(c(S + 3), by(3, iw)), turned(share));
  const c3 = add(by(4 + 2 * b - a * a, times(w, w)), by(-2 * a * m, w), c(-S - 1), by(2 + b, iw), by(-1, separation), times(add(by(2, w), c(0, 1)), share));
  const c4 = minus(minus(minus(c(S + 1), by(2, times(w, w))), by(2 * S + 3, iw)), times(add(by(2, w), c(0, 1)), share));
  const alpha: Row = (n) => add(c(n * n + n), by(n + 1, c0));
  const beta: Row = (n) => add(c(-2 * n * n + 2 * n), by(n, c1), c3);
  const gamma: Row = (n) => add(c(n * n - 3 * n + 2), by(n - 1, c2), c4);
  return fraction(alpha, beta, gamma, 0);
}

/** Newton's method in the two complex unknowns ω and A, slopes by differences. */
function solved(l: number, m: number, a: number, from: readonly [Complex, Complex]): [Complex, Complex] {
  let [w, A] = from;
  const both = (x: Complex, y: Complex): [Complex, Complex] => [radial(m, a, x, y), angular(l, m, by(a, x), y)];
  for (let pass = 0; pass < 30; pass++) {
    const step = 1e-6;
    const [f, g] = both(w, A);
    const [fw, gw] = both(add(w, c(step)), A).map((value, i) => by(1 / step, minus(value, [f, g][i]!))) as [Complex, Complex];
    const [fa, ga] = both(w, add(A, c(step))).map((value, i) => by(1 / step, minus(value, [f, g][i]!))) as [Complex, Complex];
    const det = minus(times(fw, ga), times(fa, gw));
    const dw = over(minus(times(f, ga), times(fa, g)), det);
    const dA = over(minus(times(fw, g), times(f, gw)), det);
    [w, A] = [minus(w, dw), minus(A, dA)];
    if (Math.hypot(dw.re, dw.im) < 1e-14) break;
  }
  return [w, A];
}

const schwarzschild: Readonly<Record<number, Complex>> = { 2: c(2 * 0.37367, -2 * 0.08896), 3: c(2 * 0.59944, -2 * 0.0927), 4: c(2 * 0.80918, -2 * 0.09416) };

/** Mω_R and Mω_I > 0 of the fundamental tones at each spin, which must move away from 0 in one direction. */
export function kerrTones(l: number, m: number, spins: readonly number[]): { readonly real: number; readonly imag: number }[] {
  let state: [Complex, Complex] = [schwarzschild[l]!, c(l * (l + 1) - S * (S + 1))];
  let here = 0;
  return spins.map((spin) => {
    const steps = Math.max(1, Math.ceil(Math.abs(spin - here) / 0.1));
    for (let i = 1; i <= steps; i++) state = solved(l, m, (here + ((spin - here) * i) / steps) / 2, state);
    here = spin;
    const [w] = state;
    return { real: w.re / 2, imag: -w.im / 2 };
  });
}
