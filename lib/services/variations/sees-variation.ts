import type { Reader } from '@/db/client';
import { findThread } from '@/db/reads/reviews/threads';
import type { VariationRow } from '@/db/reads/variations/variations';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { isPublic, type SubmissionFacts } from '@/lib/policy/facts';
import { may } from '@/lib/policy/grant';
import { mayRead } from '@/lib/reviews/threads';
import { sideOf } from '@/lib/services/reviews/side';
import type { VariationVisibility } from './variation-view';

export const isOwn = (actor: Actor, row: Pick<VariationRow, 'requestedBy'>): boolean => row.requestedBy === userIdOf(actor);

/** Asked for by an author before the revision was lodged, and therefore never to be seen by others. */
export const isOfDraft = (row: Pick<VariationRow, 'baseKind'>): boolean => row.baseKind === 'check';

export const visibilityOf = ({ readable, attachedTo }: Pick<VariationRow, 'readable' | 'attachedTo'>): VariationVisibility => (readable ? 'link' : attachedTo === null ? 'private' : 'comment');

/** Its owner; whoever reads the comment it is attached to; on a record everybody, once its owner opened it. */
export async function seesVariation(reader: Reader, actor: Actor, facts: SubmissionFacts, row: VariationRow): Promise<boolean> {
  if (isOwn(actor, row)) return true;
  if (isOfDraft(row)) return false;
  if (row.readable && isPublic(facts)) return true;
  if (row.attachedTo === null || !(isPublic(facts) || may('review.read-threads', actor, facts).ok)) return false;
  const thread = await findThread(reader, row.attachedTo);
  return thread !== undefined && mayRead(thread.visibility, sideOf(actor, facts), thread.openedBy === userIdOf(actor));
}
