import { err, ok, type Result } from '@/lib/kernel/result';

/** Three grid spacings (or what is proportional to them), coarsest first. */
export type Spacings = readonly [coarsest: number, middle: number, finest: number];
export type OfThree = readonly [coarsest: number, middle: number, finest: number];

/** Beyond this an order is no order: differences of such a series are rounding or chance. */
export const LARGEST_ORDER = 20;

const SMALLEST_ORDER = 1e-9;
const HALVINGS = 100;

/**
 * By what factor differences between neighbours shrink when the error is one power of the spacing.
 * Shape:  (h₁^p − h₂^p)/(h₂^p − h₃^p), one number; it grows with p.
 * Units:  spacings in any one unit.
 * Error:  rounding only.
 * Fails:  never; not finite for spacings that are not.
 * Source: Q20; ratios 2.333 (p = 4) and 1.658 (p = 2) for 80, 96 and 112 points per unit.
 */
export const predictedRatio = (order: number, [h1, h2, h3]: Spacings): number => Math.expm1(order * Math.log(h1 / h2)) / -Math.expm1(-order * Math.log(h2 / h3));

/**
 * The order p > 0 at which differences shrink by the ratio seen, by bracketing up to p = 20.
 * Shape:  one number.
 * Units:  none.
 * Error:  bracketed to the last digit.
 * Fails:  with the reason, as the end of a sentence that begins with what was compared.
 * Source: Q20; settings.md section 6.
 */
export function orderFromRatio(ratio: number, spacings: Spacings): Result<number, string> {
  const [h1, h2, h3] = spacings;
  if (!(h1 > h2 && h2 > h3 && h3 > 0 && Number.isFinite(h1))) return err('have no three different spacings');
  if (!Number.isFinite(ratio)) return err('do not differ between the two finest');
  if (ratio < 0) return err('differ in one direction, then in the other');
  if (!(ratio > predictedRatio(SMALLEST_ORDER, spacings))) return err(`differ by a factor of ${Number(ratio.toPrecision(3))}, too little for any positive order`);
  if (!(ratio <= predictedRatio(LARGEST_ORDER, spacings))) return err(`differ by a factor of ${Number(ratio.toPrecision(3))}, too much for any order up to ${LARGEST_ORDER}`);
  let [low, high] = [SMALLEST_ORDER, LARGEST_ORDER];
  for (let i = 0; i < HALVINGS; i++) {
    const middle = (low + high) / 2;
    if (predictedRatio(middle, spacings) < ratio) low = middle;
    else high = middle;
  }
  return ok((low + high) / 2);
}

/** The order of three scalars; see orderFromRatio. */
export const orderOfValues = ([x1, x2, x3]: OfThree, spacings: Spacings): Result<number, string> => orderFromRatio((x1 - x2) / (x2 - x3), spacings);

/**
 * What a series tends to when its error is one power of the spacing: X₃ + (X₃ − X₂) h₃^p/(h₂^p − h₃^p).
 * Shape:  one number from the two finest.
 * Units:  those of the values.
 * Error:  the next power of the spacing.
 * Fails:  not finite for equal spacings or p = 0.
 * Source: Q20.
 */
export const richardsonValue = (middle: number, finest: number, hMiddle: number, hFinest: number, order: number): number =>
  finest + (finest - middle) / Math.expm1(order * Math.log(hMiddle / hFinest));
