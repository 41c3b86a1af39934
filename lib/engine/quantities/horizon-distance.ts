import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { horizonDistanceRecipe } from './detector/horizon-recipe';

/**
 * The luminosity distance at which the loudness falls to the threshold (Q08).
 * Shape:  one number a point.
 * Units:  Mpc.
 * Error:  U from route A's own knobs and the printed digits; roots to 1e-8 in z.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken). A threshold that is nowhere crossed.
 * Source: Chen et al. 2021, arXiv:1709.08079 for the definition; expansion by Planck 2018, arXiv:1807.06209 (from memory).
 */
export const horizonDistance = detectorQuantity(
  {
    id: 'horizon-distance',
    title: 'Horizon distance',
    symbol: String.raw`D_{\mathrm{h}}`,
    unit: 'Mpc',
    roles: ['a'],
    settings: loudnessSettings,
    sweepable: loudnessSweeps,
    naturalTolerance: (value) => 0.01 * Math.abs(value),
    formula: String.raw`\rho\bigl[(1+z)M,\,D_L(z)\bigr]=\rho_*\quad\text{(source frame)},\qquad D_{\mathrm{h}}=D\,\rho/\rho_*\quad\text{(detector frame)}`,
  },
  horizonDistanceRecipe,
);
