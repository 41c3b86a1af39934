import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { snrRatioRecipe } from './detector/loudness-recipes';

/**
 * Ratio of two optimal signal-to-noise ratios at equal mass, distance and angles (Q07).
 * Shape:  one number a point.
 * Units:  dimensionless.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: ratio of Q06.
 */
export const snrRatio = detectorQuantity(
  {
    id: 'snr-ratio',
    title: 'SNR ratio',
    symbol: String.raw`\rho_a/\rho_b`,
    unit: '',
    roles: ['a', 'b'],
    settings: loudnessSettings,
    sweepable: loudnessSweeps,
    naturalTolerance: (value) => 0.01 * Math.abs(value),
    formula: String.raw`R_\rho=\rho_a/\rho_b`,
  },
  snrRatioRecipe,
);
