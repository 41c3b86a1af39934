import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { fractionRecipe } from './detector/fraction-recipe';

/**
 * Detectable fraction: the part of a range of spins in which signals are matched at or above a threshold (Q05).
 * Shape:  one number a point, from at least five signals of equal spins.
 * Units:  a fraction, 0 … 1; edges in effective spin.
 * Error:  U from route A's own knobs and the printed digits, at the signals beside the edges.
 * Fails:  findings that stop (fewer than five signals, unequal spins, band outside the curve, no signal).
 * Source: settings.md section 3; a threshold of 0.965 loses about a tenth of the events (common practice).
 */
export const detectableFraction = detectorQuantity(
  {
    id: 'detectable-fraction',
    title: 'Detectable fraction',
    symbol: String.raw`F(\mathcal{M}_*)`,
    unit: '',
    roles: ['signals', 'templates'],
    settings: [...pairSettings, 'threshold', 'weight'],
    sweepable: [...pairSweeps, 'threshold'],
    naturalTolerance: () => 0.02,
    formula: String.raw`F(\mathcal{M}_*)=\frac{\int w(s)\,\Theta[\mathcal{M}(s)-\mathcal{M}_*]\,ds}{\int w(s)\,ds}`,
  },
  fractionRecipe,
);
