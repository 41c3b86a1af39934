import { countReferees, findAssignment, findSlot } from '@/db/reads/reviews/invitations';
import { handInReport as writeReport, keepNote } from '@/db/writes/reviews/reports';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import type { Transaction } from '@/db/client';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { REPORT_ANSWER_MAX_CHARACTERS, REPORT_QUESTIONS, unanswered, type Confidence, type Recommendation, type ReportAnswers } from '@/lib/reviews/report';
import { follow } from '@/lib/reviews/transitions';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { appOrigin } from '@/lib/services/mail-outbox/app-origin';
import { reportReceivedLetter } from '@/lib/services/mail-outbox/letters';
import { queueMail } from '@/lib/services/mail-outbox/queue-mail';
import { MOVED_ON } from './move-facts';
import { findOfficialResult, type LodgedResult } from './official-result';

export interface ReportRequest {
  readonly answers: ReportAnswers;
  readonly recommendation: Recommendation;
  readonly confidence: Confidence;
  /** For the editor alone; kept apart from the report. */
  readonly noteToEditor?: string | undefined;
}

/** One report a referee and round. The last one that was out moves the submission to Deciding. */
export function handInReport(actor: Actor, submissionId: string, request: ReportRequest): Promise<Outcome<{ readonly reportId: string; readonly allIn: boolean }>> {
  return actOnSubmission({ actor, action: 'review.report', submissionId }, async ({ tx, grant, facts, note }) => {
    const invalid = checkAnswers(request.answers);
    if (invalid) return invalid;
    const slot = await findSlot(tx, submissionId, 'userId' in actor ? actor.userId : '');
    const official = await findOfficialResult(tx, submissionId);
    if (slot === undefined || !official) return fail('precondition', 'There is no lodged revision to report on.');
    const { answers, recommendation, confidence } = request;
    const reportId = await writeReport(tx, grant, { slot, round: facts.round, revision: official.revision, answers, recommendation, confidence });
    if (reportId === undefined) return fail('conflict', 'Your report of this round is in already; a report is never changed.');
    const privately = request.noteToEditor?.trim() ?? '';
    if (privately !== '') await keepNote(tx, grant, privately);
    const counts = await countReferees(tx, submissionId, facts.round);
    const to = follow('all-reports-in', facts.state, { ...counts, decision: null, hasSignedRecord: false });
    if (to.ok && !(await moveSubmission(tx, grant, { to: to.value }))) return fail('conflict', MOVED_ON);
    await tellEditor(tx, facts, official, { reportId, slot, allIn: to.ok });
    note({ reportId });
    return ok({ reportId, allIn: to.ok });
  });
}

function checkAnswers(answers: ReportAnswers) {
  const missing = unanswered(answers).map((id) => ({ code: 'reviews/unanswered', where: `/answers/${id}`, saw: 'nothing', expected: 'an answer, be it one sentence' }));
  const long = REPORT_QUESTIONS.filter((q) => answers[q.id].length > REPORT_ANSWER_MAX_CHARACTERS).map((q) => ({
    code: 'reviews/answer-length',
    where: `/answers/${q.id}`,
    saw: `${answers[q.id].length} characters`,
    expected: `at most ${REPORT_ANSWER_MAX_CHARACTERS}`,
  }));
  const problems = [...missing, ...long];
  return problems.length > 0 ? fail('invalid', `${problems.length} of the answers need mending before the report can be handed in.`, problems) : undefined;
}

async function tellEditor(tx: Transaction, facts: SubmissionFacts, official: LodgedResult, report: { reportId: string; slot: string; allIn: boolean }): Promise<void> {
  const editor = await findAssignment(tx, facts.submissionId);
  if (!editor) return;
  const url = `${appOrigin()}/review/${facts.submissionId}`;
  await queueMail(tx, editor.email, `report:${report.reportId}`, reportReceivedLetter({ name: editor.name, title: official.title, slot: report.slot, round: facts.round, allIn: report.allIn, url }));
}
