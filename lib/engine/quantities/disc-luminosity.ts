import type { Quantity } from '../contract/quantity';
import { measureDisc } from '../electromagnetic/measure-disc';

/** A factor of two on the scale ln. */
const NATURAL = 1;

/**
 * Peak luminosity of a disc over Eddington's (Q28).
 * Shape:  one number a point; components `peakErgPerS`, `accretionErgPerS`, `coolingS`, `dynamicalS`.
 * Units:  dimensionless.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (no curve, no light).
 * Source: standard Eddington luminosity (from memory); settings.md section 7.
 */
export const discLuminosity: Quantity = {
  id: 'disc-luminosity',
  title: 'Luminosity of a disc',
  symbol: 'L/L_{\\mathrm{Edd}}',
  unit: '',
  roles: ['a'],
  accepts: { a: ['luminosity'] },
  needsNoise: false,
  settings: ['totalMassMsun', 'radiativeEfficiency', 'accretionRateMsunPerYear', 'internalEnergyErg', 'radiusM'],
  required: () => ['totalMassMsun'],
  sweepable: ['totalMassMsun'],
  scale: 'ln',
  naturalTolerance: () => NATURAL,
  formula: '\\frac{L}{L_{\\mathrm{Edd}}}=\\frac{\\max_t L(t)}{1.2571\\times10^{38}\\,(M/M_\\odot)\\ \\mathrm{erg/s}}',
  measure: measureDisc((claimed) => NATURAL * Math.abs(claimed)),
};
