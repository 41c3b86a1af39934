import { ONE, power, product, ratio, root, type Decimal } from './decimal';
import type { DecimalBinary } from './fits-in-decimals';
import { healy2014 } from './healy-2014';
import { healyTerms } from './healy-in-decimals';

const THREE = 3n * ONE;
const PASSES = 100;

/**
 * Spin of the hole whose innermost orbit lies at r = w²: r² − 6r + 8a√r − 3a² = 0 solved for a.
 * Shape:  w from 1 (a = 1) to 3 (a = −1).
 * Units:  w in roots of the hole's mass.
 * Error:  some in the last place.
 * Fails:  never.
 * Source: condition of the innermost stable orbit, Bardeen, Press & Teukolsky 1972 [from memory], turned round.
 */
const spinAt = (w: Decimal): Decimal => product(w, 4n * ONE - root(3n * product(w, w) - 2n * ONE)) / 3n;

/** 2(3√r − 2a)/√(3r). */
const momentumAt = (w: Decimal): Decimal => ratio(2n * (3n * w - 2n * spinAt(w)), product(root(THREE), w));

/** √(1 − 2/(3r)): what the energy becomes under the condition for the innermost orbit. */
const energyAt = (w: Decimal): Decimal => root(ONE - ratio(2n * ONE, 3n * product(w, w)));

/** The w at which fixed + share·L(w) is the spin a(w), by secants across a bracket whose idle end is halved in weight (Illinois rule). */
function orbitWhere(fixed: Decimal, share: Decimal): Decimal {
  const left = (w: Decimal): Decimal => fixed + product(share, momentumAt(w)) - spinAt(w);
  let [low, high] = [ONE, THREE];
  let [atLow, atHigh] = [left(low), left(high)];
  if (atLow >= 0n) return low;
  if (atHigh <= 0n) return high;
  let [before, w] = [high, low];
  for (let pass = 0; pass < PASSES && (w - before) ** 2n > 4n; pass++) {
    before = w;
    w = low - (atLow * (high - low)) / (atHigh - atLow);
    const here = left(w);
    if (here < 0n) {
      [low, atLow] = [w, here];
      if (w > before) atHigh /= 2n;
    } else {
      [high, atHigh] = [w, here];
      if (w < before) atLow /= 2n;
    }
  }
  return w;
}

/**
 * Mass and spin of Healy, Lousto & Zlochower, the orbit around the remnant solved for in √r.
 * Shape:  two decimals.
 * Units:  fraction of the total mass; dimensionless.
 * Error:  some in the last of forty places.
 * Fails:  never.
 * Source: the same coefficients as route A.
 */
export function healyMassAndSpin(binary: DecimalBinary): { readonly mass: Decimal; readonly spin: Decimal } {
  const { eta, delta, spin } = binary;
  const sixth = power(delta, 6);
  const fixed = healyTerms(healy2014.spin, binary) + product(spin, ONE + 8n * eta, power(delta, 4));
  const w = orbitWhere(fixed, product(eta, sixth));
  const orbit = product(ONE + product(eta, energyAt(w) + 11n * ONE), sixth);
  // Without a difference of masses the orbit has no part in the spin, which may then be none that an orbit has.
  return { mass: healyTerms(healy2014.mass, binary) + orbit, spin: fixed + product(eta, sixth, momentumAt(w)) };
}

export function buonanno({ eta, spin }: DecimalBinary): Decimal {
  return spinAt(orbitWhere(spin, eta));
}
