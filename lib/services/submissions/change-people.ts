import { findRecentRemoval } from '@/db/reads/submissions/recent-removal';
import { addCoAuthor as writeCoAuthor, bringBackCoAuthor, confirmOwnAuthorship, dropCoAuthor } from '@/db/writes/submissions/change-people';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { LODGED_ALREADY } from './update-draft';

/** Names a co-author by the address of their account. They confirm for themselves before anything can be lodged. */
export function addCoAuthor(actor: Actor, submissionId: string, input: { readonly email: string }): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.manage-people', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const added = await writeCoAuthor(tx, grant, input.email);
    if (added === undefined) return fail('invalid', 'Nobody else with a confirmed account has this address. Ask them to open an account first, or check the spelling.');
    note({ coAuthor: added });
    return ok(null);
  });
}

export function removeCoAuthor(actor: Actor, submissionId: string, input: { readonly userId: string }): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.manage-people', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const former = await dropCoAuthor(tx, grant, input.userId);
    if (!former) return { ok: false, error: NOT_FOUND };
    note({ removedCoAuthor: input.userId, position: former.position, confirmedAt: former.confirmedAt?.toISOString() ?? null });
    return ok(null);
  });
}

/** Takes a removal back, for as long as a slip is noticed: place and confirmation are as they were. */
export function restoreCoAuthor(actor: Actor, submissionId: string, input: { readonly userId: string }): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.manage-people', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const former = await findRecentRemoval(tx, submissionId, input.userId);
    if (!former) return fail('conflict', 'This removal is longer ago than can be undone. Name them again by their address.');
    if (!(await bringBackCoAuthor(tx, grant, input.userId, former))) return fail('conflict', 'They are in the list of authors already.');
    note({ restoredCoAuthor: input.userId });
    return ok(null);
  });
}

/** "I am an author of this, and the data may be released." Said by each for themselves. */
export function confirmAuthorship(actor: Actor, submissionId: string): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.confirm-authorship', submissionId }, async ({ tx, grant }) =>
    (await confirmOwnAuthorship(tx, grant)) ? ok(null) : fail('conflict', 'Your authorship is confirmed already.'),
  );
}
