import { database } from '@/db/client';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { may } from '@/lib/policy/grant';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { getDraft } from './get-draft';
import { getPublic, getReview } from './get-lodged';
import type { SubmissionView } from './submission-view';

/** The view that fits the one who looks: the draft for its authors while they write, else the review, else the record. */
export async function getSubmission(actor: Actor, submissionId: string): Promise<Outcome<SubmissionView>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  switch (facts && fittingView(actor, facts)) {
    case 'draft': return getDraft(actor, submissionId);
    case 'review': return getReview(actor, submissionId);
    case 'public': return getPublic(actor, submissionId);
    default: return { ok: false, error: NOT_FOUND };
  }
}

export function fittingView(actor: Actor, facts: SubmissionFacts): SubmissionView['kind'] | null {
  if (!facts.currentLodged && may('submission.view-draft', actor, facts).ok) return 'draft';
  if (may('submission.view-review', actor, facts).ok) return 'review';
  return may('submission.view-public', actor, facts).ok ? 'public' : null;
}
