/**
 * Decimals with forty places behind the point, as whole numbers of 10⁻⁴⁰: the arithmetic of route B for
 * closed forms, in which nothing that a double can hold is lost. A number enters as it is printed.
 */
export type Decimal = bigint;

const PLACES = 40n;
export const ONE: Decimal = 10n ** PLACES;

/**
 * A number as its shortest decimal spelling, which is what the author wrote.
 * Shape:  one number.
 * Units:  those of the number.
 * Error:  none down to 10⁻⁴⁰.
 * Fails:  throws on what is not finite.
 * Source: definition.
 */
export function decimal(x: number): Decimal {
  const [digits, exponent] = x.toExponential().split('e');
  if (digits === undefined || exponent === undefined) throw new RangeError(`${x} is no decimal`);
  const [whole, part = ''] = digits.split('.');
  const shift = Number(exponent) - part.length + Number(PLACES);
  const count = BigInt(`${whole}${part}`);
  return shift >= 0 ? count * 10n ** BigInt(shift) : count / 10n ** BigInt(-shift);
}

export const toNumber = (x: Decimal): number => Number(`${x}e-${PLACES}`);

export const sum = (...terms: readonly Decimal[]): Decimal => terms.reduce((a, b) => a + b, 0n);
export const product = (...factors: readonly Decimal[]): Decimal => factors.reduce((a, b) => (a * b) / ONE, ONE);
export const ratio = (a: Decimal, b: Decimal): Decimal => (a * ONE) / b;

/** x to a whole power of at least 0. */
export const power = (x: Decimal, n: number): Decimal => Array.from({ length: n }).reduce<Decimal>((a) => (a * x) / ONE, ONE);

/**
 * Square root by Newton's method on whole numbers.
 * Shape:  one decimal of at least 0; what is below 0 counts as 0.
 * Units:  the root's.
 * Error:  one in the last place.
 * Fails:  never.
 * Source: Heron's rule (common practice).
 */
export function root(x: Decimal): Decimal {
  if (x <= 0n) return 0n;
  const square = x * ONE;
  let r = 1n << BigInt((square.toString(2).length + 1) >> 1);
  for (;;) {
    const next = (r + square / r) >> 1n;
    if (next >= r) return r;
    r = next;
  }
}
