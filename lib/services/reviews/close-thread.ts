import { database } from '@/db/client';
import { findThread } from '@/db/reads/reviews/threads';
import { findLatestLodged } from '@/db/reads/submissions/revision';
import { closeThread as writeClosing } from '@/db/writes/reviews/threads';
import { ok } from '@/lib/kernel/result';
import { isUuid } from '@/lib/kernel/uuid';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { mayClose, mayRead, type Closing } from '@/lib/reviews/threads';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { sideOf } from './side';

/** Resolved by the opener or the editor, overruled by the editor, or moot after a revision. */
export async function closeThread(actor: Actor, threadId: string, closing: Closing): Promise<Outcome<null>> {
  const known = mayGenerally('review.list-own', actor);
  if (!known.ok) return known;
  const found = isUuid(threadId) ? await findThread(database(), threadId) : undefined;
  if (!found) return { ok: false, error: NOT_FOUND };
  const { submissionId } = found;
  return actOnSubmission({ actor, action: 'review.set-thread-state', submissionId }, async ({ tx, grant, facts, note }) => {
    const thread = await findThread(tx, threadId);
    const side = sideOf(actor, facts);
    const isOpener = thread?.openedBy === userIdOf(actor);
    if (!thread || !mayRead(thread.visibility, side, isOpener)) return { ok: false, error: NOT_FOUND };
    const revision = (await findLatestLodged(tx, submissionId))?.number ?? thread.openedOnRevision;
    const may = mayClose(closing, { state: thread.state, side, isOpener, openedOnRevision: thread.openedOnRevision, revision });
    if (!may) return fail(side === 'editor' || isOpener ? 'conflict' : 'denied', 'Only its opener or the editor closes a thread, and only while it is open.');
    if (!(await writeClosing(tx, grant, threadId, closing))) return fail('conflict', 'This thread was closed meanwhile.');
    note({ threadId, closing });
    return ok(null);
  });
}
