import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { degeneracyRecipe } from './detector/degeneracy-recipe';
import { detectorQuantity } from './detector/detector-quantity';

/**
 * The least match of two binaries over the directions from which they may be seen (Q26).
 * Shape:  one number a point.
 * Units:  dimensionless, 0 … 1.
 * Error:  U from route A's own knobs and the printed digits; angles to 1e-5, which enters squared.
 * Fails:  findings that stop (band outside the curve, no signal, a table over the template's mass that is too large).
 * Source: Ajith et al. 2011, arXiv:0909.2867; Pürrer et al. 2013, arXiv:1306.2320 (abstracts).
 */
export const degeneracy = detectorQuantity(
  {
    id: 'degeneracy',
    title: 'Degeneracy',
    symbol: String.raw`\mathcal{M}_{\min}`,
    unit: '',
    roles: ['a', 'b'],
    settings: [...pairSettings, 'massRatio', 'chi1z', 'chi2z'],
    sweepable: pairSweeps,
    naturalTolerance: (value) => 0.1 * Math.abs(1 - value),
    formula: String.raw`\mathcal{M}_{\min}=\min_{\iota,\varphi_a}\max_{t_0,\psi,\varphi_b}\frac{\bigl|\langle a|e^{2i\psi}b(\varphi_b)\rangle\bigr|}{\|a\|\,\|b\|}`,
  },
  degeneracyRecipe,
);
