import type { Quantity } from '../contract/quantity';
import { measureMirroring } from '../electromagnetic/measure-mirroring';

const NATURAL = 0.05;

/**
 * How constant |φ₂|/|ψ₄| is around the merger (Q27).
 * Shape:  one number, ≥ 0; components `meanRatio`, `phaseRms` (rad).
 * Units:  standard deviation over mean.
 * Error:  U from route A's own knobs and the digits of both files.
 * Fails:  findings that stop (a mode that one file lacks, no peak, half of the window outside).
 * Source: Mösta et al. 2010, arXiv:0912.2330; settings.md section 7.
 */
export const emMirroring: Quantity = {
  id: 'em-mirroring',
  title: 'Mirroring of the waves',
  symbol: '\\sigma_r/\\bar r',
  unit: '',
  roles: ['em', 'gw'],
  accepts: { em: ['phi2'] },
  needsNoise: false,
  settings: ['modes', 'window'],
  required: () => [],
  sweepable: [],
  scale: 'absolute',
  naturalTolerance: () => NATURAL,
  formula: 'r(t)=\\frac{|\\phi_2(t+\\Delta t)|}{|\\psi_4(t)|},\\qquad\\frac{\\sigma_r}{\\bar r}=\\frac1{\\bar r}\\sqrt{\\frac1{t_2-t_1}\\int_{t_1}^{t_2}(r-\\bar r)^2\\,dt}',
  measure: measureMirroring(() => NATURAL),
};
