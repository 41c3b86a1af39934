import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { follow } from '@/lib/reviews/transitions';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { loadMoveFacts, MOVED_ON, refusedMove } from './move-facts';

/** Begins a round with the referees who stayed from the last one. */
export function sendToReview(actor: Actor, submissionId: string): Promise<Outcome<{ readonly round: number }>> {
  return actOnSubmission({ actor, action: 'review.begin', submissionId }, async ({ tx, grant, facts, note }) => {
    const to = follow('send-to-review', facts.state, await loadMoveFacts(tx, submissionId, facts.round));
    if (!to.ok) return refusedMove(to.error);
    const round = facts.round + 1;
    if (!(await moveSubmission(tx, grant, { to: to.value, round }))) return fail('conflict', MOVED_ON);
    note({ round });
    return ok({ round });
  });
}
