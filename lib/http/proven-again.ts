import { database } from '@/db/client';
import { hasPassword, listOrcidLinks } from '@/db/reads/accounts/ways-in';
import { auth } from '@/lib/auth/auth';
import { currentSession } from '@/lib/auth/current-session';
import type { SignedInActor } from '@/lib/policy/actor';
import { LACK_SENTENCES } from '@/lib/policy/lack';
import type { DoorError } from './problem-response';

const YOUNG_S = 10 * 60;

const SIGN_IN_AGAIN: DoorError = {
  code: 'precondition',
  sentence: 'This account has no password to ask for, so it asks for a sign-in of the last ten minutes. Sign out, sign in with ORCID, and come back.',
};

const LINKED_ALREADY: DoorError = { code: 'conflict', sentence: 'An ORCID iD is linked to this account already. Unlink it before you link another.' };

/** Why this account may not change its second factor just now; null when it may try. A password is asked for by the library itself. */
export async function unproven(path: string, actor: SignedInActor, headers: Headers): Promise<DoorError | null> {
  if (actor.lacks === 'confirmed-address') return { code: 'denied', sentence: LACK_SENTENCES['confirmed-address'] };
  if (path === '/link-social' && (await listOrcidLinks(database(), actor.userId)).length > 0) return LINKED_ALREADY;
  if (path === '/change-password' || (await hasPassword(database(), actor.userId))) return null;
  const session = await currentSession(headers);
  const ageS = session ? (Date.now() - session.createdAt.getTime()) / 1000 : Infinity;
  return ageS <= YOUNG_S ? null : SIGN_IN_AGAIN;
}

/** The library links without asking; a new way in is worth a password. Null when it is right, or when there is none to ask for. */
export async function wrongPassword(body: unknown, actor: SignedInActor, headers: Headers): Promise<Response | null> {
  if (!(await hasPassword(database(), actor.userId))) return null;
  const { password = '' } = body as { password?: string };
  const answer = await auth().api.verifyPassword({ body: { password }, headers, asResponse: true });
  return answer.ok ? null : answer;
}
