import type { VariationRow } from '@/db/reads/variations/variations';
import { changesOf } from './changes';
import { isOfDraft, visibilityOf } from './sees-variation';
import type { VariationHead } from './variation-view';

/** What whoever sees a variation sees of it: nothing of who asked, or when. */
export const viewHead = (row: VariationRow): VariationHead => ({
  id: row.id,
  claimId: row.claimId,
  changes: changesOf(row.changes),
  note: row.note,
  revision: row.revision,
  ofDraft: isOfDraft(row),
  visibility: visibilityOf(row),
});
