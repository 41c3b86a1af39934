import type { Quantity } from '../contract/quantity';
import { measureRingdown } from '../ringdown/measure-ringdown';

const naturalTolerance = (value: number): number => 0.01 * Math.abs(value);

/**
 * Frequency of one mode's ringdown (Q18).
 * Shape:  one number a point; component `predicted` from the remnant that the sheet states.
 * Units:  Mω, or M_f ω when referred to the remnant.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (no such mode, no peak, a window outside the record).
 * Source: Berti, Cardoso & Will 2006, gr-qc/0512160; settings.md section 5.
 */
export const ringdownFrequency: Quantity = {
  id: 'ringdown-frequency',
  title: 'Ringdown frequency',
  symbol: 'M\\omega_R',
  unit: '',
  roles: ['a'],
  needsNoise: false,
  settings: ['modes', 'lMax', 'window', 'normaliseBy', 'startM', 'integrationFloor'],
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance,
  formula: 'H_{\\ell m}\\propto e^{-(i\\omega_R+\\omega_I)t},\\qquad M\\omega_R=M\\,\\frac{d}{dt}\\bigl(-\\arg H_{\\ell m}\\bigr)\\Big|_{\\text{line over }[t_1,t_2]}',
  measure: measureRingdown('frequency', naturalTolerance),
};
