import { houseValues } from '@/lib/engine/contract/house-values';
import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { distinguishabilityRecipe } from './detector/match-recipe';
import { mismatchTolerance } from './detector/mismatch-tolerance';

/**
 * The loudness from which two waveforms can be told apart by the usual sufficient criterion (Q09).
 * Shape:  one number a point.
 * Units:  dimensionless.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: Lindblom, Owen & Brown 2008, arXiv:0809.3844; with D parameters Chatziioannou et al. 2017, arXiv:1703.03967 (formula from memory).
 */
export const distinguishabilitySnr = detectorQuantity(
  {
    id: 'distinguishability-snr',
    title: 'Distinguishability SNR',
    symbol: String.raw`\rho_{\mathrm{ind}}`,
    unit: '',
    roles: ['a', 'b'],
    settings: [...pairSettings, 'parameters'],
    sweepable: pairSweeps,
    naturalTolerance: (value, declared) => 0.5 * mismatchTolerance((declared?.parameters ?? houseValues.parameters) / (2 * value * value)) * Math.abs(value),
    formula: String.raw`\rho_{\mathrm{ind}}=\sqrt{\frac{D}{2\,(1-\mathcal{M})}}`,
  },
  distinguishabilityRecipe,
);
