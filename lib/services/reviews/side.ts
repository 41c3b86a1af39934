import { standingsOf, type SubmissionFacts } from '@/lib/policy/facts';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { Viewer } from '@/lib/reviews/anonymity';
import type { Side } from '@/lib/reviews/threads';

/** On which side of the anonymity line an actor stands in one submission. Somebody from outside reads as the authors do: the least. */
export function sideOf(actor: Actor, facts: SubmissionFacts): Side {
  const standings = standingsOf(actor, facts);
  if (standings.includes('author') || standings.includes('co-author')) return 'authors';
  if (standings.includes('referee')) return 'referee';
  return standings.includes('editor') ? 'editor' : 'authors';
}

export const viewerOf = (actor: Actor, facts: SubmissionFacts): Viewer => ({ userId: userIdOf(actor) ?? '', side: sideOf(actor, facts) });
