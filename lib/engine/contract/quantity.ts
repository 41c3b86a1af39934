import type { Finding } from './finding';
import type { Measurement } from './measurement';
import type { NoiseCurve } from './noise-curve';
import type { DeclaredSettings, SettingName } from './settings';
import type { Variable, Waveform } from './waveform';
import type { Workshop } from './workshop';
import type { Place, SweptValue } from '@/lib/kernel/place';

/** A part that one waveform plays in a claim. */
export type SingleRole = 'a' | 'b' | 'em' | 'gw';
/** A part that several play: the runs of one simulation, or a list. */
export type ListRole = 'series' | 'signals' | 'templates';
export type Role = SingleRole | ListRole;

/** The roles of a claim's `of`, each resolved to what the sheet names; lists in the order of the sheet. */
export interface QuantityInputs {
  readonly of: { readonly [role in SingleRole]?: Waveform } & { readonly [role in ListRole]?: readonly Waveform[] };
  readonly noise: NoiseCurve | null;
  /** Other runs of the same simulation, by the name of the waveform of this claim that they belong to. */
  readonly relatives?: ReadonlyMap<string, readonly Waveform[]>;
}

export interface MeasureRequest {
  readonly claimId: string;
  readonly inputs: QuantityInputs;
  readonly settings: DeclaredSettings;
  /** The swept setting and its values, or null for a single value. */
  readonly over: { readonly setting: SettingName; readonly values: readonly SweptValue[] } | null;
  /** Claimed values by point, for choosing the worst point; null entries for inequalities. */
  readonly claimed: readonly (number | null)[];
  /** Figures cost time; the command line with --json does not ask for them. */
  readonly withFigures: boolean;
  /** A first look: route A alone, no error bar and no budget; nothing may be concluded from it. */
  readonly routeAOnly?: boolean;
  /** Spectra kept for the next measurement of the same waveforms; only for first looks, so that no result hangs on what was computed before. */
  readonly workshop?: Workshop;
}

/** How a long measurement tells what it does and is told to stop; pure, injected. */
export interface Watch {
  readonly onProgress: (fraction: number, doing: string) => void;
  readonly cancelled: () => boolean;
}

export class Cancelled extends Error {
  constructor() {
    super('cancelled');
  }
}

/** Tolerance on the linear scale, or on ln (a fraction). */
export type ToleranceScale = 'absolute' | 'ln';

/** What each word of a setting brings along, as data: the form reads it too. */
export interface Follows {
  readonly setting: SettingName;
  readonly houseDefault: string;
  readonly words: { readonly [word: string]: { readonly unit: string; /** Those that mean something beside this word; all of the quantity's where nothing is said. */ readonly settings?: readonly SettingName[] } };
}

/**
 * One claim quantity: a row of the one table from which the sheet's schema, the composer's
 * form, the plots and the methods page are drawn. Adding a quantity is one file, one page, one test.
 */
export interface Quantity {
  readonly id: string;
  readonly title: string;
  readonly symbol: string;
  /** Printed after the number; empty for dimensionless. */
  readonly unit: string;
  readonly roles: readonly Role[];
  /** Roles that may be left out; all others are needed. */
  readonly optionalRoles?: readonly Role[];
  /** What the waveform of a role may hold; gravitational series where nothing is said. */
  readonly accepts?: { readonly [role in Role]?: readonly Variable[] };
  /** Where a quantity takes fewer words of a setting than the settings table lists. */
  readonly choices?: { readonly [name in SettingName]?: readonly string[] };
  /** Where unit and settings follow the word of another setting; `unit` and `settings` then stand for the house default, and for all words together. */
  readonly follows?: Follows;
  readonly needsNoise: boolean;
  readonly settings: readonly SettingName[];
  /** Settings that have no default for this quantity given these inputs. */
  readonly required: (inputs: QuantityInputs, declared: DeclaredSettings, over: SettingName | null) => readonly SettingName[];
  readonly sweepable: readonly SettingName[];
  readonly scale: ToleranceScale;
  /** Natural tolerance at a claimed (or, for inequalities, recomputed) value, in the quantity's unit; a few depend on a declared setting. */
  readonly naturalTolerance: (value: number, declared?: DeclaredSettings) => number;
  /** KaTeX source of the formula as used. */
  readonly formula: string;
  readonly measure: (request: MeasureRequest, watch: Watch) => Measurement;
}

/** The unit of a claim with these settings. */
export const unitOf = ({ unit, follows }: Pick<Quantity, 'unit' | 'follows'>, declared: DeclaredSettings): string =>
  (follows === undefined ? undefined : follows.words[String(declared[follows.setting] ?? follows.houseDefault)]?.unit) ?? unit;

/** A stop: the quantity cannot be computed; the findings say why. */
export const notComputable = (findings: readonly Finding[], points: readonly Place[]): Measurement => ({
  points: points.map((at) => ({ at, value: null, routes: { A: null, B: null }, expandedUncertainty: null })),
  budget: [],
  findings,
  assumed: [],
  settings: [],
  routeBPoints: [],
  figures: [],
});
