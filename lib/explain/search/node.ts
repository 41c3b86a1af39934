import type { Flip } from '../flip';
import type { Place } from '@/lib/kernel/place';

/** One claim as the search sees it. */
export interface JudgedClaim {
  readonly id: string;
  readonly quantity: string;
  /** Printed after its numbers; none for a pure number. */
  readonly unit?: string;
  /** Does a number of this kind live by its distance from one (match-like), or by its size? Decides the law of decoys and of the unexplained. */
  readonly law: 'size' | 'distance-from-one';
  /** Scale on which T and U stand: the value itself, or its logarithm. */
  readonly scale: 'absolute' | 'ln';
  /** What the verdict said: only claims that differ or are unsettled are searched; the others can be broken. */
  readonly wanting: boolean;
  readonly points: readonly JudgedPoint[];
}

export interface JudgedPoint {
  readonly at: Place;
  readonly claimed: number;
  /** Half a unit of the last printed digit, in the unit of the number; zero where the number was given exactly. */
  readonly halfDigit: number;
  /** T on the scale of the claim, digits included. */
  readonly tolerance: number;
  /** U of the recomputed number, in its own unit. */
  readonly expandedUncertainty: number;
  /** The recomputed number under the declared settings. */
  readonly value: number;
}

/** One or two conventions read otherwise, everything else as declared. */
export interface Node {
  /** Ids of its flips joined by ` + `. */
  readonly id: string;
  readonly flips: readonly [Flip] | readonly [Flip, Flip];
}

/** What one node gives for one claim: a number a point, or why there is none. */
export type Prediction = { readonly values: readonly (number | null)[] } | { readonly because: string };

/** A node with what it gives for every claim that it applies to; all that were tried are kept, failures too. */
export interface TriedNode {
  readonly node: Node;
  /** Claim id → prediction. A claim that the node does not touch is absent. */
  readonly predictions: ReadonlyMap<string, Prediction>;
}
