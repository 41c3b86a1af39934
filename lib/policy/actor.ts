import type { AccountRole } from './account-role';
import type { Lack } from './lack';
import type { TokenScope } from './token-scopes';

/**
 * Who may do what. The one table is `actions.ts`; only `grant.ts` mints Grants, and every write
 * asks for one, so a write without a check does not compile.
 *
 * This file: who is asking. A visitor has no account; a member has signed in with a browser; a token
 * acts for a member within its scopes, never as editor or administrator; the worker computes and moves what only a machine moves.
 */
export type Actor =
  | { readonly kind: 'visitor' }
  | { readonly kind: 'member'; readonly userId: string; readonly name: string; readonly accountRole: AccountRole; readonly lacks?: Lack | undefined }
  | { readonly kind: 'token'; readonly userId: string; readonly name: string; readonly accountRole: 'member'; readonly tokenId: string; readonly scopes: readonly TokenScope[]; readonly lacks?: Lack | undefined }
  | { readonly kind: 'worker'; readonly name: string };

export type SignedInActor = Extract<Actor, { userId: string }>;

export const VISITOR: Actor = { kind: 'visitor' };
export const isSignedIn = (actor: Actor): actor is SignedInActor => actor.kind === 'member' || actor.kind === 'token';
export const userIdOf = (actor: Actor): string | null => (isSignedIn(actor) ? actor.userId : null);
