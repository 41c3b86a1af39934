import type { Transaction } from '@/db/client';
import { findVariation } from '@/db/reads/variations/variations';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { fail, type Outcome } from '@/lib/services/app-error';
import { isUuid } from '@/lib/kernel/uuid';
import { ok } from '@/lib/kernel/result';

export const COMMENT_MAX_CHARACTERS = 10_000;

/** The text of a comment, trimmed, and the variation that goes with it: the writer's own, on this submission. */
export async function checkSpeech(
  tx: Transaction,
  actor: Actor,
  submissionId: string,
  speech: { readonly body: string; readonly variationId?: string | undefined },
): Promise<Outcome<{ readonly body: string; readonly variationId: string | null }>> {
  const body = speech.body.trim();
  if (body === '' || body.length > COMMENT_MAX_CHARACTERS)
    return fail('invalid', `A comment has between 1 and ${COMMENT_MAX_CHARACTERS} characters; this one has ${body.length}.`, [
      { code: 'reviews/comment-length', where: '/body', saw: `${body.length} characters`, expected: `1 to ${COMMENT_MAX_CHARACTERS}` },
    ]);
  if (speech.variationId === undefined) return ok({ body, variationId: null });
  const variation = isUuid(speech.variationId) ? await findVariation(tx, submissionId, speech.variationId) : undefined;
  if (!variation || variation.requestedBy !== userIdOf(actor))
    return fail('invalid', 'There is no rerun of yours under this id here.', [
      { code: 'reviews/no-such-variation', where: '/variationId', saw: speech.variationId, expected: 'the id of a rerun you asked for here' },
    ]);
  if (variation.baseKind === 'check')
    return fail('invalid', 'This rerun is of a draft, which nobody but its authors may see. Ask for it again on the lodged revision.', [
      { code: 'reviews/variation-of-a-draft', where: '/variationId', saw: 'a rerun of a draft', expected: 'a rerun of a lodged revision' },
    ]);
  return ok({ body, variationId: variation.id });
}
