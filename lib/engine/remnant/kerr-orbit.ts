/**
 * Radius of the innermost stable circular orbit in the equatorial plane of a Kerr hole.
 * Shape:  one spin, negative for an orbit against it; returns a scalar.
 * Units:  masses of the hole.
 * Error:  rounding.
 * Fails:  not finite for |a| > 1.
 * Source: Bardeen, Press & Teukolsky 1972, ApJ 178, 347, Eq. (2.21) [from memory]; domain reference, appendix A.
 */
export function stableOrbit(a: number): number {
  const z1 = 1 + Math.cbrt(1 - a * a) * (Math.cbrt(1 + a) + Math.cbrt(1 - a));
  const z2 = Math.sqrt(3 * a * a + z1 * z1);
  return 3 + z2 - Math.sign(a) * Math.sqrt((3 - z1) * (3 + z1 + 2 * z2));
}

/** Energy of a test particle on that orbit, per rest mass. */
export function orbitEnergy(a: number): number {
  const r = stableOrbit(a);
  const turn = a * r ** -1.5;
  return (1 - 2 / r + turn) / Math.sqrt(1 - 3 / r + 2 * turn);
}

/** Its angular momentum, per rest mass and mass of the hole. */
export function orbitMomentum(a: number): number {
  const root = Math.sqrt(stableOrbit(a));
  return (2 * (3 * root - 2 * a)) / (Math.sqrt(3) * root);
}

/** The same before it is simplified by the condition for the innermost orbit. */
export function circularMomentum(a: number): number {
  const r = stableOrbit(a);
  const root = Math.sqrt(r);
  return (r * r - 2 * a * root + a * a) / (root * Math.sqrt(r * r - 3 * r + 2 * a * root));
}

const PASSES = 80;

/**
 * The spin a for which a falling function is a itself, by bisection.
 * Shape:  one number in [−1, 1].
 * Units:  dimensionless.
 * Error:  rounding.
 * Fails:  gives an end of the interval where the function stays on one side.
 * Source: definition.
 */
export function spinWhere(next: (a: number) => number): number {
  let [low, high] = [-1, 1];
  for (let pass = 0; pass < PASSES && high - low > 0; pass++) {
    const middle = (low + high) / 2;
    if (next(middle) > middle) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
