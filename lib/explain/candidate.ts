import type { ConventionId } from './conventions/convention';
import type { Evidence } from './flip';

/** May it be shown as an explanation, or only in the closed list of fits that may be coincidence? */
export type Standing = 'candidate' | 'coincidence';

/** One reading that gives the same numbers as others of its class. */
export interface Reading {
  readonly conventions: readonly ConventionId[];
  /** `the lower cut-off is 30 Hz instead of 20 Hz`. */
  readonly clause: string;
  /** Settings of the sheet that would say it; empty where none can. */
  readonly settings: Readonly<Record<string, unknown>>;
  readonly evidence: Evidence;
  readonly evidenceFrom: string | null;
}

/** A class of readings under which the claim would agree. A hint to people, never a verdict. */
export interface Candidate {
  /** Stable within a result: the first reading's flips. */
  readonly id: string;
  /** Settings of the first reading (open contract). */
  readonly settings: Readonly<Record<string, unknown>>;
  /** The number at each point under it. */
  readonly values: readonly (number | null)[];
  /** Share of decoy values that some reading of equal or lower complexity fits as well. */
  readonly chance: number;
  /** Readings tried of this claim, this one's complexity or lower. */
  readonly tried: number;
  readonly standing: Standing;
  /** Odds against "unexplained", one significant digit. */
  readonly odds: number;
  /** All readings with the same numbers: the number alone cannot tell which. */
  readonly readings: readonly Reading[];
  /** Other claims of the sheet that agree under it too. */
  readonly explains: readonly string[];
  /** Claims that agree as declared and would not under it. */
  readonly breaks: readonly string[];
  /** One or two changes. */
  readonly changes: 1 | 2;
  /** The whole in words. */
  readonly sentence: string;
}

/** The number that would tell the leading candidates apart. */
export interface ExtraNumber {
  readonly setting: string;
  readonly at: number;
  readonly unit: string;
  /** What the declared settings and each leading candidate give there, in the order of the candidates. */
  readonly predictions: readonly { readonly candidate: string | null; readonly value: number; readonly expandedUncertainty: number | null }[];
  /** Smallest distance between two of them in units of their uncertainty. */
  readonly apart: number;
  readonly sentence: string;
}

/** One reading that was tried, with its numbers at the points asked or why there are none. */
export interface TriedReading {
  /** Flips of the node. */
  readonly id: string;
  /** Of single readings. */
  readonly clause?: string;
  readonly values?: readonly (number | null)[];
  readonly because?: string;
}

/** What the search of one claim did. */
export interface SearchOfClaim {
  /** Readings that were tried, and of them those that gave no number. */
  readonly tried: number;
  readonly failed: number;
  /** Applicable, not tried within the budget. */
  readonly left: number;
  readonly decoys: number;
  /** Why the search ended before its end; null where it did not. */
  readonly stoppedBecause: string | null;
  readonly extraNumber: ExtraNumber | null;
  /** What came of it, in words. */
  readonly sentence: string;
  /** All that was tried, failures too. */
  readonly readings: readonly TriedReading[];
}
