/** Relative natural tolerance of a mismatch: 10 % below 10⁻³, else 3 % (settings.md section 3). */
export const mismatchTolerance = (mismatch: number): number => (Math.abs(mismatch) < 1e-3 ? 0.1 : 0.03);
