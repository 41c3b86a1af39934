import type { VariationChanges } from '@/db/schema/variations';
import type { RunView } from '@/lib/services/submissions/submission-view';

/** A rerun with other settings, as the one who asked for it sees it. Never official. */
export interface VariationView {
  readonly id: string;
  readonly claimId: string;
  /** Number of the lodged revision it varies. */
  readonly changes: VariationChanges;
  readonly note: string;
  readonly requestedAt: string;
  /** Its result holds the one claim at one point; the official number stands in the submission's own run. */
  readonly run: RunView;
}

export interface VariationList {
  readonly variations: readonly VariationView[];
  /** How many more may be asked for now. */
  readonly left: number;
}
