import type { NoiseCurve } from './noise-curve';
import type { MaximiseOver, Response } from './settings';
import type { Waveform } from './waveform';

/**
 * The taper as numbers (settings.md rule 2.4): both routes read the same definition and
 * evaluate it on their own grids. Times in the waveform's own unit; null = that end is quiet.
 */
export interface TaperWindow {
  readonly start: { readonly from: number; readonly to: number } | null;
  readonly end: { readonly from: number; readonly to: number } | null;
}

/** One waveform as it enters one inner product. */
export interface Side {
  /** Modes completed (mirror) and restricted to those in use; rule 2.3. */
  readonly waveform: Waveform;
  readonly taper: TaperWindow;
  /** Seconds per unit of the axis (GM(1+z)/c³ for M; M/M₀ or 1 for seconds). */
  readonly secondsPerUnit: number;
  /** Strain per unit of amplitude: (GM/c²)/D for rh/M; (M/M₀)(D₀/D) or 1 for physical strain. */
  readonly strainPerUnit: number;
  /** Line of sight; ignored for line-of-sight content. */
  readonly inclinationRad: number;
  readonly azimuthRad: number;
}

export interface Band {
  readonly noise: NoiseCurve;
  /** Exact edges of the integral in Hz. */
  readonly fLowHz: number;
  readonly fHighHz: number;
}

/** 4 Re ∫ of the plus and cross strain along the line of sight, dimensionless (SNR²). */
export interface ResponseGram {
  readonly plusPlus: number;
  readonly crossCross: number;
  readonly plusCross: number;
}

export interface MatchOutcome {
  readonly match: number;
  /** 1 − match as ½‖â − b̂‖², computed without cancellation. */
  readonly mismatch: number;
  /** b must be moved by this, later > 0. */
  readonly timeShiftS: number;
  /** Advance of b's wave phase; with `complex` and a mode set the change of b's azimuth. */
  readonly phaseShiftRad: number;
  /** ψ of the rotation e^{2iψ} of b's h₊ − ih×, when the polarisation is maximised over. */
  readonly polarisationRad?: number;
  /** b's inclination and the factor on b's mass, when maximised over. */
  readonly inclinationRad?: number;
  readonly massFactor?: number;
  /** A maximum on a bound of the mass range is a lower bound only. */
  readonly onBound?: boolean;
}

export interface MatchRequest {
  readonly a: Side;
  readonly b: Side;
  readonly band: Band;
  readonly response: Response;
  readonly maximise: readonly MaximiseOver[];
  readonly templateMassRange: readonly [number, number];
  /** A shift on whose hill the maximum is known to lie, where nothing but shift and turn are free. */
  readonly nearShiftS?: number;
  /** Rebuilds b at a factor of its mass, for templateMass. */
  readonly rescale: (b: Side, factor: number) => Side;
}

/** A list of templates to which signals are compared one by one. */
export interface TemplateRequest extends Omit<MatchRequest, 'a' | 'b'> {
  readonly templates: readonly Side[];
  /** Asked now and then with the share that is done; throws to stop. */
  readonly onStep?: (share: number) => void;
}

/** The template with the largest match, the first of several equal ones. */
export interface BestTemplate {
  readonly index: number;
  readonly outcome: MatchOutcome;
}

/** A direction from which modes are looked at. */
export interface Sight {
  readonly inclinationRad: number;
  readonly azimuthRad: number;
}

/** The best match of b with a seen from one sight. */
export interface SightMatch {
  readonly match: number;
  /** ρ² of a from there, both polarisations. */
  readonly powerA: number;
  /** Whence b is seen at the maximum, and by how much it was moved (later > 0). */
  readonly b: Sight;
  readonly timeShiftS: number;
  /** Factor on b's mass, when maximised over, and whether it is a bound of the range. */
  readonly massFactor?: number;
  readonly onBound?: boolean;
}

/** Products of the modes of two waveforms taken once, for any number of sights. */
export interface SightMatcher {
  /** The maximum over what the request leaves free; where nothing moves b it is seen from a's sight. */
  readonly best: (a: Sight) => SightMatch;
  /** The same near a shift and with b's sight held. */
  readonly held: (a: Sight, at: SightMatch) => SightMatch;
}

/** `complex` matches from many sights: what may be free, and whether all sights have one inclination. */
export interface SightRequest {
  readonly a: Side;
  readonly b: Side;
  readonly band: Band;
  readonly maximise: readonly MaximiseOver[];
  /** Null when sights of every inclination will be asked for. */
  readonly inclinationRad: number | null;
  /** Where b's mass is free: its range, and b at a factor of its mass. */
  readonly mass?: Pick<MatchRequest, 'templateMassRange' | 'rescale'>;
  /** Asked now and then during long work; throws to stop. */
  readonly onStep?: () => void;
}

/**
 * What a route can do. Routes A and B implement this by different numerics: they share the
 * parsed samples, the closed forms (harmonics, noise rule, taper window), and nothing else.
 */
export interface DetectorRoute {
  readonly name: 'A' | 'B';
  readonly gram: (side: Side, band: Band) => ResponseGram;
  /** Many lines of sight at once, for averages over the sphere; where absent, `gram` is asked for each. */
  readonly grams?: (side: Side, band: Band, sights: readonly { readonly inclinationRad: number; readonly azimuthRad: number }[]) => readonly ResponseGram[];
  /** `complex` matches from many sights with the modes' products taken once. */
  readonly sights: (request: SightRequest) => SightMatcher;
  /** 4∫A²/S df of an amplitude known in closed form, in 1/Hz. */
  readonly powerOf: (amplitude: (fHz: number) => number, band: Band) => number;
  /** Σ over modes of 2∫_{−∞}^{∞}|h̃_ℓm|²/S(|f|) df, band-limited in |f|, in strain units (rule 2.8); modes only. */
  readonly modePower: (side: Side, band: Band) => number;
  readonly overlap: (a: Side, b: Side, band: Band, response: Response) => number;
  readonly match: (request: MatchRequest) => MatchOutcome;
  /** For each signal the template that fits it best: what `match` of every pair would find. */
  readonly bestTemplates: (signals: readonly Side[], request: TemplateRequest) => readonly BestTemplate[];
  /** ‖a − b aligned‖² with actual amplitudes, for `rhoWithAmplitude`. */
  readonly residualPower: (request: MatchRequest, at: MatchOutcome) => number;
}
