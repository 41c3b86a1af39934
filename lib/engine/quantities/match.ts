import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { matchRecipe } from './detector/match-recipe';

/**
 * Match: the overlap maximised over what the claim names, by house default time and phase (Q02).
 * Shape:  one number a point.
 * Units:  dimensionless, 0 … 1; shift of b in s, later > 0.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: Allen et al., gr-qc/0509116; maximisation rules of settings.md 2.7.
 */
export const match = detectorQuantity(
  {
    id: 'match',
    title: 'Match',
    symbol: String.raw`\mathcal{M}`,
    unit: '',
    roles: ['a', 'b'],
    settings: pairSettings,
    sweepable: pairSweeps,
    naturalTolerance: (value) => Math.max(1e-4, 0.01 * Math.abs(1 - value)),
    formula: String.raw`\mathcal{M}=\max_{t_0,\phi_0}\frac{4}{\|a\|\,\|b\|}\left|\int_{f_l}^{f_h}\frac{\tilde a\,\tilde b^{*}}{S}\,e^{2\pi i f t_0}\,df\right|`,
  },
  matchRecipe,
);
