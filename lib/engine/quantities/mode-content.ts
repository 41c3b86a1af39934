import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { modeContentRecipe } from './detector/mode-content-recipe';

/**
 * How well the quadrupole alone stands for the whole waveform (Q11).
 * Shape:  one number a point.
 * Units:  dimensionless, 0 … 1.
 * Error:  U from route A's own knobs and the printed digits; means with what a thinner grid of sights changes.
 * Fails:  findings that stop (columns without modes, no (2,±2), band outside the curve, no signal).
 * Source: McWilliams, Kelly & Baker 2010, arXiv:1004.0961; Capano, Pan & Buonanno 2014, arXiv:1311.1286 (abstracts).
 */
export const modeContent = detectorQuantity(
  {
    id: 'mode-content',
    title: 'Mode content',
    symbol: String.raw`\mathcal{M}_{22}`,
    unit: '',
    roles: ['a'],
    settings: [...loudnessSettings, 'maximise', 'templateMassRange', 'statistic'],
    sweepable: loudnessSweeps,
    naturalTolerance: (value) => 0.1 * Math.abs(1 - value),
    formula: String.raw`\mathcal{M}_{22}=\min_{\varphi_a}\max_{t_0,\psi,\varphi_b}\frac{\bigl|\langle h|e^{2i\psi}h_{22}(\varphi_b)\rangle\bigr|}{\|h\|\,\|h_{22}\|},\qquad\overline{\mathcal{M}}=\Bigl[\frac{\sum\rho^{3}\mathcal{M}^{3}}{\sum\rho^{3}}\Bigr]^{1/3}`,
  },
  modeContentRecipe,
);
