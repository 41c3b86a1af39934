import type { Quantity } from '../contract/quantity';
import { angularMomentumRecipe } from '../radiation/angular-momentum-recipe';
import { measureRadiated } from '../radiation/measure-radiated';

/**
 * Angular momentum radiated along z between startM and the end of the record (Q13). What was radiated
 * before cannot be added: since infinite separation it has no bound.
 * Shape:  one number a point, > 0 for house rotation; components `x`, `y`, `z`.
 * Units:  M².
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (content without modes, no signal, a start outside the record).
 * Source: Lousto & Zlochower 2007, gr-qc/0703061; settings.md section 5.
 */
export const radiatedAngularMomentum: Quantity = {
  id: 'radiated-angular-momentum',
  title: 'Radiated angular momentum',
  symbol: 'J_{\\mathrm{rad}}/M^{2}',
  unit: 'M²',
  roles: ['a'],
  needsNoise: false,
  settings: angularMomentumRecipe.settings,
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: (value) => 0.02 * Math.abs(value),
  formula: '\\frac{J_{z}}{M^{2}}=\\frac{1}{16\\pi}\\int_{t_{\\mathrm{start}}}^{t_{\\mathrm{end}}}\\sum_{\\ell m}m\\,\\mathrm{Im}\\bigl(H_{\\ell m}\\dot H_{\\ell m}^{*}\\bigr)\\,dt',
  measure: (request, watch) => measureRadiated(angularMomentumRecipe, request, watch),
};
