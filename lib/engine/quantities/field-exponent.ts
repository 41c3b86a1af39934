import type { Quantity } from '../contract/quantity';
import { measureFieldExponent } from '../electromagnetic/measure-field-exponent';

const NATURAL = 0.02;

/**
 * Power of the field with which the electromagnetic energy grows (Q24).
 * Shape:  one number; component `scatter` about the line, null for two files.
 * Units:  dimensionless.
 * Error:  U from the energies' own, carried into the slope.
 * Fails:  findings that stop (fewer than two files, one field, a file without its field).
 * Source: Mösta et al. 2010, arXiv:0912.2330; settings.md section 7.
 */
export const fieldExponent: Quantity = {
  id: 'field-exponent',
  title: 'Exponent of the field',
  symbol: 'k',
  unit: '',
  roles: ['series'],
  accepts: { series: ['phi2'] },
  needsNoise: false,
  settings: ['startM'],
  required: () => [],
  sweepable: [],
  scale: 'absolute',
  naturalTolerance: () => NATURAL,
  formula: 'E_{\\mathrm{EM}}\\propto B^{k},\\qquad k=\\frac{\\sum_i(x_i-\\bar x)(y_i-\\bar y)}{\\sum_i(x_i-\\bar x)^2},\\quad x=\\ln B,\\ y=\\ln E_{\\mathrm{EM}}',
  measure: measureFieldExponent(() => NATURAL),
};
