import type { QueueGroup } from '@/lib/reviews/queue';
import type { VerdictWord } from '@/lib/pipeline/result';
import type { SubmissionState } from '@/lib/policy/submission-state';

export interface QueueRow {
  readonly submissionId: string;
  readonly title: string;
  readonly authors: readonly string[];
  readonly group: string | null;
  readonly state: SubmissionState;
  readonly stateWords: string;
  readonly revision: number;
  readonly verdicts: readonly VerdictWord[];
  /** Who has the ball, and for how long: `Referee A`, day 25 of 21 is 4 days over. */
  readonly ball: { readonly with: string; readonly you: boolean; readonly day: number; readonly of: number | null };
  /** Why it stands in this group: `1 of 2 reports`, `routes disagree on C2`. */
  readonly because: string;
  readonly next: 'take' | 'assign' | 'send-to-review' | 'remind' | 'decide' | 'look' | 'open';
}

export interface QueueView {
  readonly total: number;
  readonly needYou: number;
  readonly groups: readonly { readonly group: QueueGroup; readonly rows: readonly QueueRow[] }[];
}
