/** One-sided noise power spectral density with the range on which it is known; nothing is extrapolated. */
export interface NoiseCurve {
  readonly name: string;
  /** Id of a built-in curve, or null for an uploaded table. */
  readonly builtIn: string | null;
  readonly fLowHz: number;
  readonly fHighHz: number;
  /** S(f) in 1/Hz. Between points of a table ln S is linear in ln f (rule 2.5). Only called inside the range (relative 1e-9 allowed). */
  readonly psd: (fHz: number) => number;
  /** The table's own frequencies (kinks of the integrand), or null for a closed form. */
  readonly points: Float64Array | null;
  /** Space curves that already contain the sky average (rule 2.8). */
  readonly alreadyAveraged: boolean;
  /** Printed beside the number. */
  readonly source: string;
}
