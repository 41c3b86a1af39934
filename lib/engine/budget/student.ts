/** ln Γ by Lanczos' series; 1e-13 for the half-integers that are asked for here. */
const LANCZOS = [676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059, 12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7];

function logGamma(x: number): number {
  const y = x - 1;
  const sum = LANCZOS.reduce((total, c, i) => total + c / (y + i + 1), 0.99999999999980993);
  const t = y + LANCZOS.length - 0.5;
  return 0.5 * Math.log(2 * Math.PI) + (y + 0.5) * Math.log(t) - t + Math.log(sum);
}

const STEPS = 300;
const SMALL = 1e-300;

/** Continued fraction of the incomplete beta function, by the modified Lentz method. */
function betaFraction(a: number, b: number, x: number): number {
  const apart = (y: number): number => (Math.abs(y) < SMALL ? SMALL : y);
  let c = 1;
  let d = 1 / apart(1 - ((a + b) * x) / (a + 1));
  let product = d;
  for (let m = 1; m <= STEPS; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    for (const term of [even, odd]) {
      d = 1 / apart(1 + term * d);
      c = apart(1 + term / c);
      product *= c * d;
    }
    if (Math.abs(c * d - 1) < 1e-16) break;
  }
  return product;
}

function regularisedBeta(a: number, b: number, x: number): number {
  if (!(x > 0)) return 0;
  if (!(x < 1)) return 1;
  const front = Math.exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x));
  return x < (a + 1) / (a + b + 2) ? (front * betaFraction(a, b, x)) / a : 1 - (front * betaFraction(b, a, 1 - x)) / b;
}

/** Probability that |t| of so many degrees of freedom stays below a limit. */
const within = (t: number, freedom: number): number => 1 - regularisedBeta(freedom / 2, 0.5, freedom / (freedom + t * t));

/** Two standard deviations of a normal distribution hold this much, to the digits of the published table. */
export const TWO_SIGMA = 0.9545;

const HALVINGS = 80;

/**
 * Student's factor: |t| stays below it with the probability given.
 * Shape:  one number.
 * Units:  none.
 * Error:  1e-10 relative.
 * Fails:  never; degrees of freedom below one give the factor of one.
 * Source: JCGM 100:2008, table G.2; incomplete beta function by its continued fraction (from memory).
 */
export function studentFactor(freedom: number, probability = TWO_SIGMA): number {
  const degrees = Math.max(1, freedom);
  let [low, high] = [0, 1];
  while (within(high, degrees) < probability) high *= 2;
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    if (within(middle, degrees) < probability) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}

/** From here on the normal factor serves (domain reference 5.2). */
const MANY = 30;

/** k for an expanded uncertainty of 95.45 %: 2, or Student's factor where the degrees of freedom are few; they are cut to a whole number. */
export const coverageFactor = (freedom: number): number => (freedom >= MANY ? 2 : studentFactor(Math.floor(freedom)));
