import type { Quantity } from '../contract/quantity';
import { measureRingdown } from '../ringdown/measure-ringdown';

const naturalTolerance = (value: number): number => 0.03 * Math.abs(value);

/**
 * Decay rate of one mode's ringdown (Q18).
 * Shape:  one number a point; components `predicted` from the remnant that the sheet states, and `tauM`.
 * Units:  M/τ, or M_f/τ when referred to the remnant; `tauM` in M.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (no such mode, no peak, a window outside the record, no decay).
 * Source: Berti, Cardoso & Will 2006, gr-qc/0512160; settings.md section 5.
 */
export const ringdownDamping: Quantity = {
  id: 'ringdown-damping',
  title: 'Ringdown damping',
  symbol: 'M\\omega_I',
  unit: '',
  roles: ['a'],
  needsNoise: false,
  settings: ['modes', 'lMax', 'window', 'normaliseBy', 'startM', 'integrationFloor'],
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance,
  formula: 'M\\omega_I=\\frac{M}{\\tau}=-M\\,\\frac{d}{dt}\\ln\\bigl|H_{\\ell m}\\bigr|\\Big|_{\\text{line over }[t_1,t_2]}',
  measure: measureRingdown('damping', naturalTolerance),
};
