import type { ModeIndex } from '../contract/settings';
import type { BinaryFacts } from '../contract/waveform';
import { tabulatedQuasiNormal, type QuasiNormal, type TabulatedMode } from '../synthesis/quasi-normal';

const tabulated: readonly string[] = ['22', '21', '33', '32', '44'] satisfies readonly TabulatedMode[];
/** Beyond these spins the table does not reach. */
const SPINS = [-0.2, 0.97] as const;

/**
 * Kerr frequency of the mode for the remnant that the sheet states, in the unit of the claim.
 * Shape:  frequency and decay rate; null when mass or spin are not stated or the table has no such mode or spin.
 * Units:  referred to the remnant's mass, or to M through the remnant's mass in M.
 * Error:  that of the table, 2e-4.
 * Fails:  null.
 * Source: domain reference, appendix D.
 */
export function predictedRingdown([l, m]: ModeIndex, { remnantMass, remnantSpin }: BinaryFacts, normaliseBy: 'M' | 'remnant'): QuasiNormal | null {
  const key = `${l}${Math.abs(m)}`;
  if (remnantMass === undefined || !(remnantMass > 0) || remnantSpin === undefined || !tabulated.includes(key)) return null;
  if (remnantSpin < SPINS[0] || remnantSpin > SPINS[1]) return null;
  const { real, imag } = tabulatedQuasiNormal(key as TabulatedMode, remnantSpin);
  const scale = normaliseBy === 'remnant' ? 1 : 1 / remnantMass;
  return { real: real * scale, imag: imag * scale };
}
