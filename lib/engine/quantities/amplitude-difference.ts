import { measurePair } from '../alignment/measure-pair';
import type { Quantity } from '../contract/quantity';

const naturalTolerance = (value: number): number => Math.max(1e-3, 0.1 * Math.abs(value));

/**
 * By how much b is louder than a after their alignment (Q19).
 * Shape:  one number a point; components `timeShiftM`, `phaseShiftRad`, `atM`.
 * Units:  a ratio less one; times in M.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (a mode that one file lacks, windows and times outside the records).
 * Source: Hannam et al. 2009, arXiv:0901.2437; settings.md section 6.
 */
export const amplitudeDifference: Quantity = {
  id: 'amplitude-difference',
  title: 'Amplitude difference',
  symbol: '\\delta A/A',
  unit: '',
  roles: ['a', 'b'],
  needsNoise: false,
  settings: ['modes', 'alignment', 'window', 'at', 'startM', 'integrationFloor'],
  choices: { at: ['peak', 'end', 'window', 'maximum', 'timeM', 'frequencyM'] },
  required: () => [],
  sweepable: ['at'],
  scale: 'absolute',
  naturalTolerance,
  formula: '\\frac{\\delta A}{A}(t)=\\frac{A_b(t+\\Delta t)}{A_a(t)}-1,\\qquad \\Delta t=\\arg\\min_{\\Delta t}\\min_{\\Delta\\phi}\\int_{t_1}^{t_2}\\bigl[\\phi_b(t+\\Delta t)-\\phi_a(t)-\\Delta\\phi\\bigr]^{2}dt',
  measure: measurePair('amplitude', naturalTolerance),
};
