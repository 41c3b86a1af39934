import type { Binary } from '../synthesis/binary';
import { buonanno, healyMassAndSpin } from './orbits-in-decimals';
import { campanelli2007 } from './campanelli-2007';
import { decimal, ONE, power, product, ratio, root, sum, toNumber, type Decimal } from './decimal';
import { healyTerms } from './healy-in-decimals';
import { healy2017 } from './healy-2017';
import { husa2016 } from './husa-2016';
import { jimenez2017 } from './jimenez-2017';
import { keitel2017 } from './keitel-2017';

/** A binary in decimals; η comes from δ, and the weighted spin from squared masses. */
export interface DecimalBinary {
  readonly m1: Decimal;
  readonly m2: Decimal;
  readonly delta: Decimal;
  readonly eta: Decimal;
  readonly chi1: Decimal;
  readonly chi2: Decimal;
  readonly spin: Decimal;
  readonly weighted: Decimal;
}

/** The same binary, begun again from mass ratio and spins. */
export function inDecimals({ massRatio, chi1z, chi2z }: Binary): DecimalBinary {
  const q = decimal(massRatio);
  const [chi1, chi2] = [decimal(chi1z), decimal(chi2z)];
  const delta = ratio(q - ONE, q + ONE);
  const m1 = (ONE + delta) / 2n;
  const m2 = (ONE - delta) / 2n;
  const spin = product(m1, m1, chi1) + product(m2, m2, chi2);
  return { m1, m2, delta, eta: (ONE - product(delta, delta)) / 4n, chi1, chi2, spin, weighted: ratio(spin, product(m1, m1) + product(m2, m2)) };
}

/** Σ c·xⁿ with each power made by itself, the first being `from`. */
const powers = (x: Decimal, coefficients: readonly number[], from = 0): Decimal => sum(...coefficients.map((c, n) => product(decimal(c), power(x, n + from))));

const pan = {
  mass: ({ eta }: DecimalBinary): Decimal => ONE - product(ONE - ratio(root(8n * ONE), 3n * ONE), eta) + powers(eta, [-0.4333, -0.4392], 2),
  spin: ({ eta }: DecimalBinary): Decimal => product(2n * root(3n * ONE), eta) + powers(eta, [-3.871, 4.028], 2),
};

function husaEnergy({ eta, weighted }: DecimalBinary): Decimal {
  const [above, below] = [powers(eta, husa2016.above), powers(eta, husa2016.below)];
  return ratio(product(powers(eta, husa2016.energy), ONE + product(above, weighted)), ONE + product(below, weighted));
}

/** Sorted by powers of η instead of powers of S. */
function husaSpinOf({ eta, spin }: DecimalBinary): Decimal {
  const most = Math.max(...husa2016.spin.map((row) => row.length));
  return sum(...Array.from({ length: most }, (_, n) => product(power(eta, n), sum(...husa2016.spin.map((row, k) => product(decimal(row[n] ?? 0), power(spin, k)))))));
}

/** What a factor is at a test particle and at equal masses: f₀ at η = 0, `end` at η = 1/4. */
function between(eta: Decimal, [f0, f1]: readonly [number, number], end: 0 | 1): Decimal {
  const square = 16n * product(eta, eta);
  return product(decimal(f0), ONE - square) + product(decimal(f1), eta - 4n * product(eta, eta)) + BigInt(end) * square;
}

function differenceOf({ eta, delta, chi1, chi2, weighted }: DecimalBinary, [d10, d11, d20, d30, d31]: readonly [number, number, number, number, number], last: 1 | 3): Decimal {
  const apart = chi1 - chi2;
  const first = product(decimal(d10), power(eta, 2), delta, ONE + product(decimal(d11), eta), apart);
  const third = product(decimal(d30), weighted, power(eta, last), delta, ONE + product(decimal(d31), eta), apart);
  return first + third + product(decimal(d20), power(eta, 3), apart, apart);
}

function jimenezEnergy(binary: DecimalBinary): Decimal {
  const { eta, weighted: s } = binary;
  const { a, b, g, d, scale } = jimenez2017.energy;
  const terms = g.map((f, i) => product(decimal(scale[i]!), decimal(b[i]!), between(eta, f, 1), power(s, i === 3 ? 1 : i + 1)));
  const orbital = product(ONE - ratio(root(8n * ONE), 3n * ONE), eta) + powers(eta, a, 2);
  return ratio(product(orbital, sum(ONE, ...terms.slice(0, 3))), ONE + terms[3]!) + differenceOf(binary, d, 1);
}

