import { database } from '@/db/client';
import { findInvitation } from '@/db/reads/reviews/invitations';
import { answerInvitation as writeAnswer } from '@/db/writes/reviews/invitations';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { isUuid } from '@/lib/kernel/uuid';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { follow } from '@/lib/reviews/transitions';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { loadMoveFacts, MOVED_ON } from './move-facts';

export interface InvitationAnswer {
  readonly accept: boolean;
  /** Signed by accepting: the referee has no conflict of interest. */
  readonly noConflict: boolean;
}

export const NO_CONFLICT_STATEMENT = 'I have no conflict of interest with the authors or with this claim.';

/** Accepting opens the package; the first acceptance begins the review. */
export async function answerInvitation(actor: Actor, invitationId: string, answer: InvitationAnswer): Promise<Outcome<{ readonly submissionId: string }>> {
  const known = mayGenerally('review.list-own', actor);
  if (!known.ok) return known;
  const invitation = isUuid(invitationId) ? await findInvitation(database(), invitationId) : undefined;
  if (!invitation || invitation.refereeId !== userIdOf(actor)) return { ok: false, error: NOT_FOUND };
  if (answer.accept && !answer.noConflict)
    return fail('invalid', 'To accept, state that you have no conflict of interest; otherwise decline.', [{ code: 'reviews/conflict-not-stated', where: '/noConflict', saw: 'false', expected: 'true, or a refusal' }]);
  const { submissionId } = invitation;
  return actOnSubmission({ actor, action: 'review.answer-invitation', submissionId }, async ({ tx, grant, facts, note }) => {
    const state = answer.accept ? 'accepted' : 'declined';
    const answered = await writeAnswer(tx, grant, invitationId, { state, statement: answer.accept ? NO_CONFLICT_STATEMENT : null });
    if (!answered) return fail('conflict', 'This invitation has been answered or taken back.');
    note({ invitationId, state });
    const begins = follow('first-acceptance', facts.state, await loadMoveFacts(tx, submissionId, facts.round));
    if (answer.accept && begins.ok && !(await moveSubmission(tx, grant, { to: begins.value, round: facts.round + 1 }))) return fail('conflict', MOVED_ON);
    return ok({ submissionId });
  });
}
