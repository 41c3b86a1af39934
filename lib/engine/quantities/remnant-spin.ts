import type { Quantity } from '../contract/quantity';
import { measureRemnant, neededForRemnant, remnantSettings } from '../remnant/measure-remnant';

/**
 * Spin of the remnant along z: what was left of the angular momentum over the square of the mass, or what rings so (Q16).
 * Shape:  one number a point; components `start`, `radiated` and `checkRingdown`.
 * Units:  dimensionless; the components J in M².
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (content without modes, no signal, start values that are not stated).
 * Source: domain reference, Q16; settings.md section 5.
 */
export const remnantSpin: Quantity = {
  id: 'remnant-spin',
  title: 'Remnant spin',
  symbol: '\\chi_f',
  unit: '',
  roles: ['a'],
  needsNoise: false,
  settings: remnantSettings,
  required: neededForRemnant,
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: () => 5e-3,
  formula: '\\chi_f=\\frac{J_{\\mathrm{start}}-J_z}{M_f^{2}}',
  measure: measureRemnant('spin'),
};
