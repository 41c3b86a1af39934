import type { Quantity } from '../contract/quantity';
import { measureRemnant, neededForRemnant, remnantSettings } from '../remnant/measure-remnant';

/**
 * Mass of the remnant: what was there less what was radiated, or what rings so (Q16).
 * Shape:  one number a point; components `start`, `radiated` and `checkRingdown`.
 * Units:  M, the binary's total mass.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (content without modes, no signal, start values that are not stated).
 * Source: domain reference, Q16; settings.md section 5.
 */
export const remnantMass: Quantity = {
  id: 'remnant-mass',
  title: 'Remnant mass',
  symbol: 'M_f',
  unit: 'M',
  roles: ['a'],
  needsNoise: false,
  settings: remnantSettings,
  required: neededForRemnant,
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: () => 1e-3,
  formula: 'M_f=M_{\\mathrm{start}}-E_{\\mathrm{rad}}',
  measure: measureRemnant('mass'),
};
