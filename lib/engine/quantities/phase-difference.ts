import { measurePair } from '../alignment/measure-pair';
import type { Quantity } from '../contract/quantity';

const naturalTolerance = (value: number): number => Math.max(0.02, 0.1 * Math.abs(value));

/**
 * Phase by which b is ahead of a after their alignment (Q19).
 * Shape:  one number a point; components `timeShiftM`, `phaseShiftRad`, `atM`.
 * Units:  rad; times in M.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (a mode that one file lacks, windows and times outside the records).
 * Source: Hannam et al. 2009, arXiv:0901.2437; settings.md section 6.
 */
export const phaseDifference: Quantity = {
  id: 'phase-difference',
  title: 'Phase difference',
  symbol: '\\delta\\phi',
  unit: 'rad',
  roles: ['a', 'b'],
  needsNoise: false,
  settings: ['modes', 'alignment', 'window', 'at', 'startM', 'integrationFloor'],
  choices: { at: ['peak', 'end', 'window', 'maximum', 'timeM', 'frequencyM'] },
  required: () => [],
  sweepable: ['at'],
  scale: 'absolute',
  naturalTolerance,
  formula: '\\delta\\phi(t)=\\phi_b(t+\\Delta t)-\\phi_a(t)-\\Delta\\phi,\\qquad (\\Delta t,\\Delta\\phi)=\\arg\\min\\int_{t_1}^{t_2}\\bigl[\\phi_b(t+\\Delta t)-\\phi_a(t)-\\Delta\\phi\\bigr]^{2}dt',
  measure: measurePair('phase', naturalTolerance),
};
