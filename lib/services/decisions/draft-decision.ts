import { countReports } from '@/db/reads/reviews/reports';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { DECISION_REMARKS, LEVELS, openLevel, signingWords } from '@/lib/reviews/decision';
import { draftNumbers, draftPoints } from '@/lib/reviews/letter';
import { readSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import type { DecisionDraftView } from '@/lib/services/reviews/decision-view';
import { findOfficialResult } from '@/lib/services/reviews/official-result';
import { loadLetterThreads } from './letter-threads';

/** What the decision page starts from: which levels are open and why not, the letter's numbers and points. The prose is the editor's. */
export function draftDecision(actor: Actor, submissionId: string): Promise<Outcome<DecisionDraftView>> {
  return readSubmission({ actor, action: 'review.see-identities', submissionId }, async ({ reader }) => {
    const official = await findOfficialResult(reader, submissionId);
    if (!official) return { ok: false, error: NOT_FOUND };
    const facts = { result: official.result, reports: await countReports(reader, submissionId) };
    const levels = LEVELS.map((level) => {
      const opened = openLevel(level, facts);
      return { level, open: opened.ok, covers: opened.ok ? opened.value : [], refusals: opened.ok ? [] : opened.error };
    });
    return ok({
      levels,
      remarks: DECISION_REMARKS,
      letter: { numbers: official.result ? draftNumbers(official.result) : [], points: draftPoints(await loadLetterThreads(reader, submissionId)) },
      signingWords: signingWords(official.title),
    });
  });
}
