import { database } from '@/db/client';
import { findInvitation } from '@/db/reads/reviews/invitations';
import { withdrawInvitation as writeWithdrawal } from '@/db/writes/reviews/invitations';
import { ok } from '@/lib/kernel/result';
import { isUuid } from '@/lib/kernel/uuid';
import type { Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';

/** Takes back an invitation that was not answered, or relieves a referee whose report is not coming. */
export async function withdrawInvitation(actor: Actor, invitationId: string): Promise<Outcome<null>> {
  const known = mayGenerally('review.list-own', actor);
  if (!known.ok) return known;
  const invitation = isUuid(invitationId) ? await findInvitation(database(), invitationId) : undefined;
  if (!invitation) return { ok: false, error: NOT_FOUND };
  return actOnSubmission({ actor, action: 'review.withdraw-invitation', submissionId: invitation.submissionId }, async ({ tx, grant, note }) => {
    const { state } = invitation;
    const gone = (state === 'asked' || state === 'accepted') && (await writeWithdrawal(tx, grant, invitationId, state));
    if (!gone) return fail('conflict', 'This invitation has been answered or taken back meanwhile.');
    note({ invitationId, from: state });
    return ok(null);
  });
}
