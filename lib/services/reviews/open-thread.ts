import { addComment, openThread as writeThread } from '@/db/writes/reviews/threads';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { findAnchoredNumber, type Anchor } from '@/lib/reviews/anchors';
import type { Side, ThreadKind, ThreadVisibility } from '@/lib/reviews/threads';
import { actOnSubmission } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import { checkSpeech } from './check-speech';
import { findOfficialResult } from './official-result';
import { sideOf } from './side';

export interface ThreadRequest {
  readonly kind: ThreadKind;
  readonly visibility: ThreadVisibility;
  readonly anchor: Anchor;
  readonly body: string;
  readonly variationId?: string | undefined;
}

/** Opens a thread on a number of the newest lodged revision, with its first comment. */
export function openThread(actor: Actor, submissionId: string, request: ThreadRequest): Promise<Outcome<{ readonly threadId: string }>> {
  return actOnSubmission({ actor, action: 'review.open-thread', submissionId }, async ({ tx, grant, facts, note }) => {
    const side = sideOf(actor, facts);
    const improper = improperFor(side, request);
    if (improper) return improper;
    const speech = await checkSpeech(tx, actor, submissionId, request);
    if (!speech.ok) return speech;
    const official = await findOfficialResult(tx, submissionId);
    if (!official?.result) return fail('precondition', 'There are no recomputed numbers of this revision to hang a thread on.');
    const anchored = findAnchoredNumber(official.result, request.anchor);
    if (!anchored)
      return fail('invalid', 'The result has no such claim or point.', [{ code: 'reviews/no-such-place', where: '/anchor', saw: JSON.stringify(request.anchor), expected: `one of ${official.result.claims.map((c) => c.id).join(', ')} at one of its points` }]);
    const { kind, visibility, anchor } = request;
    const threadId = await writeThread(tx, grant, { kind, visibility, anchor, anchored, openedOnRevision: official.revision });
    if ((await addComment(tx, grant, threadId, { side, ...speech.value })) === undefined) return fail('conflict', ATTACHED);
    note({ threadId });
    return ok({ threadId });
  });
}

export const ATTACHED = 'This rerun is attached to another comment already.';

/** Authors ask and note in the open; demands, and talk behind their backs, are the reviewers'. */
function improperFor(side: Side, { kind, visibility }: ThreadRequest) {
  if (side !== 'authors') return undefined;
  if (visibility !== 'authors') return fail('invalid', 'A thread of the authors is read by authors, referees and editor alike.', [{ code: 'reviews/visibility', where: '/visibility', saw: visibility, expected: 'authors' }]);
  if (kind === 'must-change' || kind === 'should-change') return fail('invalid', 'Authors open questions and notes.', [{ code: 'reviews/kind', where: '/kind', saw: kind, expected: 'question or note' }]);
  return undefined;
}
