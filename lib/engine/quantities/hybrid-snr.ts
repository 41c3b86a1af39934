import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { hybridRecipe } from './detector/hybrid-recipe';

/**
 * Loudness of a signal that is numerical from a frequency on and post-Newtonian below (Q22).
 * Shape:  one number a point.
 * Units:  dimensionless, > 0.
 * Error:  U from route A's own knobs and the printed digits; what the series leaves out stands in the budget.
 * Fails:  findings that stop (another direction than face-on, another response than plus, band outside the curve, no signal).
 * Source: Santamaría et al. 2010, arXiv:1005.3306 (abstract); amplitude as in the methods page.
 */
export const hybridSnr = detectorQuantity(
  {
    id: 'hybrid-snr',
    title: 'Hybrid SNR',
    symbol: String.raw`\rho_{\mathrm{hyb}}`,
    unit: '',
    roles: ['a'],
    settings: [...loudnessSettings, 'joinHz', 'amplitudeOrder', 'massRatio', 'chi1z', 'chi2z'],
    sweepable: [...loudnessSweeps, 'joinHz'],
    naturalTolerance: (value) => 0.02 * Math.abs(value),
    formula: String.raw`\rho_{\mathrm{hyb}}^{2}=4\int_{f_l}^{f_j}\frac{|\tilde h_{\mathrm{PN}}|^{2}}{S}\,df+4\int_{f_j}^{f_h}\frac{|\tilde h|^{2}}{S}\,df`,
  },
  hybridRecipe,
);
