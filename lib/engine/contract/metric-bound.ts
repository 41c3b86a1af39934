/** How well a waveform is known, as the mismatch between two runs of its simulation. */
export interface KnownTo {
  readonly waveform: string;
  readonly relative: string;
  readonly by: 'resolution' | 'radius';
  readonly mismatch: number;
}

/**
 * What two waveforms that are each known to a mismatch can tell of their own: the distance √(2m) is a metric, so
 * that √m is known to within the sum of the √ε. A bound, not a standard uncertainty.
 */
export interface MetricBound {
  /** In the quantity's unit; null on a side that stays open, or where nothing is known of the waveforms. */
  readonly low: number | null;
  readonly high: number | null;
  readonly knownTo: readonly KnownTo[];
  /** What the files do not give; the bound is then the least that has to be allowed for. */
  readonly missing: readonly string[];
}
