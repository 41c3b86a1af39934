import type { Quantity } from '../contract/quantity';
import { measureRadiated } from '../radiation/measure-radiated';
import { recoilRecipe } from '../radiation/recoil-recipe';

/**
 * Speed of the remnant, from the momentum radiated between startM and the end of the record (Q14): v = −P/m.
 * Shape:  one number a point, the length of v; components `vx`, `vy`, `vz`, `inPlane` and `directionDeg` in the file's axes.
 * Units:  km/s, degrees.
 * Error:  U from route A's own knobs and the digits of the input, as the length of a vector.
 * Fails:  findings that stop (neighbouring modes missing from the file, no signal, a start outside the record, a normaliser that is not known).
 * Source: Ruiz et al. 2008, arXiv:0707.4654; settings.md section 5.
 */
export const recoil: Quantity = {
  id: 'recoil',
  title: 'Recoil',
  symbol: 'v',
  unit: 'km/s',
  roles: ['a'],
  needsNoise: false,
  settings: recoilRecipe.settings,
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: (value) => Math.max(5, 0.05 * Math.abs(value)),
  formula: 'v=\\frac{c}{m}\\Bigl|\\frac{1}{16\\pi}\\int_{t_{\\mathrm{start}}}^{t_{\\mathrm{end}}}\\!\\!dt\\oint\\hat n\\,\\bigl|\\dot h\\bigr|^{2}d\\Omega\\Bigr|',
  measure: (request, watch) => measureRadiated(recoilRecipe, request, watch),
};
