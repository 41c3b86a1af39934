import { headers } from 'next/headers';
import type { z } from 'zod';
import { allowedOrigins } from '@/lib/auth/allowed-origins';
import { currentActor } from '@/lib/auth/current-actor';
import { webEnv } from '@/lib/env';
import type { Actor } from '@/lib/policy/actor';
import type { Door } from '@/lib/policy/doors';
import type { Outcome } from '@/lib/services/app-error';
import { judgeOrigin } from './origin';
import { badCredential, FOREIGN_ORIGIN, reportDefect, TOKEN_ELSEWHERE, type DoorError } from './problem-response';
import { spend, WRITE_RATE, type Rate } from './rate';
import { parseInput } from './read-input';

/** What a form or button gets back; drawn in place, never thrown. */
export type ActionResult<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly error: DoorError };

interface ActionSpec<I, T> {
  /** A row of `lib/policy/doors.ts`, such as `action submissions.lodge`. */
  readonly door: Door;
  /** A strict object. */
  readonly input: z.ZodType<I>;
  readonly rate?: Rate;
  readonly handle: (call: { readonly actor: Actor; readonly input: I; readonly headers: Headers }) => Promise<Outcome<T>>;
}

/** The only way to make a server action. Takes an object, or the FormData of a form. */
export function defineAction<I, T>(spec: ActionSpec<I, T>): (raw: unknown) => Promise<ActionResult<T>> {
  return async (raw) => {
    const sent = new Headers(await headers());
    const result = await enter(spec, raw, sent);
    return result;
  };
}

async function enter<I, T>(spec: ActionSpec<I, T>, raw: unknown, sent: Headers): Promise<ActionResult<T>> {
  try {
    if (judgeOrigin('POST', sent, allowedOrigins(webEnv())) === 'foreign') return refuse(FOREIGN_ORIGIN);
    const actor = await currentActor(sent);
    if (!actor.ok) return refuse(badCredential(actor.error));
    if (actor.value.kind === 'token') return refuse(TOKEN_ELSEWHERE);
    const tooOften = await spend(spec.door, spec.rate ?? WRITE_RATE, actor.value);
    if (tooOften) return refuse(tooOften);
    const input = parseInput(spec.input, raw instanceof FormData ? fieldsOf(raw) : raw);
    if (!input.ok) return input;
    return await spec.handle({ actor: actor.value, input: input.value, headers: sent });
  } catch (cause) {
    if (isFrameworkSignal(cause)) throw cause;
    return refuse(reportDefect(spec.door, cause));
  }
}

const refuse = (error: DoorError): { readonly ok: false; readonly error: DoorError } => ({ ok: false, error });

/** Text fields only; the framework's own are left out. A name sent twice is a list. */
function fieldsOf(form: FormData): Record<string, unknown> {
  const fields: Record<string, unknown> = {};
  for (const name of new Set(form.keys())) {
    if (name.startsWith('$ACTION')) continue;
    const values = form.getAll(name);
    fields[name] = values.length === 1 ? values[0] : values;
  }
  return fields;
}

/** Redirects and not-found travel as thrown values with a digest; they are no defects. */
const isFrameworkSignal = (cause: unknown): boolean => typeof (cause as { digest?: unknown } | null)?.digest === 'string';
