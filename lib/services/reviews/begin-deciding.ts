import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { follow } from '@/lib/reviews/transitions';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { loadMoveFacts, MOVED_ON, refusedMove } from './move-facts';

/** The editor goes on with the reports that are in, though others are still out. */
export function beginDeciding(actor: Actor, submissionId: string): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'review.call-for-decision', submissionId }, async ({ tx, grant, facts }) => {
    const to = follow('begin-deciding', facts.state, await loadMoveFacts(tx, submissionId, facts.round));
    if (!to.ok) return refusedMove(to.error);
    return (await moveSubmission(tx, grant, { to: to.value })) ? ok(null) : fail('conflict', MOVED_ON);
  });
}
