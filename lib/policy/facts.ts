import { isSignedIn, type Actor } from './actor';
import { lackIn } from './lack';
import { isPublicState, type SubmissionState } from './submission-state';

/**
 * What the database knows about one submission and the one who asks. Loaded, never taken from
 * input (`db/reads/submissions/submission-facts.ts`).
 */
export interface SubmissionFacts {
  readonly submissionId: string;
  readonly state: SubmissionState;
  readonly round: number;
  /** Has any revision been lodged? Without one there is nothing for a reviewer to see. */
  readonly everLodged: boolean;
  /** Is the current revision lodged (frozen), or still being written? */
  readonly currentLodged: boolean;
  readonly authorship: 'author' | 'co-author' | null;
  readonly referee: 'invited' | 'accepted' | null;
  /** A conflict that bars an editor from this submission. */
  readonly barred: boolean;
}

/** The parts a person or machine can have in one submission; somebody may have several, or only the last. */
export const STANDINGS = ['author', 'co-author', 'referee', 'invited', 'editor', 'administrator', 'member', 'visitor', 'worker'] as const;
export type Standing = (typeof STANDINGS)[number];

export function standingsOf(actor: Actor, facts: SubmissionFacts): readonly Standing[] {
  if (actor.kind === 'worker') return ['worker'];
  if (!isSignedIn(actor) || lackIn(actor)) return ['visitor'];
  const own: Standing[] = [];
  if (facts.authorship) own.push(facts.authorship);
  else {
    if (facts.referee) own.push(facts.referee === 'accepted' ? 'referee' : 'invited');
    // Who judges or wrote it does not edit it: an editor with a part in the submission is no editor of it.
    if (actor.accountRole === 'editor' && !facts.referee && !facts.barred) own.push('editor');
    if (actor.accountRole === 'administrator') own.push('administrator');
  }
  return [...own, 'member'];
}

export const isPublic = (facts: SubmissionFacts): boolean => isPublicState(facts.state) && facts.everLodged;
