import type { Transaction } from '@/db/client';
import { editorNotes, reports } from '@/db/schema/reports';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import type { Confidence, Recommendation, ReportAnswers } from '@/lib/reviews/report';

export interface NewReport {
  readonly slot: string;
  readonly round: number;
  readonly revision: number;
  readonly answers: ReportAnswers;
  readonly recommendation: Recommendation;
  readonly confidence: Confidence;
}

const referee = (grant: SubmissionGrant): string => {
  const userId = userIdOf(grant.actor);
  if (userId === null) throw new Error('a report needs a referee');
  return userId;
};

/** Undefined when this round's report of this referee is in already. */
export async function handInReport(tx: Transaction, grant: SubmissionGrant<'review.report'>, report: NewReport): Promise<string | undefined> {
  const [made] = await tx
    .insert(reports)
    .values({ submissionId: grant.submissionId, refereeId: referee(grant), ...report })
    .onConflictDoNothing({ target: [reports.submissionId, reports.refereeId, reports.round] })
    .returning({ id: reports.id });
  return made?.id;
}

export async function keepNote(tx: Transaction, grant: SubmissionGrant<'review.note-to-editor'> | SubmissionGrant<'review.report'>, body: string): Promise<string> {
  const [made] = await tx.insert(editorNotes).values({ submissionId: grant.submissionId, writerId: referee(grant), body }).returning({ id: editorNotes.id });
  if (!made) throw new Error('the database gave no row back');
  return made.id;
}
