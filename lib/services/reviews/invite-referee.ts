import { randomInt } from 'node:crypto';
import { findConflictFacts } from '@/db/reads/reviews/conflict-facts';
import { findPerson, listInvitations } from '@/db/reads/reviews/invitations';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { inviteReferee as writeInvitation, takeIfFree } from '@/db/writes/reviews/invitations';
import { ok } from '@/lib/kernel/result';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { drawSlot } from '@/lib/reviews/anonymity';
import { addDays, CLOCK_DAYS } from '@/lib/reviews/clocks';
import { findConflicts, isBarred, needsReason, type ConflictFlag } from '@/lib/reviews/conflicts';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { appOrigin } from '@/lib/services/mail-outbox/app-origin';
import { invitationLetter } from '@/lib/services/mail-outbox/letters';
import { queueMail } from '@/lib/services/mail-outbox/queue-mail';

export interface InvitationRequest {
  readonly refereeId: string;
  /** Why an ask flag is no bar; kept with the invitation. */
  readonly reason?: string | undefined;
}

/** Asks one person. A bar cannot be set aside; an ask flag needs the editor's sentence; both are kept as they stood. */
export function inviteReferee(actor: Actor, submissionId: string, request: InvitationRequest): Promise<Outcome<{ readonly invitationId: string; readonly flags: readonly ConflictFlag[] }>> {
  return actOnSubmission({ actor, action: 'review.invite', submissionId }, async ({ tx, grant, note }) => {
    const person = await findPerson(tx, request.refereeId);
    if (!person) return fail('invalid', 'There is nobody under this id. Choose a person from the list.', [{ code: 'reviews/no-such-person', where: '/refereeId', saw: request.refereeId, expected: 'the id of an account' }]);
    const flags = findConflicts(await findConflictFacts(tx, submissionId, { userId: person.id, email: person.email }));
    const reason = request.reason?.trim() ?? '';
    const refusal = conflictRefusal(flags, reason);
    if (refusal) return refusal;
    const taken = (await listInvitations(tx, submissionId)).map((i) => i.slot);
    const slot = drawSlot(taken, (n) => randomInt(n));
    if (slot === undefined) return fail('limit', 'All letters for referees of this submission are taken.');
    const invitationId = await writeInvitation(tx, grant, { refereeId: person.id, slot, flags, reason: reason === '' ? null : reason });
    if (invitationId === undefined) return fail('conflict', `${person.name} has been asked already.`);
    await takeIfFree(tx, grant);
    const head = await getSubmissionHead(tx, submissionId);
    await queueMail(tx, person.email, `invitation:${invitationId}`, letterTo(person.name, head.title, actor, invitationId));
    note({ invitationId });
    return ok({ invitationId, flags });
  });
}

function conflictRefusal(flags: readonly ConflictFlag[], reason: string) {
  const texts = flags.map((f) => f.text).join('; ');
  if (isBarred(flags)) return fail('precondition', `This person may not referee this submission: ${texts}.`);
  if (needsReason(flags) && reason === '')
    return fail('invalid', `${texts}. Write in one sentence why this is no bar.`, [{ code: 'reviews/reason-missing', where: '/reason', saw: 'nothing', expected: 'one sentence, which is kept' }]);
  return undefined;
}

function letterTo(name: string, title: string, actor: Actor, invitationId: string) {
  const answerBy = addDays(new Date().toISOString(), CLOCK_DAYS.invitation).slice(0, 10);
  return invitationLetter({ name, title, editor: isSignedIn(actor) ? actor.name : 'The editor', answerBy, url: `${appOrigin()}/desk/invitations/${invitationId}` });
}
