import 'server-only';
import { headers } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { currentActor } from '@/lib/auth/current-actor';
import { isSignedIn, VISITOR, type Actor, type SignedInActor } from '@/lib/policy/actor';
import type { Outcome } from '@/lib/services/app-error';

/** Who looks at this page; asked once a request however many parts of the page ask. A token opens no page. */
export const loadActor: () => Promise<Actor> = cache(async () => {
  const actor = await currentActor(new Headers(await headers()));
  return actor.ok && actor.value.kind !== 'token' ? actor.value : VISITOR;
});

/** The member, or the sign-in page with the way back. */
export async function loadMember(returnTo: string): Promise<SignedInActor> {
  const actor = await loadActor();
  if (isSignedIn(actor)) return actor;
  redirect(`/sign-in?next=${encodeURIComponent(returnTo)}`);
}

/**
 * Gate and read in one breath: the value of a service, or the 404 page (an unknown id and a denied one
 * alike), or the sign-in page for a visitor, whatever the id.
 */
export async function loadFor<T>(returnTo: string, read: (actor: SignedInActor) => Promise<Outcome<T>>): Promise<T> {
  return orNotFound(await read(await loadMember(returnTo)));
}

/** For pages that everybody may open. */
export async function loadForAnyone<T>(read: (actor: Actor) => Promise<Outcome<T>>): Promise<T> {
  return orNotFound(await read(await loadActor()));
}

export function orNotFound<T>(outcome: Outcome<T>): T {
  if (outcome.ok) return outcome.value;
  if (outcome.error.code === 'defect') throw new Error(outcome.error.sentence);
  notFound();
}
