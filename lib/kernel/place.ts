import { isFiniteNumber } from './finite';

/** The value of a swept setting at one point: a number, or a word of a setting that has words. */
export type SweptValue = number | string;

/** Where a point of a claim lies: the swept setting with its value, e.g. `{ totalMassMsun: 60 }` or `{ taper: 'none' }`; empty for a single number. */
export type Place = Readonly<Record<string, SweptValue>>;

/** Abscissae travel through decimal text, so equality is to nine digits and not to the bit; a word is itself. */
const ABSCISSA_TOLERANCE = 1e-9;

function sameValue(a: SweptValue | undefined, b: SweptValue | undefined): boolean {
  if (typeof a === 'string' || typeof b === 'string') return a === b;
  if (!isFiniteNumber(a) || !isFiniteNumber(b)) return false;
  return Math.abs(a - b) <= ABSCISSA_TOLERANCE * Math.max(Math.abs(a), Math.abs(b));
}

export function samePlace(a: Place, b: Place): boolean {
  const names = Object.keys(a);
  return names.length === Object.keys(b).length && names.every((name) => sameValue(a[name], b[name]));
}
