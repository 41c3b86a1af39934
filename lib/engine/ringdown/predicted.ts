import type { ModeIndex } from '../contract/settings';
import type { BinaryFacts } from '../contract/waveform';
import { TABULATED_SPINS, tabulatedModes, tabulatedQuasiNormal, type QuasiNormal } from '../remnant/quasi-normal';

/**
 * Kerr frequency of the mode for the remnant that the sheet states, in the unit of the claim.
 * Shape:  frequency and decay rate; null when mass or spin are not stated or the table has no such mode or spin.
 * Units:  referred to the remnant's mass, or to M through the remnant's mass in M.
 * Error:  that of the table, 1.5e-5 for spins from 0 to 0.95.
 * Fails:  null.
 * Source: domain reference, appendix D.
 */
export function predictedRingdown([l, m]: ModeIndex, { remnantMass, remnantSpin }: BinaryFacts, normaliseBy: 'M' | 'remnant'): QuasiNormal | null {
  const mode = tabulatedModes.find((known) => known === `${l}${Math.abs(m)}`);
  if (remnantMass === undefined || !(remnantMass > 0) || remnantSpin === undefined || mode === undefined) return null;
  if (remnantSpin < TABULATED_SPINS[0] || remnantSpin > TABULATED_SPINS[1]) return null;
  const { real, imag } = tabulatedQuasiNormal(mode, remnantSpin);
  const scale = normaliseBy === 'remnant' ? 1 : 1 / remnantMass;
  return { real: real * scale, imag: imag * scale };
}
