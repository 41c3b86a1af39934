import { houseValues } from '../contract/house-values';
import type { DeclaredSettings } from '../contract/settings';
import type { Quantity, QuantityInputs } from '../contract/quantity';
import { energyRecipe } from '../radiation/energy-recipe';
import { measureRadiated } from '../radiation/measure-radiated';
import { binaryOfClaim } from '../radiation/radiation-settings';

const needsMassRatio = (inputs: QuantityInputs, declared: DeclaredSettings): boolean =>
  (declared.includeEnergyBeforeStart ?? houseValues.includeEnergyBeforeStart) !== false && inputs.of.a !== undefined && binaryOfClaim(declared, inputs.of.a) === null;

/**
 * Energy radiated in gravitational waves between startM and the end of the record (Q12).
 * Shape:  one number a point; components `E:l,m` of each mode and `before`.
 * Units:  fraction of the normalising mass.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (content without modes, no signal, a start outside the record, a normaliser that is not known).
 * Source: Ruiz et al. 2008, arXiv:0707.4654; settings.md section 5.
 */
export const radiatedEnergy: Quantity = {
  id: 'radiated-energy',
  title: 'Radiated energy',
  symbol: 'E_{\\mathrm{rad}}/M',
  unit: '',
  roles: ['a'],
  needsNoise: false,
  settings: energyRecipe.settings,
  required: (inputs, declared) => (needsMassRatio(inputs, declared) ? ['massRatio'] : []),
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: (value) => 0.01 * Math.abs(value),
  formula: '\\frac{E_{\\mathrm{rad}}}{M}=\\frac{1}{16\\pi}\\int_{t_{\\mathrm{start}}}^{t_{\\mathrm{end}}}\\sum_{\\ell m}\\bigl|\\dot H_{\\ell m}\\bigr|^{2}\\,dt',
  measure: (request, watch) => measureRadiated(energyRecipe, request, watch),
};
