/** Comparisons with NaN are silently false, so a number is asked first whether it is one. */
export const isFiniteNumber = (x: unknown): x is number => typeof x === 'number' && Number.isFinite(x);

export const allFinite = (...xs: readonly (number | null | undefined)[]): boolean => xs.every(isFiniteNumber);
