import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { horizonRedshiftRecipe } from './detector/horizon-recipe';

/** Natural tolerance for each unit of 1 + z: the shift of a line's place by one per cent. */
const SHARE = 0.01;

/**
 * The redshift at which the loudness falls to the threshold (Q08); of several, the largest.
 * Shape:  one number a point.
 * Units:  dimensionless, > 0.
 * Error:  U from route A's own knobs and the printed digits; roots to 1e-8 in z.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken). A threshold that is nowhere crossed.
 * Source: Chen et al. 2021, arXiv:1709.08079 for the definition; expansion by Planck 2018, arXiv:1807.06209 (from memory).
 */
export const horizonRedshift = detectorQuantity(
  {
    id: 'horizon-redshift',
    title: 'Horizon redshift',
    symbol: String.raw`z_{\mathrm{h}}`,
    unit: '',
    roles: ['a'],
    settings: loudnessSettings,
    sweepable: loudnessSweeps,
    naturalTolerance: (value) => SHARE * (1 + Math.abs(value)),
    formula: String.raw`\rho\bigl[(1+z_{\mathrm{h}})M,\,D_L(z_{\mathrm{h}})\bigr]=\rho_*\quad\text{(source frame)},\qquad D_L(z_{\mathrm{h}})=D\,\rho/\rho_*\quad\text{(detector frame)}`,
  },
  horizonRedshiftRecipe,
);
