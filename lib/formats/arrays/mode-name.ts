import type { ModeIndex } from '@/lib/engine/contract/settings';

const patterns: readonly RegExp[] = [
  // l2_m-2, Y_l2_m2.dat, l=2,m=-2
  /l\s*=?\s*(\d{1,2})[\s_,.]*m\s*=?\s*(-?\d{1,2})(?!\d)/i,
  // 2,-2 and (2, -2) and 2_-2
  /^\(?\s*(\d{1,2})\s*[,_ ]\s*(-?\d{1,2})\s*\)?$/,
  // h22, psi4_2-2, re33: two digits at the end
  /^[a-z]+(?:4_)?_?(\d)(-?\d)$/i,
];

/** The mode that a dataset's name seems to say; a proposal, never taken without being shown. */
export function modeFromName(name: string): ModeIndex | null {
  for (const pattern of patterns) {
    const found = pattern.exec(name);
    if (!found) continue;
    const [l, m] = [Number(found[1]), Number(found[2]) + 0];
    if (l >= 1 && l <= 40 && Math.abs(m) <= l) return [l, m];
  }
  return null;
}
