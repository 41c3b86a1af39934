import type { JudgedClaim, JudgedPoint } from './node';

/**
 * What a claimed number could be if nothing that we know of explains it: x = from + sign · e^u with u uniform. Its size
 * lies within a factor 3 of the recomputed one; of a number that lives by its distance from one, that distance does
 * within a factor 10.
 */
export interface UnexplainedLaw {
  readonly from: 0 | 1;
  readonly sign: 1 | -1;
  readonly low: number;
  readonly high: number;
}

const SIZE = Math.log(3);
const DISTANCE = Math.log(10);

/** T + U in the unit of the number: below it nothing has a size. */
const leastSize = ({ scale }: JudgedClaim, { tolerance, expandedUncertainty, value }: JudgedPoint): number =>
  (scale === 'ln' ? tolerance * Math.abs(value) : tolerance) + expandedUncertainty;

export function lawAt(claim: JudgedClaim, point: JudgedPoint): UnexplainedLaw {
  const least = Math.max(leastSize(claim, point), 1e-300);
  return claim.law === 'distance-from-one' && point.claimed < 1 + least ? distanceLaw(point, least) : sizeLaw(point, least);
}

/** A claimed size that lies beyond a factor 3 widens the law just so far that it could be drawn. */
function sizeLaw({ value, claimed }: JudgedPoint, least: number): UnexplainedLaw {
  const middle = Math.log(Math.max(Math.abs(value), least));
  const away = Math.abs(Math.log(Math.max(Math.abs(claimed), least)) - middle);
  const width = Math.max(SIZE, away);
  return { from: 0, sign: value < 0 ? -1 : 1, low: middle - width, high: middle + width };
}

/** No match is below zero and no overlap below −1, so the law ends there. */
function distanceLaw({ value, claimed }: JudgedPoint, least: number): UnexplainedLaw {
  const distance = Math.max(1 - value, least);
  const own = Math.log(Math.max(1 - claimed, least));
  const most = Math.min(Math.log(distance) + DISTANCE, Math.log(distance > 1 ? 2 : 1));
  return { from: 1, sign: -1, low: Math.min(Math.log(distance) - DISTANCE, own), high: Math.max(most, own) };
}

/** The claimed value of a draw in (0, 1). */
export const drawn = ({ from, sign, low, high }: UnexplainedLaw, draw: number): number => from + sign * Math.exp(low + draw * (high - low));

/** ln of the density at the claimed value, on the scale of the claim. */
export function lnDensity(claim: JudgedClaim, point: JudgedPoint): number {
  const { from, low, high } = lawAt(claim, point);
  const size = Math.max(Math.abs(point.claimed - from), leastSize(claim, point), 1e-300);
  return -Math.log(high - low) - Math.log(size) + (claim.scale === 'ln' ? Math.log(Math.abs(point.claimed)) : 0);
}
