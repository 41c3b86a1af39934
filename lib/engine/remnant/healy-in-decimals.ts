import { decimal, ONE, product, sum, type Decimal } from './decimal';
import type { DecimalBinary } from './fits-in-decimals';
import { healyPowers } from './healy-basis';

/**
 * (4η)² Σ of the terms, as 16η² = (1 − δ²)², nested in δ: for each power of it a sum in S and Δ.
 * Shape:  coefficients in the order of `healyPowers`.
 * Units:  those of the coefficients.
 * Error:  some in the last of forty places.
 * Fails:  never.
 * Source: as `healySum`.
 */
export function healyTerms(coefficients: readonly number[], { m1, m2, delta, chi1, chi2, spin }: DecimalBinary): Decimal {
  const difference = product(m2, chi2) - product(m1, chi1);
  const ofDelta = (k: number): Decimal =>
    sum(
      ...healyPowers.map(([i, j, own], term) => {
        if (own !== k) return 0n;
        const factors = [...Array.from({ length: i }, () => spin), ...Array.from({ length: j }, () => difference)];
        return product(decimal(coefficients[term]!), ...factors);
      }),
    );
  const nested = [4, 3, 2, 1, 0].reduce<Decimal>((total, k) => product(total, delta) + ofDelta(k), 0n);
  const weight = ONE - product(delta, delta);
  return product(weight, weight, nested);
}