function jimenezSpinOf(binary: DecimalBinary): Decimal {
  const { eta, weighted: s, spin } = binary;
  const { a, b, k, k5, d, scale, orbital } = jimenez2017.spin;
  const [square, cube] = [16n * product(eta, eta), 64n * power(eta, 3)];
  const factors = k.map(([f1, f2]) => product(decimal(f1), eta, ONE - square) + product(decimal(f2), eta, eta - 4n * product(eta, eta)) + cube);
  const fifth = product(decimal(k5[0]), ONE - cube) + product(decimal(k5[1]), eta, ONE - square) + cube;
  const terms = [...factors, fifth].map((f, i) => product(decimal(scale[i]!), decimal(b[i]!), f, power(s, i === 3 ? 1 : i + 1)));
  const above = product(2n * root(3n * ONE), eta) + product(decimal(orbital[0]), decimal(a[0]), power(eta, 2)) + product(decimal(orbital[1]), decimal(a[1]), power(eta, 3));
  const orbiting = ratio(above, ONE + product(decimal(orbital[2]), decimal(a[2]), eta));
  return spin + orbiting + ratio(sum(...terms.slice(0, 3)), ONE + terms[3]!) + differenceOf(binary, d, 3);
}

function keitel(binary: DecimalBinary): Decimal {
  const { eta, delta, chi1, chi2, weighted: s } = binary;
  const { scale, a, b, factors, d, g, h } = keitel2017;
  const [g1, g2, g6] = g.map((f, i) => product(decimal(factors[i]!), decimal(b[i]!), between(eta, f, 1))) as [Decimal, Decimal, Decimal];
  const [h3, h4, h7] = h.map((f) => between(eta, f, 0)) as [Decimal, Decimal, Decimal];
  const above = sum(product(g1, s), product(g2, s, s), product(h3, power(s, 3)), product(h4, power(s, 4)));
  const apart = chi1 - chi2;
  const unequal = product(decimal(d[0]), delta, apart) + product(decimal(d[2]), s, delta, apart) + product(decimal(d[1]), apart, apart);
  const whole = powers(eta, a) + ratio(above, sum(ONE, product(g6, s), product(h7, s, s))) + product(power(eta, 3), unequal);
  return product(decimal(scale), power(eta, 2), whole);
}

const healyPeak = (binary: DecimalBinary): Decimal => healyTerms(healy2017, binary) / 1000n;

/** cos ξ to forty places: the cosine of 145° is minus that of 35°, here by its series in radians. */
function cosineOf(degrees: number): Decimal {
  const x = ratio(product(decimal(degrees), PI), 180n * ONE);
  let [term, total] = [ONE, ONE];
  for (let n = 2; term !== 0n; n += 2) {
    term = -product(term, x, x) / BigInt(n * (n - 1));
    total += term;
  }
  return total;
}
const PI: Decimal = 31415926535897932384626433832795028841971n;

/** Speeds as two sides of a triangle: masses give δ, spins m₂χ₂ and m₁χ₁. */
function campanelli({ m1, m2, delta, eta, chi1, chi2 }: DecimalBinary): Decimal {
  const { a, b, h, xiDeg } = campanelli2007;
  const square = product(eta, eta);
  const masses = product(decimal(a), square, delta, ONE + product(decimal(b), eta));
  const spins = product(decimal(h), square, product(m1, chi1) - product(m2, chi2));
  return root(product(masses, masses) + product(spins, spins) + 2n * product(masses, spins, cosineOf(xiDeg)));
}

const inDoubles = (fit: (binary: DecimalBinary) => Decimal) => (binary: Binary): number => toNumber(fit(inDecimals(binary)));

/**
 * Route B of every published fit: decimals of forty places and other forms of the same algebra. Factors that
 * are given by their ends are interpolated between them, η and δ come from the mass ratio by other ways, sums
 * are sorted otherwise, and what a fit holds implicitly is solved for in the radius of the orbit.
 * Shape:  one binary; a scalar each.
 * Units:  as in route A.
 * Error:  10⁻¹⁵ of the value, the last step back to doubles.
 * Fails:  throws on what is not finite.
 * Source: the same coefficients as route A.
 */
export const inDecimalArithmetic = {
  panMass: inDoubles(pan.mass),
  panSpin: inDoubles(pan.spin),
  husaMass: inDoubles((binary) => ONE - husaEnergy(binary)),
  husaSpin: inDoubles(husaSpinOf),
  healyMass: inDoubles((binary) => healyMassAndSpin(binary).mass),
  healySpin: inDoubles((binary) => healyMassAndSpin(binary).spin),
  jimenezMass: inDoubles((binary) => ONE - jimenezEnergy(binary)),
  jimenezSpin: inDoubles(jimenezSpinOf),
  buonannoSpin: inDoubles(buonanno),
  keitelLuminosity: inDoubles(keitel),
  healyLuminosity: inDoubles(healyPeak),
  campanelliRecoil: inDoubles(campanelli),
} as const;
