import { endIdleSession, touchSession } from '@/db/writes/accounts/touch-session';
import { isUuid } from '@/lib/kernel/uuid';
import { err, ok, type Result } from '@/lib/kernel/result';
import { VISITOR, type Actor } from '@/lib/policy/actor';
import { lackOf } from '@/lib/policy/lack';
import { webEnv } from '@/lib/env';
import { auth } from './auth';
import { findTokenActor, type CredentialFault } from './find-token';

export const SESSION_IDLE_S = 12 * 3600;

/** A credential was shown and is not valid; the request is refused rather than served as a visitor's. */
export interface BadCredential {
  readonly reason: CredentialFault;
}

/**
 * Whom a request stands for: the bearer token when there is an Authorization header, else the session
 * cookie. A request with that header never falls back to the cookie, or a page could ride on the
 * reader's session by adding a useless token.
 */
export async function currentActor(headers: Headers): Promise<Result<Actor, BadCredential>> {
  const authorization = headers.get('authorization');
  if (authorization !== null) {
    const shown = await findTokenActor(authorization, new Date());
    return shown.ok ? shown : err({ reason: shown.error });
  }
  if (!headers.get('cookie')?.includes('counterfoil.session=')) return ok(VISITOR);
  const found = await auth().api.getSession({ headers: onlyCookie(headers) });
  if (!found || !isUuid(found.user.id)) return ok(VISITOR);
  if (await endIdleSession(found.session.token, SESSION_IDLE_S)) return ok(VISITOR);
  await touchSession(found.session.token);
  const { id, name, role, emailVerified, twoFactorEnabled } = found.user;
  const accountRole = role === 'editor' || role === 'administrator' ? role : 'member';
  const lacks = lackOf({ emailVerified, accountRole, twoFactorEnabled: twoFactorEnabled === true }, webEnv().DEMO);
  return ok({ kind: 'member', userId: id, name, accountRole, ...(lacks && { lacks }) });
}

const onlyCookie = (headers: Headers): Headers => new Headers({ cookie: headers.get('cookie') ?? '' });
