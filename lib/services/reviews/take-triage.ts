import { takeSubmission } from '@/db/writes/reviews/invitations';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';

/** The editor who asks holds the submission from now on; reports are told to them. */
export function takeTriage(actor: Actor, submissionId: string): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'review.take', submissionId }, async ({ tx, grant }) => {
    await takeSubmission(tx, grant);
    return ok(null);
  });
}
