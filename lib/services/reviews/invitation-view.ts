import type { SubmissionState } from '@/lib/policy/submission-state';
import type { ConflictFlag } from '@/lib/reviews/conflicts';

export type InvitationState = 'asked' | 'accepted' | 'declined' | 'lapsed' | 'relieved';

/** An invitation as the editor sees it: with name, flags and the reason kept beside an ask flag. */
export interface InvitationView {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly affiliation: string | null;
  readonly slot: string;
  readonly state: InvitationState;
  readonly invitedAt: string;
  readonly answeredAt: string | null;
  /** UTC instant by which this round's report is due; null until accepted and in review. */
  readonly reportDue: string | null;
  readonly hasReported: boolean;
  readonly flags: readonly ConflictFlag[];
  readonly reason: string | null;
}

/** What somebody who was asked sees before answering: enough to judge conflict, not the package. */
export interface OwnInvitationView {
  readonly id: string;
  readonly submissionId: string;
  readonly title: string;
  readonly authors: readonly string[];
  readonly quantities: readonly string[];
  readonly editor: string;
  readonly invitedAt: string;
  readonly answerBy: string;
  readonly state: InvitationState;
  readonly submissionState: SubmissionState;
  readonly stateWords: string;
}

/** A person the editor might ask, with what speaks against it and how much they carry now. */
export interface RefereeCandidateView {
  readonly userId: string;
  readonly name: string;
  readonly affiliation: string | null;
  readonly flags: readonly ConflictFlag[];
  /** Accepted reviews without a report, over all submissions. */
  readonly load: number;
}
