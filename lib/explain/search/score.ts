import type { Node } from './node';
import { lnDensity } from './unexplained';
import { uncertaintyBeside, type ScaledClaim } from './scaled-claim';

const EVIDENCE = { supports: Math.log(10), contradicts: -Math.log(10), none: 0 } as const;

/** ln of π and of what headers and statement say. */
export const lnPrior = ({ flips }: Node): number => flips.reduce((sum, { prior, evidence }) => sum + Math.log(prior) + EVIDENCE[evidence], 0);

/**
 * The part of T, without digits, that counts as one standard deviation. T says what its author calls agreement, and two
 * careful computations lie well inside it: at a third the edge of a fit is three deviations away. Between a twelfth and a
 * half the calibration hardly moves (the planted reading comes first in 96 to 98 % of claims of several points).
 */
const OF_TOLERANCE = 1 / 3;
/** U belongs to one set of files and moves all points together, but not only so: half of its square is common. */
const COMMON = 0.5;
const LEAST = 1e-12;

/** ln of the likelihood of the claimed numbers under a prediction; one shared error and independent rest, in closed form. */
export function lnLikelihood(scaled: ScaledClaim, row: Float64Array): number {
  let [chi, logs, coupling, shared] = [0, 0, 0, 0];
  for (let i = 0; i < row.length; i++) {
    const y = row[i]!;
    const r = scaled.claimed[i]! - y;
    const u = uncertaintyBeside(scaled, i, y) / 2;
    const half = scaled.halfDigit[i]!;
    const slack = Math.max(0, scaled.tolerance[i]! - half) * OF_TOLERANCE;
    const variance = half ** 2 / 3 + slack ** 2 + (1 - COMMON) * u ** 2 + (LEAST * Math.max(1, Math.abs(y))) ** 2;
    const common = Math.sqrt(COMMON) * u;
    chi += r ** 2 / variance;
    logs += Math.log(2 * Math.PI * variance);
    coupling += (r * common) / variance;
    shared += common ** 2 / variance;
  }
  return -0.5 * (chi - coupling ** 2 / (1 + shared)) - 0.5 * (logs + Math.log1p(shared));
}

export const lnUnexplained = ({ claim }: ScaledClaim): number => claim.points.reduce((sum, point) => sum + lnDensity(claim, point), 0);

/** Beyond nine powers of ten the model behind the odds is not to be believed. */
const MOST = 9 * Math.LN10;

/** One significant digit, which is all that they are worth. */
export const oddsOf = (lnOdds: number): number => Number(Math.exp(Math.min(MOST, Math.max(-MOST, lnOdds))).toPrecision(1));
