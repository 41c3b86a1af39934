import type { Finding } from '../contract/finding';
import type { BudgetLine, Figure } from '../contract/measurement';
import type { SettingName } from '../contract/settings';
import type { CompletedModes } from '../conditioning/complete-modes';
import { coarserSamples, houseSamples, radiationOnSamples, type SampledRadiation } from './news-on-samples';
import type { PreparedPoint } from './prepare-radiated';
import type { RadiationRecord } from './radiation-record';
import type { RadiationSettings } from './radiation-settings';
import type { UsedRow } from '../tones/used-rows';

/** What one route says at one point, in the quantity's unit. */
export interface Outcome {
  readonly value: number;
  /** What the value is made of; how far a knob moves it is the distance between two of these. */
  readonly vector: readonly number[];
  readonly components: Readonly<Record<string, number | null>>;
  readonly remarks?: readonly string[];
}

/** How route A is turned to find its own error. */
export interface Turned {
  /** Points of the local polynomials in time. */
  readonly order: 6 | 8;
  readonly coarse: boolean;
}

export const house: Turned = { order: 8, coarse: false };

/** What one ℓ adds, for the tail above the last one. */
export interface EllShare {
  readonly l: number;
  readonly size: number;
}

/** Series that do not depend on the start are kept between the points of a sweep. */
export interface SampledStore {
  readonly fine: (record: RadiationRecord, settings: RadiationSettings) => SampledRadiation;
  readonly coarse: (record: RadiationRecord, settings: RadiationSettings) => SampledRadiation;
}

/** A floor that is never used, where nothing is integrated. */
export const NO_FLOOR = 1;

/**
 * The last series of each kind: a sweep over the start, or U beside the value, asks for the same ones again.
 * Shape:  one store a measurement.
 * Units:  as radiationOnSamples.
 * Error:  none of its own.
 * Fails:  never.
 * Source: ours.
 */
export function sampledStore(withStrain: boolean): SampledStore {
  const keep = (numerics: typeof houseSamples): SampledStore['fine'] => {
    let last: { record: RadiationRecord; floor: number | null; found: SampledRadiation } | null = null;
    return (record, { floor }) => {
      if (last === null || last.record !== record || last.floor !== floor) last = { record, floor, found: radiationOnSamples(record, floor ?? NO_FLOOR, numerics, withStrain) };
      return last.found;
    };
  };
  return { fine: keep(houseSamples), coarse: keep(coarserSamples) };
}

export interface FindingContext {
  readonly completed: CompletedModes;
  readonly point: PreparedPoint;
  readonly outcome: Outcome;
  readonly store: SampledStore;
  readonly startDeclared: boolean;
}

/** One quantity of the family: what differs from energy to recoil. */
export interface RadiationRecipe {
  /** For sentences: "energy", "recoil". */
  readonly noun: string;
  readonly article: 'A' | 'An';
  readonly settings: readonly SettingName[];
  readonly normaliseBy: RadiationSettings['normaliseBy'];
  /** Does it need H besides Ḣ? */
  readonly withStrain: boolean;
  /** Null when what should be added before the start cannot be computed. */
  readonly byRouteA: (point: PreparedPoint, store: SampledStore, turned: Turned) => Outcome | null;
  readonly byRouteB: (point: PreparedPoint) => Outcome | null;
  /** Standard uncertainty from the printed digits of the input. */
  readonly rounding: (point: PreparedPoint, store: SampledStore, digits: number | null, outcome: Outcome) => number;
  /** Does each ℓ multiply its neighbours, so that symmetry silences none? */
  readonly couplesEll?: true;
  /** Read at one time: how the record ends does not enter. */
  readonly atOneTime?: true;
  /** Ascending in ℓ. */
  readonly shares: (point: PreparedPoint, store: SampledStore, outcome: Outcome) => EllShare[];
  /** Settings beyond those of the family, for the reader. */
  readonly rows?: (point: PreparedPoint) => readonly UsedRow[];
  /** Coverage lines beyond those of the family. */
  readonly coverage?: (point: PreparedPoint, store: SampledStore) => readonly BudgetLine[];
  /** Why there is no number where `byRouteA` gives null; else the start of an addition is named. */
  readonly noNumber?: (name: string) => Finding;
  /** Components that mean nothing within the uncertainty become null. */
  readonly settle?: (outcome: Outcome, expanded: number) => Outcome['components'];
  readonly findings: (context: FindingContext) => Finding[];
  readonly figures: (point: PreparedPoint, store: SampledStore, name: string) => Figure[];
}

/** Series of route A as turned. */
export const sampledAs = (store: SampledStore, { record, settings }: PreparedPoint, { coarse }: Turned): SampledRadiation =>
  coarse ? store.coarse(record, settings) : store.fine(record, settings);
