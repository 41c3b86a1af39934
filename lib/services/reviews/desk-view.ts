import type { ReAnchoring } from '@/lib/reviews/anchors';
import type { SubmissionState } from '@/lib/policy/submission-state';
import type { DecisionView } from './decision-view';
import type { InvitationView } from './invitation-view';
import type { EditorNoteView, ReportView } from './report-view';
import type { ThreadView, VariationView } from './thread-view';
import type { Place } from '@/lib/kernel/place';

/**
 * Everything people said about one submission, as one reader may see it. The numbers themselves are
 * the record view's; the desk sits beside it.
 */
export interface DeskView {
  readonly submissionId: string;
  readonly title: string;
  readonly state: SubmissionState;
  /** `In review (round 2)`. */
  readonly stateWords: string;
  readonly round: number;
  readonly revision: number;
  /** As whom you read: `Referee C`, or your own name. */
  readonly you: { readonly role: 'author' | 'co-author' | 'referee' | 'editor'; readonly name: string };
  /** Referee only: UTC instant, and whether this round's report is in. */
  readonly report: { readonly due: string | null; readonly handedIn: boolean } | null;
  readonly threads: readonly ThreadView[];
  /** Your own reruns that are attached to nothing yet. */
  readonly variations: readonly VariationView[];
  /** The editor sees all, a referee their own and those released, an author those released. */
  readonly reports: readonly ReportView[];
  /** Released decisions, the newest first. */
  readonly decisions: readonly DecisionView[];
  /** What moved between the revision before this one and this one; empty in the first. */
  readonly changes: readonly NumberChange[];
  /** The editor's alone, else null; a referee gets only their own notes. */
  readonly notes: readonly EditorNoteView[];
  readonly invitations: readonly InvitationView[] | null;
  readonly may: {
    readonly openThread: boolean;
    readonly report: boolean;
    readonly noteToEditor: boolean;
    readonly takeTriage: boolean;
    readonly invite: boolean;
    readonly sendToReview: boolean;
    readonly beginDeciding: boolean;
    readonly decide: boolean;
  };
}

/** "This number changed: 23.71 → 23.69". */
export interface NumberChange {
  readonly claim: string;
  readonly at: Place;
  readonly standing: Exclude<ReAnchoring, { readonly standing: 'same' }>;
}
