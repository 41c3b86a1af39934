import { loudnessSettings, loudnessSweeps } from './detector/allowed-settings';
import { detectorQuantity } from './detector/detector-quantity';
import { volumeRatioRecipe } from './detector/loudness-recipes';

/**
 * Ratio of the volumes in which two waveforms are heard: the cube of the loudness ratio, or by comoving volume (Q07).
 * Shape:  one number a point.
 * Units:  dimensionless.
 * Error:  U from route A's own knobs and the printed digits; 1e-12 on smooth, well sampled data.
 * Fails:  findings that stop (band outside the curve, no signal, an average that cannot be taken).
 * Source: Euclidean cube (common practice); comoving: dV_c/dz/(1+z) out to each horizon.
 */
export const volumeRatio = detectorQuantity(
  {
    id: 'volume-ratio',
    title: 'Volume ratio',
    symbol: String.raw`R_V`,
    unit: '',
    roles: ['a', 'b'],
    settings: [...loudnessSettings, 'rateLaw'],
    sweepable: loudnessSweeps,
    naturalTolerance: (value) => 0.03 * Math.abs(value),
    formula: String.raw`R_V=\left(\frac{\rho_a}{\rho_b}\right)^{3}\quad\text{or}\quad\frac{\int_0^{z_a}\frac{dV_c}{dz}\frac{dz}{1+z}}{\int_0^{z_b}\frac{dV_c}{dz}\frac{dz}{1+z}}`,
  },
  volumeRatioRecipe,
);
