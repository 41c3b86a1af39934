import { database } from '@/db/client';
import { findThread } from '@/db/reads/reviews/threads';
import { addComment, moveOpenThread } from '@/db/writes/reviews/threads';
import { ok } from '@/lib/kernel/result';
import { isUuid } from '@/lib/kernel/uuid';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { isOpen, mayRead, stateAfterReply } from '@/lib/reviews/threads';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { checkSpeech } from './check-speech';
import { ATTACHED } from './open-thread';
import { sideOf } from './side';

export interface Reply {
  readonly body: string;
  readonly variationId?: string | undefined;
}

/** A further comment. From the authors it answers; from the other side it asks again. */
export async function replyToThread(actor: Actor, threadId: string, reply: Reply): Promise<Outcome<{ readonly commentId: string }>> {
  const known = mayGenerally('review.list-own', actor);
  if (!known.ok) return known;
  const found = isUuid(threadId) ? await findThread(database(), threadId) : undefined;
  if (!found) return { ok: false, error: NOT_FOUND };
  const { submissionId } = found;
  return actOnSubmission({ actor, action: 'review.comment', submissionId }, async ({ tx, grant, facts, note }) => {
    const thread = await findThread(tx, threadId);
    const side = sideOf(actor, facts);
    if (!thread || !mayRead(thread.visibility, side, thread.openedBy === userIdOf(actor))) return { ok: false, error: NOT_FOUND };
    if (!isOpen(thread.state)) return fail('conflict', 'This thread is closed. Open a new one on the same number.');
    const speech = await checkSpeech(tx, actor, submissionId, reply);
    if (!speech.ok) return speech;
    const commentId = await addComment(tx, grant, threadId, { side, ...speech.value });
    if (commentId === undefined) return fail('conflict', ATTACHED);
    await moveOpenThread(tx, grant, threadId, stateAfterReply(thread.state, side));
    note({ threadId, commentId });
    return ok({ commentId });
  });
}
