import type { VerdictWord } from '@/lib/pipeline/result';
import type { RecordDocument } from '@/lib/badges/record';
import type { SignatureDocument } from '@/lib/badges/signature';
import type { RecordStanding } from '@/lib/badges/standing';
import type { DecisionView } from '@/lib/services/reviews/decision-view';
import type { ReportView } from '@/lib/services/reviews/report-view';
import type { ThreadView } from '@/lib/services/reviews/thread-view';

/** A published record as every reader sees it. `submissionId` lets the page draw the one record component. */
export interface RecordView {
  readonly id: string;
  readonly submissionId: string;
  readonly standing: RecordStanding;
  readonly standingSince: string;
  /** Why it was struck, lapsed or is under recheck; empty while it stands. */
  readonly standingReason: string;
  readonly document: RecordDocument;
  readonly signature: SignatureDocument;
  /** The one sentence of the badge page, its "covers" line, and what it does not say. */
  readonly badge: { readonly word: string; readonly sentence: string; readonly meaning: string; readonly coversLine: string; readonly rulesSentence: string };
  readonly decision: DecisionView;
  readonly reports: readonly ReportView[];
  readonly threads: readonly ThreadView[];
  readonly links: { readonly json: string; readonly signature: string; readonly bundle: string; readonly badge: string; readonly key: string; readonly page: string };
}

/** One row of the register. */
export interface RegisterRow {
  readonly id: string;
  readonly title: string;
  readonly authors: readonly string[];
  readonly enteredOn: string;
  readonly revision: number;
  readonly level: number;
  readonly standing: RecordStanding;
  /** ISO 8601, UTC. */
  readonly standingSince: string;
  readonly quantities: readonly string[];
  /** Ids of built-in curves, `attached` for the authors' own, `none` where no curve enters. */
  readonly noises: readonly string[];
  /** One a claim, in their printed order. */
  readonly verdicts: readonly VerdictWord[];
}
