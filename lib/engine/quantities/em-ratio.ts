import type { Quantity } from '../contract/quantity';
import { measureEmRatio } from '../electromagnetic/measure-em-ratio';

/** A fraction on the scale ln. */
const NATURAL = 0.1;

/**
 * Electromagnetic over gravitational energy (Q24).
 * Shape:  one number a point; components `emEnergy`, `gwEnergy`, `fieldHat`.
 * Units:  a ratio.
 * Error:  U from route A's own knobs and the digits of both files.
 * Fails:  findings that stop (those of either energy, no field to rescale from).
 * Source: Mösta et al. 2010, arXiv:0912.2330; settings.md section 7.
 */
export const emRatio: Quantity = {
  id: 'em-ratio',
  title: 'Electromagnetic over gravitational energy',
  symbol: '\\varepsilon',
  unit: '',
  roles: ['em', 'gw'],
  accepts: { em: ['phi2'] },
  needsNoise: false,
  settings: ['fieldGauss', 'totalMassMsun', 'startM', 'integrationFloor'],
  required: () => [],
  sweepable: ['fieldGauss', 'totalMassMsun'],
  scale: 'ln',
  naturalTolerance: () => NATURAL,
  formula: '\\varepsilon=\\frac{E_{\\mathrm{EM}}}{E_{\\mathrm{GW}}},\\qquad E_{\\mathrm{EM}}\\propto\\hat B^2,\\quad\\hat B=\\frac{B}{\\mathrm G}\\frac{M}{M_\\odot}\\frac1{2.35596\\times10^{19}}',
  measure: measureEmRatio((claimed) => NATURAL * Math.abs(claimed)),
};
