import type { VariationChanges } from '@/db/schema/variations';
import type { SeenTime } from '@/lib/reviews/anonymity';
import type { AnchoredNumber, ReAnchoring } from '@/lib/reviews/anchors';
import type { Closing, Side, ThreadKind, ThreadState, ThreadVisibility } from '@/lib/reviews/threads';
import type { Place } from '@/lib/kernel/place';

/** The services of the parlour: one verb a file. This file and its neighbours `*-view.ts` are what a page may see. */

/** A rerun that somebody attached to a comment, or (on the desk) one's own that is still private. */
export interface VariationView {
  readonly id: string;
  readonly claim: string;
  /** Only the changed settings, as sentences: `lower cut-off 30 Hz`. */
  readonly changes: readonly string[];
  readonly changed: VariationChanges;
  readonly state: 'queued' | 'running' | 'finished' | 'stopped';
  readonly points: readonly { readonly at: Place; readonly value: number | null; readonly expandedUncertainty: number | null; readonly official: number | null; readonly officialUncertainty: number | null }[];
  readonly unit: string;
  readonly note: string;
  /** Private until attached to a comment that authors can read. */
  readonly seenBy: 'you alone' | 'referees and editor' | 'authors too';
}

export interface CommentView {
  readonly id: string;
  /** `Referee B` across the anonymity line, else the person's name. */
  readonly by: string;
  readonly side: Side;
  readonly yours: boolean;
  readonly when: SeenTime;
  /** Markdown with mathematics; the page renders it, never as HTML from here. */
  readonly body: string;
  readonly variation: VariationView | null;
}

export interface AnchorView {
  readonly claim: string;
  readonly at: Place | null;
  /** The number when the thread was opened; null values where the anchor is a sweep as a whole. */
  readonly opened: AnchoredNumber;
  readonly openedOnRevision: number;
  /** Against the newest lodged revision's numbers: same, changed (was → now), lost; waiting while they are computed. */
  readonly now: ReAnchoring | { readonly standing: 'waiting' };
}

export interface ThreadView {
  readonly id: string;
  /** 1, 2, … in the order of opening, of the threads this reader can see. */
  readonly number: number;
  readonly kind: ThreadKind;
  readonly state: ThreadState;
  readonly visibility: ThreadVisibility;
  readonly anchor: AnchorView;
  readonly comments: readonly CommentView[];
  readonly may: { readonly reply: boolean; readonly close: readonly Closing[] };
}
