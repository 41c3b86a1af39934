import type { SeenVariationRow } from '@/db/reads/reviews/variation-runs';
import type { ResultDocument } from '@/lib/pipeline/result';
import { findAnchoredNumber } from '@/lib/reviews/anchors';
import type { ThreadVisibility } from '@/lib/reviews/threads';
import { changesAsWords, changesOf } from '@/lib/services/variations/changes';
import type { VariationView } from './thread-view';

const seenBy = (visibility: ThreadVisibility | null): VariationView['seenBy'] =>
  visibility === null ? 'you alone' : visibility === 'authors' ? 'authors too' : 'referees and editor';

/** `visibility` is that of the thread it is attached to, or null while it is private. */
export function viewVariation(row: SeenVariationRow, official: ResultDocument | null, visibility: ThreadVisibility | null): VariationView {
  const claim = row.result?.claims.find((c) => c.id === row.claimId);
  const points = (claim?.points ?? []).map(({ at, value, expandedUncertainty }) => {
    const beside = official ? findAnchoredNumber(official, { claim: row.claimId, at }) : undefined;
    return { at, value, expandedUncertainty, official: beside?.value ?? null, officialUncertainty: beside?.expandedUncertainty ?? null };
  });
  const changed = changesOf(row.changes);
  return { id: row.id, claim: row.claimId, changes: changesAsWords(changed), changed, state: row.state, points, unit: claim?.unit ?? '', note: row.note, seenBy: seenBy(visibility) };
}
