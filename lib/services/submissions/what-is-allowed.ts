import type { SubmissionAction } from '@/lib/policy/actions';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { may } from '@/lib/policy/grant';
import type { Allowed } from './submission-view';

/** For drawing buttons. The doors ask again. */
export function whatIsAllowed(actor: Actor, facts: SubmissionFacts): Allowed {
  const can = (action: SubmissionAction): boolean => may(action, actor, facts).ok;
  const open = !facts.currentLodged;
  return {
    edit: open && can('submission.edit'),
    check: open && can('submission.check'),
    lodge: open && can('submission.lodge'),
    withdraw: can('submission.withdraw'),
    revise: facts.currentLodged && can('submission.revise'),
    vary: can('submission.vary'),
    answerCandidates: can('submission.answer-candidate'),
    comment: can('review.comment'),
    report: can('review.report'),
    invite: can('review.invite'),
    decide: can('review.enter'),
  };
}
