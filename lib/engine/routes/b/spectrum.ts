import type { Side } from '../../contract/route';
import type { PairTransform } from './block-fourier';

/**
 * Transforms of the real parts of z = h₊ − i·h× about the source's own centre:
 * x̃ = h̃₊ and ỹ = −h̃×, in strain per Hz, at f > 0.
 */
export type Spectrum = PairTransform;

export interface ModeSpectrum {
  readonly l: number;
  readonly m: number;
  readonly spectrum: Spectrum;
}

/** A side of an inner product, ready to be read at any frequency. */
export interface Source {
  /** Read from lines in frequency: its span is one of group delays, not of a record. */
  readonly givenInFrequency: boolean;
  /** Middle of the record in s, on the time axis of its file. */
  readonly centreS: number;
  /** Length of the record in s: the longest lag of its own correlation. */
  readonly spanS: number;
  /** Content above this is zero (rule 2.5). */
  readonly nyquistHz: number;
  /** Above this frequency less than 1e-13 of the noise-weighted power is left, on the side's line of sight or in all modes. */
  readonly liveHighHz: (psd: (fHz: number) => number, lowHz: number, highHz: number, allModes: boolean) => number;
  readonly line: (inclinationRad: number, azimuthRad: number, fHz: Float64Array) => Spectrum;
  readonly modes: (fHz: Float64Array) => ModeSpectrum[];
}

/** How hard route B works; the default is for results, the others for its own error estimates. */
export interface RouteBKnobs {
  /** Longest stride over resolved steps, 1 or 2. */
  readonly thinning: 1 | 2;
  /** Goal of each quadrature panel. */
  readonly quadrature: number;
}

export const emptySpectrum = (n: number): Spectrum => ({
  xRe: new Float64Array(n),
  xIm: new Float64Array(n),
  yRe: new Float64Array(n),
  yIm: new Float64Array(n),
});

/** Time derivatives that separate the file's variable from strain (rule 2.1). */
export const derivativeOrder = (side: Side): 0 | 1 | 2 => (side.waveform.variable === 'news' ? 1 : side.waveform.variable === 'psi4' ? 2 : 0);

/** Divides a transform by (2πif)^order and multiplies it by `factor`, in place. */
export function integrateAndScale(spectrum: Spectrum, f: Float64Array, order: 0 | 1 | 2, factor: number): void {
  for (const [re, im] of [[spectrum.xRe, spectrum.xIm], [spectrum.yRe, spectrum.yIm]] as const) {
    for (let i = 0; i < f.length; i++) {
      const size = factor / (2 * Math.PI * f[i]!) ** order;
      const [a, b] = [re[i]! * size, im[i]! * size];
      re[i] = order === 0 ? a : order === 1 ? b : -a;
      im[i] = order === 0 ? b : order === 1 ? -a : -b;
    }
  }
}

/** target += (cr + i·ci)·z for the complex series z = x + iy, i.e. on its two real transforms. */
export function addRotated(target: Spectrum, from: Spectrum, cr: number, ci: number): void {
  for (let i = 0; i < target.xRe.length; i++) {
    target.xRe[i] = target.xRe[i]! + cr * from.xRe[i]! - ci * from.yRe[i]!;
    target.xIm[i] = target.xIm[i]! + cr * from.xIm[i]! - ci * from.yIm[i]!;
    target.yRe[i] = target.yRe[i]! + cr * from.yRe[i]! + ci * from.xRe[i]!;
    target.yIm[i] = target.yIm[i]! + cr * from.yIm[i]! + ci * from.xIm[i]!;
  }
}
