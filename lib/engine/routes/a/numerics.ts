/**
 * Route A transforms each waveform once on its own axis and lets a mass stretch the frequencies.
 * This file names its knobs: the error bar of a number is how far it moves when each is turned.
 */
export interface Numerics {
  /** Each halves the step of the resampled series. */
  readonly stepHalvings: number;
  /** Each halves the spacing of the frequency bins. */
  readonly padDoublings: number;
  /** Order of the fractional end weights. */
  readonly edgeOrder: number;
  /** Order of the local interpolation of non-uniform records. */
  readonly interpolationOrder: number;
  /** Each halves the step of the table of a closed-form noise curve. */
  readonly noiseTableHalvings: number;
  /** Fraction of the resampled series' own bandwidth that enters the sums. */
  readonly topShare: number;
  /** Largest change of ln S from bin to bin beside a kink of a tabulated curve: it sets how fine the bins are. */
  readonly kinkChange: number;
  /** Halve a step whose grid ends before the content does; what was learned once holds for every variant. */
  readonly refineStep: boolean;
  /** Halve bins that do not resolve the band's edges; off while scanning. */
  readonly refineBins: boolean;
  /** Neighbouring masses of a sweep may be read from compressed nodes instead of bins. */
  readonly compress: boolean;
}

export const houseNumerics: Numerics = {
  stepHalvings: 0,
  padDoublings: 0,
  edgeOrder: 8,
  interpolationOrder: 8,
  noiseTableHalvings: 0,
  topShare: 1,
  kinkChange: 0.6,
  refineStep: true,
  refineBins: true,
  compress: true,
};
