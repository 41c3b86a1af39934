/**
 * The types that the hall hands to the workshop. Everything here is already in the house
 * convention (h = plus − i·cross, H22 ∝ e^{−iφ}, ψ4 divided by its declared factor); what is
 * still the file's own is its unit of time and of amplitude, kept so that a mass can stretch it.
 */
export type Variable = 'strain' | 'news' | 'psi4' | 'phi2' | 'luminosity';

/** One spin-weighted mode, samples parallel to the waveform's axis. */
export interface Mode {
  readonly l: number;
  readonly m: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
  /**
   * Frequency domain only: the samples are H̃(−f) against the positive axis. Set on partners made
   * by the mirror rule, whose content lies at −f; a mode as given has content at +f alone.
   */
  readonly atNegativeFrequencies?: true;
}

export interface ModeSet {
  readonly kind: 'modes';
  readonly modes: readonly Mode[];
}

/** Strain along one line of sight: plus and cross, no harmonics. `cross` is null when the file has none. A luminosity in erg/s is kept as `plus`, told by the variable. */
export interface LineOfSight {
  readonly kind: 'line-of-sight';
  readonly plus: Float64Array;
  readonly cross: Float64Array | null;
  /** Imaginary parts, in the frequency domain only (time-domain polarisations are real). */
  readonly plusIm?: Float64Array;
  readonly crossIm?: Float64Array | null;
}

export interface BinaryFacts {
  readonly massRatio?: number;
  readonly chi1z?: number;
  readonly chi2z?: number;
  readonly admEnergy?: number;
  readonly admAngularMomentum?: number;
  readonly remnantMass?: number;
  readonly remnantSpin?: number;
  readonly eccentricity?: number;
  readonly fieldGauss?: number;
}

export interface Waveform {
  /** Its name in the sheet, for messages. */
  readonly name: string;
  readonly domain: 'time' | 'frequency';
  /** Time: the axis is in M or in seconds. Frequency: `M` means 1/M, `s` means Hz. */
  readonly unit: 'M' | 's';
  /** `rh/M` (or rḣ, rMψ4, rφ2 as `variable` says), physical strain, or φ2 per unit field. */
  readonly amplitudeUnit: 'rh/M' | 'strain' | 'geometric' | 'perField';
  readonly variable: Variable;
  /** Strictly increasing, finite; at least two samples. In the file's own zero of time. */
  readonly axis: Float64Array;
  /** (last − first)/(N − 1) when the steps are equal to within 1e-5, else null (settings.md rule 2.1). */
  readonly uniformStep: number | null;
  readonly content: ModeSet | LineOfSight;
  /** What to do about modes with m < 0; null when the sheet does not say (rule 2.3). */
  readonly negativeM: 'mirror' | 'given' | 'none' | null;
  /** The file's own mass and distance, when physical strain may be restretched (rule 2.6). */
  readonly ownTotalMassMsun: number | null;
  readonly ownDistanceMpc: number | null;
  readonly junkEndM: number | null;
  readonly binary: BinaryFacts;
  /** Name shared by the resolutions or radii of one simulation. */
  readonly series?: string;
  /** Grid spacing in M. */
  readonly resolution?: number;
  readonly extractionRadiusM?: number;
  /** Areal where the sheet does not say. */
  readonly radiusType?: 'areal' | 'isotropic' | 'coordinate';
  readonly timeLabel?: 'retarded' | 'coordinate';
  /** Tetrad of φ₂; symmetric where the sheet does not say. */
  readonly tetrad?: 'symmetric' | 'kinnersley';
  /** Significant digits printed in the file's amplitude columns; null when not text. For the rounding component. */
  readonly significantDigits: number | null;
}
