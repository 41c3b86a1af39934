import type { Quantity } from '../contract/quantity';
import { eccentricityTolerance, measureEccentricity } from '../orbit/measure-eccentricity';

/**
 * Eccentricity from the oscillation of the frequency about a smooth one (Q29).
 * Shape:  one number a point; component `referenceFrequency`.
 * Units:  dimensionless.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (no such mode, a window outside the record, a mode that does not turn).
 * Source: settings.md section 5; Pürrer, Husa & Hannam 2012, arXiv:1203.4258 (abstract).
 */
export const eccentricity: Quantity = {
  id: 'eccentricity',
  title: 'Eccentricity',
  symbol: 'e_\\omega',
  unit: '',
  roles: ['a'],
  needsNoise: false,
  settings: ['modes', 'lMax', 'window', 'startM', 'integrationFloor'],
  required: () => [],
  sweepable: ['startM', 'lMax', 'integrationFloor'],
  scale: 'absolute',
  naturalTolerance: eccentricityTolerance,
  formula: 'e_\\omega=\\sqrt2\\;\\mathrm{rms}\\left[\\frac{\\omega-\\omega_{\\mathrm{fit}}}{2\\,\\omega_{\\mathrm{fit}}}\\right]',
  measure: measureEccentricity,
};
