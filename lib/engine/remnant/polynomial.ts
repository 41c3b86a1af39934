/**
 * A polynomial by Horner's rule.
 * Shape:  coefficients from the constant term upwards.
 * Units:  those of the coefficients.
 * Error:  rounding.
 * Fails:  never; no coefficients give 0.
 * Source: definition.
 */
export const polynomial = (x: number, coefficients: readonly number[]): number => coefficients.reduceRight((sum, a) => sum * x + a, 0);
