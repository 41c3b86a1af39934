import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { fittingFactorRecipe } from './detector/fitting-factor-recipe';

/**
 * Fitting factor: the largest match of a signal over a list of templates and, by house default, their mass (Q04).
 * Shape:  one number a point; the best template counts from 0.
 * Units:  dimensionless, 0 … 1; the template's mass in M☉.
 * Error:  U from route A's own knobs and the printed digits; the mass to 1e-5, which enters squared.
 * Fails:  findings that stop (band outside the curve, no signal, a search that the response does not allow).
 * Source: Apostolatos 1995 (from memory); Buonanno, Chen & Vallisneri, gr-qc/0205122; settings.md rule 2.7.
 */
export const fittingFactor = detectorQuantity(
  {
    id: 'fitting-factor',
    title: 'Fitting factor',
    symbol: String.raw`\mathrm{FF}`,
    unit: '',
    roles: ['a', 'templates'],
    settings: pairSettings,
    sweepable: pairSweeps,
    naturalTolerance: () => 3e-4,
    formula: String.raw`\mathrm{FF}=\max_{k,\,m}\ \max_{t_0,\phi_0}\frac{\langle a|b_k(m)\rangle}{\|a\|\,\|b_k(m)\|}`,
  },
  fittingFactorRecipe,
);
