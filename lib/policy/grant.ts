import { err, ok, type Result } from '@/lib/kernel/result';
import { accountRuleOf, ruleOf, type AccountAction, type SubmissionAction } from './actions';
import { isSignedIn, type Actor } from './actor';
import { isPublic, standingsOf, type SubmissionFacts } from './facts';
import { LACK_SENTENCES, lackIn } from './lack';
import { STATE_WORDS, type SubmissionState } from './submission-state';
import { scopesFor } from './token-scopes';

/** Proof that policy was asked. The constructor is not exported: nobody else can make one. */
class MintedGrant<A extends string> {
  declare private readonly minted: A;
  constructor(
    readonly action: A,
    readonly actor: Actor,
    readonly submissionId: string | null,
    /** The states in which this is allowed: the write re-asserts them in its WHERE. */
    readonly states: readonly SubmissionState[],
    /** The state that was seen when the grant was given. */
    readonly seen: SubmissionState | null,
  ) {
    Object.freeze(this);
  }
}
export type Grant<A extends string> = MintedGrant<A>;
export type SubmissionGrant<A extends SubmissionAction = SubmissionAction> = Grant<A> & { readonly submissionId: string };

export interface Denied {
  readonly code: 'signed-out' | 'not-found' | 'denied' | 'conflict';
  readonly sentence: string;
}

const NOT_FOUND: Denied = { code: 'not-found', sentence: 'There is nothing at this address, or nothing you may see.' };
const SIGNED_OUT: Denied = { code: 'signed-out', sentence: 'Nobody is signed in here. Sign in and try again.' };

/** May this actor do this to this submission now? `facts` is null when there is no such submission. */
export function may<A extends SubmissionAction>(action: A, actor: Actor, facts: SubmissionFacts | null): Result<SubmissionGrant<A>, Denied> {
  const reading = isReading(action);
  if (actor.kind === 'visitor' && !reading) return err(SIGNED_OUT);
  // Before the facts, so that a token without the scope learns nothing of what exists.
  const beyond = beyondScope(action, actor);
  if (beyond) return err(beyond);
  if (facts === null) return err(heldBack(actor) ?? NOT_FOUND);
  const standings = standingsOf(actor, facts);
  const allowed = standings.flatMap((standing) => ruleOf(action)[standing] ?? []);
  if (allowed.includes(facts.state) && hasSomethingToShow(action, facts))
    return ok(new MintedGrant(action, actor, facts.submissionId, [...new Set(allowed)], facts.state) as SubmissionGrant<A>);
  if (heldBack(actor) || reading || !maySee(actor, facts)) return err(heldBack(actor) ?? NOT_FOUND);
  return err(refusal(allowed, facts.state));
}

/** Said to an account that lacks something, and in the same words whether or not what it asks for exists. */
export function heldBack(actor: Actor): Denied | undefined {
  const lack = lackIn(actor);
  return lack && { code: 'denied', sentence: LACK_SENTENCES[lack] };
}

/** What a token was not made for; null when it was, or when the actor is none. */
export function beyondScope(action: SubmissionAction | AccountAction, actor: Actor): Denied | null {
  if (actor.kind !== 'token') return null;
  const needed = scopesFor(action);
  if (needed.some((scope) => actor.scopes.includes(scope))) return null;
  if (needed.length === 0) return { code: 'denied', sentence: 'No token may do this. Sign in and do it on a page of this site.' };
  return { code: 'denied', sentence: `This token was made for ${actor.scopes.join(', ')}; this needs ${needed.join(' or ')}. Make another token in your account.` };
}

/** Reviews and records are about a lodged revision, whatever the state says. */
const NEEDS_LODGED = /^(review\.|record\.|submission\.(view-review|view-public|view-variations?|share-variation|vary)$)/;
/** Authors vary their own draft. */
const OF_OWN_DRAFT = /^submission\.(vary|view-variations?)$/;
const hasSomethingToShow = (action: SubmissionAction, facts: SubmissionFacts): boolean =>
  facts.everLodged || !NEEDS_LODGED.test(action) || (facts.authorship !== null && OF_OWN_DRAFT.test(action));

const isReading = (action: SubmissionAction): boolean => action.includes('.view-') || action.includes('.read-') || action === 'review.see-identities';

const VIEWS = ['submission.view-draft', 'submission.view-review', 'submission.view-public'] as const;

/** May this actor know that the submission exists? */
export function maySee(actor: Actor, facts: SubmissionFacts): boolean {
  if (actor.kind === 'worker' || isPublic(facts)) return true;
  const standings = standingsOf(actor, facts);
  // An invitation names the submission, though it shows no package yet.
  return (facts.everLodged && standings.includes('invited')) || VIEWS.some((view) => hasSomethingToShow(view, facts) && standings.some((s) => (ruleOf(view)[s] ?? []).includes(facts.state)));
}

function refusal(allowed: readonly SubmissionState[], state: SubmissionState): Denied {
  if (allowed.length === 0) return { code: 'denied', sentence: 'Your part in this submission does not include this.' };
  const open = [...new Set(allowed)].map((s) => STATE_WORDS[s]).join(', ');
  return { code: 'conflict', sentence: `The submission is in the state ${STATE_WORDS[state]}; this can be done in ${open}. Reload to see where it stands.` };
}

/** May this actor do what concerns no one submission? */
export function mayGenerally<A extends AccountAction>(action: A, actor: Actor): Result<Grant<A>, Denied> {
  const whole = isSignedIn(actor) && (!lackIn(actor) || action.startsWith('account.'));
  const standing = whole ? actor.accountRole : 'visitor';
  const allowed = accountRuleOf(action);
  const beyond = beyondScope(action, actor);
  if (beyond) return err(beyond);
  if (actor.kind !== 'worker' && allowed.includes(standing)) return ok(new MintedGrant(action, actor, null, [], null));
  if (actor.kind === 'visitor') return err(SIGNED_OUT);
  return err(heldBack(actor) ?? { code: 'denied', sentence: 'Your account does not include this.' });
}
