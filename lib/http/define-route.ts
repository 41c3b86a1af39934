import { z } from 'zod';
import { allowedOrigins } from '@/lib/auth/allowed-origins';
import { currentActor } from '@/lib/auth/current-actor';
import { webEnv } from '@/lib/env';
import { err, ok, type Result } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { Door } from '@/lib/policy/doors';
import { heldBack } from '@/lib/policy/grant';
import { jsonAnswer } from './json-answer';
import { digestOf, keyFault, onceOnly, type Once } from './once-only';
import type { Operation } from './operation';
import { judgeOrigin } from './origin';
import { badCredential, FOREIGN_ORIGIN, problemResponse, reportDefect, type DoorError } from './problem-response';
import { spend, WRITE_RATE, type Rate } from './rate';
import { parseInput, readJson } from './read-input';
import { readUpload } from './read-upload';
import { beyondDoor } from './token-scope';
import { UploadParts } from './upload-parts';

export interface RouteCall<P, Q, B> {
  readonly actor: Actor;
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  readonly request: Request;
  /** Entity tags of If-Match as they were sent; null when the header is absent. */
  readonly ifMatch: readonly string[] | null;
  /** To be filled while an upload is read, when its request carries a key. */
  readonly parts: UploadParts | undefined;
}

interface RouteSpec<P, Q, B, T> extends Operation<P, Q, B> {
  readonly handle: (call: RouteCall<P, Q, B>) => Promise<Result<T, DoorError>>;
  /** A Response for what is not JSON; else the value is the body. */
  readonly respond?: (value: T) => Response;
  /** What begins the entity tag of this value. */
  readonly tag?: (value: T) => string;
  readonly headers?: (value: T) => Readonly<Record<string, string>>;
}

type Handler = (request: Request, context: { params: Promise<Record<string, string | string[] | undefined>> }) => Promise<Response>;

/** The only way to make a route handler: origin, actor, scope, rate, shape, verb, answer. */
export function defineRoute<P = Record<string, never>, Q = Record<string, never>, B = undefined, T = unknown>(spec: RouteSpec<P, Q, B, T>): Handler {
  const method = spec.door.slice(0, spec.door.indexOf(' '));
  const handler: Handler = async (request, context) => {
    try {
      if (judgeOrigin(method, request.headers, allowedOrigins(webEnv())) === 'foreign') return problemResponse(FOREIGN_ORIGIN);
      const actor = await currentActor(request.headers);
      if (!actor.ok) return problemResponse(badCredential(actor.error));
      const refused = beyondDoor(spec.door, actor.value) ?? (await refusedByRate(spec, method, actor.value));
      if (refused) return problemResponse(refused);
      const call = await readCall(spec, request, await context.params, actor.value);
      return 'code' in call ? problemResponse(call) : await serve(spec, call);
    } catch (cause) {
      return problemResponse(reportDefect(spec.door, cause));
    }
  };
  // For the test that holds a route to its address.
  return Object.assign(handler, { door: spec.door });
}

const refusedByRate = async (spec: { door: Door; rate?: Rate }, method: string, actor: Actor): Promise<DoorError | null> => {
  const rate = spec.rate ?? (method === 'GET' ? null : WRITE_RATE);
  return rate && spend(spec.door, rate, actor);
};

type Call<P, Q, B> = RouteCall<P, Q, B> & { readonly rawBody: unknown; readonly key: string | null };

async function readCall<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, request: Request, rawParams: unknown, actor: Actor): Promise<Call<P, Q, B> | DoorError> {
  const params = parseInput(spec.params ?? (z.strictObject({}) as unknown as z.ZodType<P>), rawParams ?? {});
  // An id that cannot exist is answered like one that does not.
  if (!params.ok) return { code: 'not-found', sentence: 'There is nothing at this address, or nothing you may see.' };
  const query = parseInput(spec.query ?? (z.strictObject({}) as unknown as z.ZodType<Q>), Object.fromEntries(new URL(request.url).searchParams));
  if (!query.ok) return query.error;
  const reading = request.method === 'GET' || request.method === 'HEAD';
  // A PUT of bytes repeats without harm by itself.
  const key = reading || spec.respond || spec.body === 'bytes' ? null : request.headers.get('idempotency-key');
  const fault = key === null ? null : keyFault(key);
  if (fault) return fault;
  const streaming = spec.body === 'stream' || spec.body === 'bytes';
  const base = { actor, params: params.value, query: query.value, request, key, ifMatch: tagsOf(request.headers.get('if-match')), parts: streaming && key !== null ? new UploadParts() : undefined };
  if (streaming || reading) return { ...base, body: undefined as B, rawBody: null };
  const raw = await readJson(request);
  if (!raw.ok) return raw.error;
  const body = parseInput((spec.body as z.ZodType<B> | undefined) ?? (z.strictObject({}).optional() as unknown as z.ZodType<B>), raw.value);
  return body.ok ? { ...base, body: body.value, rawBody: raw.value ?? null } : body.error;
}

const tagsOf = (ifMatch: string | null): readonly string[] | null => (ifMatch === null ? null : ifMatch.split(',').map((tag) => tag.trim()));

async function serve<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, call: Call<P, Q, B>): Promise<Response> {
  const done = await actOnce(spec, call);
  if (!done.ok) return problemResponse(done.error);
  if (done.value.replayed) return replayed(spec, call, done.value);
  const { outcome } = done.value;
  if (!outcome.ok) return problemResponse(outcome.error);
  return spec.respond ? spec.respond(outcome.value) : jsonAnswer(outcome.value, call.request, { status: spec.status ?? 200, tag: spec.tag?.(outcome.value), headers: spec.headers?.(outcome.value) });
}

function actOnce<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, call: Call<P, Q, B>): Promise<Result<Once<T>, DoorError>> {
  const act = async () => explained(await spec.handle(call), call.actor);
  const userId = userIdOf(call.actor);
  if (call.key === null || userId === null) return act().then((outcome) => ok({ replayed: false as const, outcome }));
  const { parts, request, key } = call;
  const digest = () => digestOf([spec.door, call.params, call.query, call.rawBody, parts?.list() ?? null]);
  const readRest = () => (parts ? readUpload(request, drain, () => undefined, parts) : Promise.resolve(ok(null)));
  return onceOnly<T>({ userId, key, digest, readRest, status: spec.status ?? 200 }, act);
}

const drain = async ({ stream }: { readonly stream: NodeJS.ReadableStream }): Promise<void> => {
  for await (const chunk of stream) void chunk;
};

function replayed<P, Q, B, T>(spec: RouteSpec<P, Q, B, T>, call: Call<P, Q, B>, kept: { readonly status: number; readonly body: unknown }): Response {
  return jsonAnswer(kept.body, call.request, { status: kept.status, headers: { ...spec.headers?.(kept.body as T), 'idempotency-replayed': 'true' } });
}

/** To an account that lacks something nearly all looks absent; it is told why, whatever it asked for. */
const explained = <T>(outcome: Result<T, DoorError>, actor: Actor): Result<T, DoorError> =>
  outcome.ok || outcome.error.code !== 'not-found' ? outcome : err(heldBack(actor) ?? outcome.error);
