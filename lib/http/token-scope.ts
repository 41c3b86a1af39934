import type { Actor } from '@/lib/policy/actor';
import { DOORS, type Door, type DoorPolicy } from '@/lib/policy/doors';
import { beyondScope } from '@/lib/policy/grant';
import { REVIEW_DOORS } from '@/lib/policy/review-doors';
import { scopesFor, type TokenScope } from '@/lib/policy/token-scopes';
import type { DoorError } from './problem-response';

const POLICIES: Readonly<Record<Door, readonly DoorPolicy[]>> = { ...DOORS, ...REVIEW_DOORS };

/**
 * A token that was not made for any of what the door does is told so before anything is looked up.
 * Policy asks again for the act itself.
 */
export function beyondDoor(door: Door, actor: Actor): DoorError | null {
  if (actor.kind !== 'token') return null;
  const refusals = POLICIES[door].map((policy) => (policy === 'anyone' ? null : policy === 'own-session' ? OWN_SESSION : beyondScope(policy, actor)));
  if (refusals.some((refusal) => refusal === null)) return null;
  const first = refusals.find((refusal) => refusal !== null);
  return first ? { ...first, scopes: scopesOfDoor(door) } : null;
}

const OWN_SESSION: DoorError = { code: 'denied', sentence: 'No token may do this. Sign in and do it on a page of this site.' };

/** The scopes of which one opens the door to a token; empty when none does, null when it needs no credential. */
export function scopesOfDoor(door: Door): readonly TokenScope[] | null {
  const policies = POLICIES[door];
  if (policies.includes('anyone') || policies.includes('register.read')) return null;
  const scopes = policies.flatMap((policy) => (policy === 'anyone' || policy === 'own-session' ? [] : scopesFor(policy)));
  return [...new Set(scopes)];
}
