import type { Quantity } from '../contract/quantity';
import { measureEmFrequency } from '../electromagnetic/measure-em-frequency';

/** A factor of two on the scale ln. */
const NATURAL = 1;

/**
 * Frequency of the emitted waves, beside the cut-off of a plasma (Q25).
 * Shape:  one number a point; components `cutoffHz`, `ratio`, `massLimitMsun`, `checkPredictedHz`.
 * Units:  Hz.
 * Error:  U from route A's own knobs and the digits of the input.
 * Fails:  findings that stop (those of a ringdown, a time outside the record).
 * Source: Mösta et al. 2010, arXiv:0912.2330; settings.md section 7.
 */
export const emFrequency: Quantity = {
  id: 'em-frequency',
  title: 'Electromagnetic frequency',
  symbol: 'f_{\\mathrm{EM}}',
  unit: 'Hz',
  roles: ['a'],
  accepts: { a: ['strain', 'news', 'psi4', 'phi2'] },
  choices: { at: ['ringdown', 'peak', 'timeM'] },
  needsNoise: false,
  settings: ['at', 'totalMassMsun', 'plasmaDensityCm3', 'window', 'startM', 'integrationFloor'],
  required: () => ['totalMassMsun'],
  sweepable: ['totalMassMsun'],
  scale: 'ln',
  naturalTolerance: () => NATURAL,
  formula: 'f_{\\mathrm{EM}}=\\frac{M\\omega_{22}}{2\\pi}\\,\\frac{c^3}{GM},\\qquad f_{\\mathrm p}=8980\\,\\mathrm{Hz}\\,\\sqrt{n_{\\mathrm e}/\\mathrm{cm}^{-3}}',
  measure: measureEmFrequency((claimed) => NATURAL * Math.abs(claimed)),
};
