import { createHash } from 'node:crypto';
import { z } from 'zod';
import { database } from '@/db/client';
import { findKeptAnswer } from '@/db/reads/requests/kept-answer';
import { allowedOrigins } from '@/lib/auth/allowed-origins';
import { currentActor } from '@/lib/auth/current-actor';
import { webEnv } from '@/lib/env';
import type { Result } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { Door } from '@/lib/policy/doors';
import { heldBack } from '@/lib/policy/grant';
import { underKey } from '@/lib/services/once';
import { judgeOrigin } from './origin';
import { BAD_CREDENTIAL, FOREIGN_ORIGIN, problemResponse, reportDefect, type DoorError } from './problem-response';
import { spend, WRITE_RATE, type Rate } from './rate';
import { parseInput, readJson } from './read-input';

interface RouteCall<P, Q, B> {
  readonly actor: Actor;
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  readonly request: Request;
}

interface RouteSpec<P, Q, B, T> {
  /** A row of `lib/policy/doors.ts`, such as `POST /api/v1/submissions/{id}/check`. */
  readonly door: Door;
  readonly params?: z.ZodType<P>;
  readonly query?: z.ZodType<Q>;
  /** A strict object; `stream` leaves the body to the handler. */
  readonly body?: z.ZodType<B> | 'stream';
  readonly rate?: Rate;
  readonly handle: (call: RouteCall<P, Q, B>) => Promise<Result<T, DoorError>>;
  /** A Response for what is not JSON; else the value is the body. */
  readonly respond?: (value: T) => Response;
  readonly status?: number;
}

type Handler = (request: Request, context: { params: Promise<Record<string, string | string[] | undefined>> }) => Promise<Response>;

export const idParam = z.strictObject({ id: z.uuid({ version: 'v4' }) });

/** The only way to make a route handler: origin, actor, rate, shape, verb, answer. */
export function defineRoute<P = Record<string, never>, Q = Record<string, never>, B = undefined, T = unknown>(spec: RouteSpec<P, Q, B, T>): Handler {
  const method = spec.door.slice(0, spec.door.indexOf(' '));
  return async (request, context) => {
    try {
      if (judgeOrigin(method, request.headers, allowedOrigins(webEnv())) === 'foreign') return problemResponse(FOREIGN_ORIGIN);
      const actor = await currentActor(request.headers);
      if (!actor.ok) return problemResponse(BAD_CREDENTIAL);
      const refused = await refusedByRate(spec, method, actor.value);
      if (refused) return problemResponse(refused);
      const call = await readCall(spec, request, await context.params, actor.value);
      return 'code' in call ? problemResponse(call) : await serve(spec, call);
    } catch (cause) {
      return problemResponse(reportDefect(spec.door, cause));
    }
  };
}

const refusedByRate = async (spec: { door: Door; rate?: Rate }, method: string, actor: Actor): Promise<DoorError | null> => {
  const rate = spec.rate ?? (method === 'GET' ? null : WRITE_RATE);
  return rate && spend(spec.door, rate, actor);
};

type Call<P, Q, B> = RouteCall<P, Q, B> & { readonly rawBody: unknown };

async function readCall<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, request: Request, rawParams: unknown, actor: Actor): Promise<Call<P, Q, B> | DoorError> {
  const params = parseInput(spec.params ?? (z.strictObject({}) as unknown as z.ZodType<P>), rawParams ?? {});
  // An id that cannot exist is answered like one that does not.
  if (!params.ok) return { code: 'not-found', sentence: 'There is nothing at this address, or nothing you may see.' };
  const query = parseInput(spec.query ?? (z.strictObject({}) as unknown as z.ZodType<Q>), Object.fromEntries(new URL(request.url).searchParams));
  if (!query.ok) return query.error;
  const base = { actor, params: params.value, query: query.value, request };
  if (spec.body === 'stream') return { ...base, body: undefined as B, rawBody: null };
  if (request.method === 'GET' || request.method === 'HEAD') return { ...base, body: undefined as B, rawBody: null };
  const raw = await readJson(request);
  if (!raw.ok) return raw.error;
  const body = parseInput(spec.body ?? (z.strictObject({}).optional() as unknown as z.ZodType<B>), raw.value);
  return body.ok ? { ...base, body: body.value, rawBody: raw.value ?? null } : body.error;
}

async function serve<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, call: Call<P, Q, B>): Promise<Response> {
  const key = call.request.headers.get('idempotency-key');
  const userId = userIdOf(call.actor);
  if (!key || !userId || spec.respond || spec.body === 'stream') return answer(spec, explained(await spec.handle(call), call.actor));
  if (!/^[\x21-\x7e]{8,200}$/.test(key)) return problemResponse({ code: 'invalid', sentence: 'The Idempotency-Key is not 8 to 200 printable characters.' });
  const requestDigest = digestOf([spec.door, call.params, call.query, call.rawBody]);
  return (await replay(userId, key, requestDigest)) ?? actUnderKey(spec, call, { userId, key, requestDigest });
}

/** To an account that lacks something nearly all looks absent; it is told why, whatever it asked for. */
const explained = <T>(outcome: Result<T, DoorError>, actor: Actor): Result<T, DoorError> =>
  outcome.ok || outcome.error.code !== 'not-found' ? outcome : { ok: false, error: heldBack(actor) ?? outcome.error };

async function actUnderKey<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, call: Call<P, Q, B>, once: { userId: string; key: string; requestDigest: string }): Promise<Response> {
  const describe = (value: unknown) => ({ status: spec.status ?? 200, body: value ?? null });
  try {
    return answer(spec, await underKey({ ...once, answer: describe }, async () => explained(await spec.handle(call), call.actor)));
  } catch (cause) {
    // The twin of this request was quicker: its transaction stood, ours was undone.
    const kept = await replay(once.userId, once.key, once.requestDigest);
    if (kept) return kept;
    throw cause;
  }
}

async function replay(userId: string, key: string, requestDigest: string): Promise<Response | null> {
  const kept = await findKeptAnswer(database(), userId, key);
  if (!kept) return null;
  if (kept.requestDigest !== requestDigest)
    return problemResponse({ code: 'conflict', sentence: 'This Idempotency-Key was used for another request. Use a new one for each act.' });
  return json(kept.body, kept.status);
}

function answer<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, outcome: Result<T, DoorError>): Response {
  if (!outcome.ok) return problemResponse(outcome.error);
  return spec.respond ? spec.respond(outcome.value) : json(outcome.value ?? null, spec.status ?? 200);
}

const json = (value: unknown, status: number): Response =>
  new Response(JSON.stringify(value), { status, headers: { 'content-type': 'application/json', 'cache-control': 'no-store' } });

const digestOf = (parts: readonly unknown[]): string => createHash('sha256').update(JSON.stringify(parts)).digest('hex');
