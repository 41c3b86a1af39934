import { pairSettings, pairSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { overlapRecipe } from './detector/match-recipe';

/**
 * Overlap of two waveforms as their files time them (Q01).
 * Shape:  one number a point.
 * Units:  dimensionless, −1 … 1.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: Cutler & Flanagan 1994, gr-qc/9402014 (from memory).
 */
export const overlap = detectorQuantity(
  {
    id: 'overlap',
    title: 'Overlap',
    symbol: String.raw`\mathcal{O}`,
    unit: '',
    roles: ['a', 'b'],
    settings: pairSettings.filter((name) => name !== 'maximise' && name !== 'templateMassRange'),
    sweepable: pairSweeps,
    naturalTolerance: () => 1e-3,
    formula: String.raw`\mathcal{O}=\frac{\langle a|b\rangle}{\sqrt{\langle a|a\rangle\,\langle b|b\rangle}},\quad\langle a|b\rangle=4\,\mathrm{Re}\int_{f_l}^{f_h}\frac{\tilde a(f)\,\tilde b^{*}(f)}{S(f)}\,df`,
  },
  overlapRecipe,
);
