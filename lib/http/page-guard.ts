import 'server-only';
import { headers } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import { cache } from 'react';
import { currentActor } from '@/lib/auth/current-actor';
import { currentSession } from '@/lib/auth/current-session';
import { lackIn, LACK_PAGES } from '@/lib/policy/lack';
import { isSignedIn, VISITOR, type Actor, type SignedInActor } from '@/lib/policy/actor';
import type { Outcome } from '@/lib/services/app-error';

/** Who looks at this page; asked once a request however many parts of the page ask. A token opens no page. */
export const loadActor: () => Promise<Actor> = cache(async () => {
  const actor = await currentActor(new Headers(await headers()));
  return actor.ok && actor.value.kind !== 'token' ? actor.value : VISITOR;
});

/** The member, or the sign-in page with the way back. */
async function loadHolder(returnTo: string): Promise<SignedInActor> {
  const actor = await loadActor();
  if (isSignedIn(actor)) return actor;
  redirect(`/sign-in?next=${encodeURIComponent(returnTo)}`);
}

/** The same for pages where one acts: an account that lacks an address or a second factor is led to where it adds it. */
export async function loadMember(returnTo: string): Promise<SignedInActor> {
  const actor = await loadHolder(returnTo);
  const lack = lackIn(actor);
  if (lack) redirect(`${LACK_PAGES[lack]}?next=${encodeURIComponent(returnTo)}`);
  return actor;
}

/** For one's own account pages, which stay open to an account that lacks something. */
export async function loadOwn<T>(returnTo: string, read: (actor: SignedInActor) => Promise<Outcome<T>>): Promise<T> {
  return orNotFound(await read(await loadHolder(returnTo)));
}

/** Which of the reader's sessions this one is. */
export const loadSessionId = async (): Promise<string | null> => (await currentSession(new Headers(await headers())))?.id ?? null;

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
