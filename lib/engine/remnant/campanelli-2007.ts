import type { Binary } from '../synthesis/binary';

/** Speeds in km/s; ξ in degrees. */
export const campanelli2007 = { a: 12000, b: -0.93, h: 6900, xiDeg: 145 } as const;

/**
 * Recoil in the orbital plane of bodies whose spins are aligned with the orbit.
 * Shape:  one binary, m1 ≥ m2; returns a scalar.
 * Units:  km/s.
 * Error:  the form's own scatter, some per cent.
 * Fails:  never.
 * Source: Campanelli et al. 2007, gr-qc/0701164 [from memory], in the form of Lousto & Zlochower; constants in public source text at second hand, A and B from González et al. 2007, gr-qc/0610154.
 */
export function campanelliRecoil({ massRatio, eta, chi1z, chi2z }: Binary): number {
  const q = 1 / massRatio;
  const { a, b, h, xiDeg } = campanelli2007;
  const byMasses = ((a * eta ** 2 * (1 - q)) / (1 + q)) * (1 + b * eta);
  const bySpins = ((h * eta ** 2) / (1 + q)) * (chi1z - q * chi2z);
  return Math.sqrt(Math.max(0, byMasses ** 2 + bySpins ** 2 + 2 * byMasses * bySpins * Math.cos((xiDeg * Math.PI) / 180)));
}
