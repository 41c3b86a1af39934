import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';

/** Takes it back before a decision; nothing is erased. */
export function withdrawSubmission(actor: Actor, submissionId: string, input: { readonly reason: string }): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.withdraw', submissionId }, async ({ tx, grant, note }) => {
    const reason = input.reason.trim();
    if (reason === '') return fail('invalid', 'No reason is given. Say in a sentence why it is withdrawn.');
    note({ reason });
    return (await moveSubmission(tx, grant, { to: 'withdrawn' })) ? ok(null) : fail('conflict', 'The submission has moved on meanwhile. Reload to see where it stands.');
  });
}
