/**
 * Fraction: how much of a range of spins a search would see. Best matches at sampled spins become a curve, and the curve an area.
 */
import type { MatchOutcome } from '../contract/route';

/** One signal: its effective spin, its best template and the match with it. */
export interface SampledMatch {
  readonly spin: number;
  readonly template: number;
  readonly outcome: MatchOutcome;
  /** Optimal loudness; 1 where the weight does not ask for it. */
  readonly rho: number;
}

export interface FractionFound {
  /** By rising spin. */
  readonly samples: readonly SampledMatch[];
  /** Places of the samples in the list of the claim. */
  readonly order: readonly number[];
  readonly area: Area;
}

/** Where the curve is at or above the threshold, and what part of the weight lies there. */
export interface Area {
  readonly fraction: number;
  readonly regions: readonly (readonly [from: number, to: number])[];
}

/** What is measured along the effective spin: equal spins alone, or a plane of two spins that are uniform and independent. */
export interface SpinMeasure {
  readonly kind: 'diagonal' | 'plane';
  /** Of the heavier and the lighter body, as parts of the whole. */
  readonly m1: number;
  readonly m2: number;
  /** Times the cube of the loudness. */
  readonly volume: boolean;
}

export interface FractionProblem {
  readonly spins: readonly number[];
  readonly matches: readonly number[];
  readonly rhos: readonly number[];
  readonly threshold: number;
  readonly measure: SpinMeasure;
}
