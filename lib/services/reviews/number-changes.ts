import type { ResultDocument } from '@/lib/pipeline/result';
import { anchoredNumber, reAnchor } from '@/lib/reviews/anchors';
import type { NumberChange } from './desk-view';

/** Every point of the older result that is not the same in the newer one. */
export function numberChanges(older: ResultDocument, newer: ResultDocument): NumberChange[] {
  return older.claims.flatMap((claim) =>
    claim.points.flatMap((point) => {
      const standing = reAnchor({ claim: claim.id, at: point.at }, anchoredNumber(claim, point), newer);
      return standing.standing === 'same' ? [] : [{ claim: claim.id, at: point.at, standing }];
    }),
  );
}
