import type { VariationChanges } from '@/db/schema/variations';
import type { Problem } from '@/lib/kernel/problem';
import type { ReadingsByClaim } from '@/lib/pipeline/explain/offered-readings';
import type { ResultClaim } from '@/lib/pipeline/result';
import type { RunView } from '@/lib/services/submissions/submission-view';

export type { VariationChanges };

/** The one who asked alone; those who read the comment it is attached to; whoever has the link. */
export const VARIATION_VISIBILITIES = ['private', 'comment', 'link'] as const;
export type VariationVisibility = (typeof VARIATION_VISIBILITIES)[number];

export interface VariationHead {
  readonly id: string;
  readonly claimId: string;
  readonly changes: VariationChanges;
  readonly note: string;
  /** Number of the revision it varies, and whether that was a draft then. */
  readonly revision: number;
  readonly ofDraft: boolean;
  readonly visibility: VariationVisibility;
}

/** A rerun with other settings, as the one who asked for it sees it. Never official. */
export interface VariationView extends VariationHead {
  readonly requestedAt: string;
  /** Its result holds the one claim; the official number stands in the submission's own run. */
  readonly run: RunView;
}

export interface VariationList {
  readonly variations: readonly VariationView[];
  /** How many more may be asked for now. */
  readonly left: number;
  /** How each claim may be read otherwise, as the base run offers it; null where an earlier version measured that and kept none. */
  readonly readings: ReadingsByClaim | null;
}

/** How its computation stands, without the moments that could tell who asked. */
export type VariedRun =
  | { readonly state: 'queued' | 'running'; readonly fraction: number; readonly doing: string }
  | { readonly state: 'stopped'; readonly because: string }
  | { readonly state: 'refused'; readonly problems: readonly Problem[] }
  | { readonly state: 'measured'; readonly claim: ResultClaim };

/** One variation beside the number it varies, for everybody who may see it. Says nothing of who asked. */
export interface VariationPage extends VariationHead {
  readonly submissionId: string;
  readonly title: string;
  readonly yours: boolean;
  /** May the reader open it by its link, or shut it? */
  readonly mayShare: boolean;
  /** Where the claim itself stands, for this reader. */
  readonly from: { readonly kind: 'draft' | 'submission' | 'review'; readonly id: string } | { readonly kind: 'record'; readonly id: string };
  /** The run whose figures are drawn beside. */
  readonly officialRunId: string;
  readonly officialEngine: string;
  readonly official: ResultClaim;
  readonly runId: string;
  readonly engine: string;
  readonly run: VariedRun;
}
