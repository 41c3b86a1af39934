import type { Quantity } from '../contract/quantity';
import { measureEmEnergy } from '../electromagnetic/measure-em-energy';

/** A fraction on the scale ln. */
const NATURAL = 0.05;

/**
 * Energy emitted in electromagnetic waves (Q23).
 * Shape:  one number a point; components `erg`, `fieldHat`, `peakErgPerS`.
 * Units:  fraction of M.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (no modes, no signal, no field to rescale from).
 * Source: Palenzuela et al. 2009, arXiv:0905.1121; Mösta et al. 2010, arXiv:0912.2330; settings.md section 7.
 */
export const emEnergy: Quantity = {
  id: 'em-energy',
  title: 'Electromagnetic energy',
  symbol: 'E_{\\mathrm{EM}}/M',
  unit: '',
  roles: ['a'],
  accepts: { a: ['phi2'] },
  needsNoise: false,
  settings: ['fieldGauss', 'totalMassMsun', 'startM'],
  required: () => [],
  sweepable: ['fieldGauss', 'totalMassMsun'],
  scale: 'ln',
  naturalTolerance: () => NATURAL,
  formula: '\\frac{E_{\\mathrm{EM}}}{M}=\\frac1{4\\pi}\\int_{t_{\\mathrm{start}}}^{t_{\\mathrm{end}}}\\sum_{\\ell m}\\bigl|r\\phi_2^{\\ell m}\\bigr|^2\\,dt',
  measure: measureEmEnergy((claimed) => NATURAL * Math.abs(claimed)),
};
