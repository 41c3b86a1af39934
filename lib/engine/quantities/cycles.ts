import type { Quantity } from '../contract/quantity';
import { measureCycles } from '../orbit/measure-cycles';

/**
 * Number of cycles of the wave over a window (Q29).
 * Shape:  one number a point.
 * Units:  cycles of (2,2), or of the dominant mode: two to an orbit.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (no such mode, a window outside the record, one polarisation alone).
 * Source: settings.md section 5.
 */
export const cycles: Quantity = {
  id: 'cycles',
  title: 'Number of cycles',
  symbol: 'N_{\\mathrm{cyc}}',
  unit: '',
  roles: ['a'],
  needsNoise: false,
  settings: ['modes', 'lMax', 'window', 'startM', 'integrationFloor'],
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: () => 0.05,
  formula: 'N_{\\mathrm{cyc}}=\\frac{\\phi_{22}(t_2)-\\phi_{22}(t_1)}{2\\pi}',
  measure: measureCycles,
};
