import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { mismatchRecipe } from './detector/match-recipe';
import { mismatchTolerance } from './detector/mismatch-tolerance';

/**
 * Mismatch: 1 − match as half the squared distance of the normalised, aligned waveforms (Q03).
 * Shape:  one number a point.
 * Units:  dimensionless, 0 … 1.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: identity 1 − ⟨â|b̂⟩ = ½‖â − b̂‖²; no cancellation however small it is.
 */
export const mismatch = detectorQuantity(
  {
    id: 'mismatch',
    title: 'Mismatch',
    symbol: String.raw`1-\mathcal{M}`,
    unit: '',
    roles: ['a', 'b'],
    settings: pairSettings,
    sweepable: pairSweeps,
    naturalTolerance: (value) => mismatchTolerance(value) * Math.abs(value),
    formula: String.raw`1-\mathcal{M}=\tfrac12\min_{t_0,\phi_0}\bigl\|\hat a-\hat b\,\bigr\|^{2}`,
  },
  mismatchRecipe,
);
