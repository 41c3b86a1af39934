import type { z } from 'zod';
import { auth, orcidAuth } from '@/lib/auth/auth';
import { allowedOrigins } from '@/lib/auth/allowed-origins';
import { currentActor } from '@/lib/auth/current-actor';
import { webEnv } from '@/lib/env';
import { isSignedIn, type Actor } from '@/lib/policy/actor';
import { joinAccountPost } from '@/lib/services/accounts/account-post';
import { CALLBACK, GET_DOORS, POST_DOORS, PROVEN_DOORS, PROVIDER_DOORS } from './auth-doors';
import { guardedGuess } from './guarded-guess';
import { noteAccountAct, noteReturn } from './note-account-act';
import { judgeOrigin } from './origin';
import { badCredential, FOREIGN_ORIGIN, problemResponse, reportDefect, TOKEN_ELSEWHERE, type DoorError } from './problem-response';
import { unproven, wrongPassword } from './proven-again';
import { parseInput, readJson } from './read-input';
import { refuseSecondUse } from './spent-codes';

joinAccountPost();

const NOT_FOUND: DoorError = { code: 'not-found', sentence: 'There is nothing at this address, or nothing you may see.' };

/** The one way to the sign-in library, from the route and from the account's own actions. */
export async function serveAuth(request: Request): Promise<Response> {
  try {
    if (judgeOrigin(request.method, request.headers, allowedOrigins(webEnv())) === 'foreign') return problemResponse(FOREIGN_ORIGIN);
    const actor = await currentActor(request.headers); // ends a session that was idle too long before the library sees it
    if (!actor.ok) return problemResponse(badCredential(actor.error));
    if (actor.value.kind === 'token') return problemResponse(TOKEN_ELSEWHERE);
    const path = new URL(request.url).pathname.replace(/^\/api\/auth/, '');
    if (request.method === 'GET') return GET_DOORS.includes(path) ? await get(request, path, actor.value) : problemResponse(NOT_FOUND);
    const shape = request.method === 'POST' ? POST_DOORS[path] : undefined;
    return shape ? await post(request, path, shape, actor.value) : problemResponse(NOT_FOUND);
  } catch (cause) {
    return problemResponse(reportDefect('auth', cause));
  }
}

async function ask(request: Request, path: string): Promise<Response> {
  const desk = PROVIDER_DOORS.includes(path) ? orcidAuth(ownOrigin(request)) : auth();
  if (!desk) return problemResponse(NOT_FOUND);
  const answer = await desk.handler(request);
  answer.headers.set('cache-control', 'no-store');
  return answer;
}

/** Under which of our names the request came; the gate in front has turned away all others. */
function ownOrigin(request: Request): string {
  const env = webEnv();
  const host = request.headers.get('host') ?? new URL(request.url).host;
  return allowedOrigins(env).find((origin) => new URL(origin).host === host) ?? env.APP_URL;
}

async function get(request: Request, path: string, actor: Actor): Promise<Response> {
  const answer = await ask(request, path);
  if (path === CALLBACK) await noteReturn(actor, answer);
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
  const answer = await askAsOne(own, path, body.value, actor);
  if (answer.ok) await noteAccountAct(actor, path, answer);
  return answer;
}

/** Each door by its own guard: guesses at passwords are counted, codes are used once, strength is proven before it is changed. */
async function askAsOne(request: Request, path: string, body: unknown, actor: Actor): Promise<Response> {
  if (path === '/sign-in/email') return guardedGuess((body as { email: string }).email, () => ask(request, path));
  if (path === '/two-factor/verify-totp' && !isSignedIn(actor)) return refuseSecondUse(await ask(request, path), (body as { code: string }).code);
  if (!isSignedIn(actor) || !PROVEN_DOORS.includes(path)) return ask(request, path);
  const fault = await unproven(path, actor, request.headers);
  if (fault) return problemResponse(fault);
  return guardedGuess(actor.userId, async () => (path === '/link-social' ? await wrongPassword(body, actor, request.headers) : null) ?? ask(request, path));
}
