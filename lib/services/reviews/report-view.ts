import type { SeenTime } from '@/lib/reviews/anonymity';
import type { Confidence, Recommendation, ReportAnswers } from '@/lib/reviews/report';

/** A report as its reader sees it; authors see none before the decision that releases them all together. */
export interface ReportView {
  readonly id: string;
  readonly by: string;
  readonly yours: boolean;
  readonly round: number;
  readonly revision: number;
  readonly when: SeenTime;
  readonly answers: ReportAnswers;
  readonly recommendation: Recommendation;
  readonly confidence: Confidence;
}

/** A line that only the editor reads: never part of a report, never released. */
export interface EditorNoteView {
  readonly id: string;
  /** With the real name, since only the editor (and its writer) get it. */
  readonly by: string;
  readonly yours: boolean;
  readonly at: string;
  readonly body: string;
}
