import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { snrRecipe } from './detector/loudness-recipes';

/**
 * Optimal signal-to-noise ratio (Q06).
 * Shape:  one number a point.
 * Units:  dimensionless.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: Cutler & Flanagan 1994, gr-qc/9402014 (from memory); averages of settings.md rule 2.8.
 */
export const snr = detectorQuantity(
  {
    id: 'snr',
    title: 'Optimal SNR',
    symbol: String.raw`\rho`,
    unit: '',
    roles: ['a'],
    settings: loudnessSettings,
    sweepable: loudnessSweeps,
    naturalTolerance: (value) => 0.01 * Math.abs(value),
    formula: String.raw`\rho^{2}=4\int_{f_l}^{f_h}\frac{|\tilde h(f)|^{2}}{S(f)}\,df`,
  },
  snrRecipe,
);
