import { z } from 'zod';
import { database } from '@/db/client';
import { recordAudit } from '@/db/writes/audit/record-audit';
import { auth } from '@/lib/auth/auth';
import { allowedOrigins } from '@/lib/auth/allowed-origins';
import { currentActor } from '@/lib/auth/current-actor';
import { webEnv } from '@/lib/env';
import { isUuid } from '@/lib/kernel/uuid';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { joinAccountPost } from '@/lib/services/accounts/account-post';
import { forgetGuesses, guessingRests, noteWrongGuess } from './guess-limit';
import { judgeOrigin } from './origin';
import { BAD_CREDENTIAL, FOREIGN_ORIGIN, problemResponse, reportDefect, type DoorError } from './problem-response';
import { parseInput, readJson } from './read-input';

joinAccountPost();

const email = z.email().max(254);
const password = z.string().min(1).max(256);
const nothing = z.strictObject({}).optional();

/** The doors of the sign-in library that are open, each with the strict shape of its body. All else is not there. */
const POST_DOORS: Readonly<Record<string, z.ZodType>> = {
  '/sign-in/email': z.strictObject({ email, password, rememberMe: z.boolean().optional() }),
  '/sign-up/email': z.strictObject({ email, password, name: z.string().trim().min(1).max(120) }),
  '/sign-out': nothing,
  '/request-password-reset': z.strictObject({ email }),
  '/reset-password': z.strictObject({ token: z.string().max(200), newPassword: password }),
  '/send-verification-email': z.strictObject({ email }),
  '/change-password': z.strictObject({ currentPassword: password, newPassword: password, revokeOtherSessions: z.literal(true) }),
  '/revoke-other-sessions': nothing,
};
const GET_DOORS = ['/get-session', '/verify-email'];

const NOT_FOUND: DoorError = { code: 'not-found', sentence: 'There is nothing at this address, or nothing you may see.' };

/** The one way to the sign-in library, from the route and from the account's own actions. */
export async function serveAuth(request: Request): Promise<Response> {
  try {
    if (judgeOrigin(request.method, request.headers, allowedOrigins(webEnv())) === 'foreign') return problemResponse(FOREIGN_ORIGIN);
    const actor = await currentActor(request.headers); // ends a session that was idle too long before the library sees it
    if (!actor.ok) return problemResponse(BAD_CREDENTIAL);
    const path = new URL(request.url).pathname.replace(/^\/api\/auth/, '');
    if (request.method === 'GET') return GET_DOORS.includes(path) ? await ask(request) : problemResponse(NOT_FOUND);
    const shape = request.method === 'POST' ? POST_DOORS[path] : undefined;
    return shape ? await post(request, path, shape, actor.value) : problemResponse(NOT_FOUND);
  } catch (cause) {
    return problemResponse(reportDefect('auth', cause));
  }
}

async function ask(request: Request): Promise<Response> {
  const answer = await auth().handler(request);
  answer.headers.set('cache-control', 'no-store');
  return answer;
}

async function post(request: Request, path: string, shape: z.ZodType, actor: Actor): Promise<Response> {
  const raw = await readJson(request);
  if (!raw.ok) return problemResponse(raw.error);
  const body = parseInput(shape, raw.value);
  if (!body.ok) return problemResponse(body.error);
  const headers = new Headers(request.headers);
  headers.delete('content-length');
  headers.set('content-type', 'application/json');
  const own = new Request(request.url, { method: 'POST', headers, body: JSON.stringify(body.value ?? {}) });
  const answer = path === '/sign-in/email' ? await signIn(own, (body.value as { email: string }).email) : await ask(own);
  if (answer.ok) await noteAccountAct(actor, path, answer);
  return answer;
}

/** The library has its own transactions, so this entry follows the act instead of sharing one with it. */
async function noteAccountAct(actor: Actor, path: string, answer: Response): Promise<void> {
  const said = (await answer.clone().json().catch(() => null)) as { user?: { id?: unknown } } | null;
  const userId = isUuid(said?.user?.id) ? said.user.id : userIdOf(actor);
  await database().transaction((tx) => recordAudit(tx, { actor, action: `account${path.replaceAll('/', '.')}`, subjectKind: 'account', subjectId: userId }));
}

async function signIn(request: Request, address: string): Promise<Response> {
  const retryAfterS = await guessingRests(address);
  if (retryAfterS > 0)
    return problemResponse({ code: 'limit', sentence: `Too many wrong passwords for this address. Wait ${Math.ceil(retryAfterS / 60)} min, or choose a new password by mail.`, retryAfterS });
  const answer = await ask(request);
  if (answer.status === 401) await noteWrongGuess(address);
  if (answer.ok) await forgetGuesses(address);
  return answer;
}
