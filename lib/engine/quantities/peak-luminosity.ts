import type { Quantity } from '../contract/quantity';
import { measureRadiated } from '../radiation/measure-radiated';
import { peakLuminosityRecipe } from '../radiation/peak-luminosity-recipe';

/**
 * Largest flux of energy after startM (Q15); it does not depend on the mass.
 * Shape:  one number a point; components `timeM` and `ergPerS`.
 * Units:  c⁵/G.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (content without modes, no signal, a start outside the record).
 * Source: settings.md section 5 and rule 2.10.
 */
export const peakLuminosity: Quantity = {
  id: 'peak-luminosity',
  title: 'Peak luminosity',
  symbol: 'L_{\\mathrm{peak}}',
  unit: 'c⁵/G',
  roles: ['a'],
  needsNoise: false,
  settings: peakLuminosityRecipe.settings,
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: (value) => 0.03 * Math.abs(value),
  formula: 'L_{\\mathrm{peak}}=\\max_{t\\ge t_{\\mathrm{start}}}\\frac{1}{16\\pi}\\sum_{\\ell m}\\bigl|\\dot H_{\\ell m}\\bigr|^{2}',
  measure: (request, watch) => measureRadiated(peakLuminosityRecipe, request, watch),
};
