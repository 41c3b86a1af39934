import { samePlace, type Place } from '@/lib/kernel/place';
import type { ResultClaim, ResultDocument, ResultPoint } from '@/lib/pipeline/result';

/** The number a thread hangs on: a claim, and one point of it where the claim is a sweep. */
export interface Anchor {
  readonly claim: string;
  /** The swept setting at the point, e.g. `{ totalMassMsun: 60 }`; null for the claim as a whole. */
  readonly at: Place | null;
}

/** What the number was when the thread was opened; kept, so that a later revision can say what changed. */
export interface AnchoredNumber {
  readonly printed: string | null;
  readonly value: number | null;
  /** Not kept with threads of earlier versions. */
  readonly expandedUncertainty?: number | null;
  readonly unit?: string;
}

export type ReAnchoring =
  | { readonly standing: 'same' }
  | { readonly standing: 'changed'; readonly was: AnchoredNumber; readonly now: AnchoredNumber }
  | { readonly standing: 'lost'; readonly was: AnchoredNumber };

export const anchoredNumber = ({ unit }: Pick<ResultClaim, 'unit'>, { printed, value, expandedUncertainty }: ResultPoint): AnchoredNumber => ({ printed, value, expandedUncertainty, unit });

/**
 * The number under an anchor, or undefined when the result has no such place. A claim of one
 * point is its own whole, so an anchor without `at` finds it.
 */
export function findAnchoredNumber(result: ResultDocument, anchor: Anchor): AnchoredNumber | undefined {
  const claim = result.claims.find((c) => c.id === anchor.claim);
  if (!claim) return undefined;
  const { at } = anchor;
  if (at !== null && Object.keys(at).length > 0) {
    const point = claim.points.find((p) => samePlace(p.at, at));
    return point ? anchoredNumber(claim, point) : undefined;
  }
  const only = claim.points.length === 1 ? claim.points[0] : undefined;
  return only ? anchoredNumber(claim, only) : { printed: null, value: null };
}

/** Where a thread stands in a newer result. Lost anchors are listed, never dropped. */
export function reAnchor(anchor: Anchor, was: AnchoredNumber, result: ResultDocument): ReAnchoring {
  const now = findAnchoredNumber(result, anchor);
  if (!now) return { standing: 'lost', was };
  const same = Object.is(now.value, was.value) && now.printed === was.printed;
  return same ? { standing: 'same' } : { standing: 'changed', was, now };
}
