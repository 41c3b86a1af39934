import { createHash } from 'node:crypto';
import { database } from '@/db/client';
import { findKeptAnswer } from '@/db/reads/requests/kept-answer';
import { err, ok, type Result } from '@/lib/kernel/result';
import { underKey } from '@/lib/services/once';
import type { DoorError } from './problem-response';

/** A request that carries an Idempotency-Key. */
export interface OnceRequest {
  readonly userId: string;
  readonly key: string;
  /** Door and input as text; for an upload, known only when its bytes have been read. */
  readonly digest: () => string;
  /** Reads the rest of an upload, so that a repeated one can be told from another. */
  readonly readRest: () => Promise<Result<unknown, DoorError>>;
  readonly status: number;
}

/** An act that was done now, or what was answered when it was. */
export type Once<T> = { readonly replayed: false; readonly outcome: Result<T, DoorError> } | { readonly replayed: true; readonly status: number; readonly body: unknown };

const FORM = /^[\x21-\x7e]{8,200}$/;
export const keyFault = (key: string): DoorError | null =>
  FORM.test(key) ? null : { code: 'invalid', sentence: 'The Idempotency-Key is not 8 to 200 printable characters.', problems: [{ code: 'http/idempotency-key', where: '', saw: `${key.length} characters`, expected: '8 to 200 printable characters without spaces, such as a UUID' }] };

/** The same key and request within a day get the same answer and act no second time. */
export async function onceOnly<T>(once: OnceRequest, act: () => Promise<Result<T, DoorError>>): Promise<Result<Once<T>, DoorError>> {
  const before = await findKeptAnswer(database(), once.userId, once.key);
  if (before) {
    const rest = await once.readRest();
    return rest.ok ? replay(before, once.digest()) : rest;
  }
  const answer = (value: unknown) => ({ status: once.status, body: value ?? null });
  try {
    const outcome = await underKey({ userId: once.userId, key: once.key, requestDigest: once.digest, answer }, act);
    // The twin of this request may have been quicker, and ours came to what it had moved on.
    const twin = outcome.ok ? undefined : await findKeptAnswer(database(), once.userId, once.key);
    return twin ? replay(twin, once.digest()) : ok({ replayed: false, outcome });
  } catch (cause) {
    // The twin of this request was quicker: its transaction stood, ours was undone.
    const meanwhile = await findKeptAnswer(database(), once.userId, once.key);
    if (meanwhile) return replay(meanwhile, once.digest());
    throw cause;
  }
}

function replay(kept: { readonly requestDigest: string; readonly status: number; readonly body: unknown }, digest: string): Result<Extract<Once<never>, { replayed: true }>, DoorError> {
  if (kept.requestDigest === digest) return ok({ replayed: true, status: kept.status, body: kept.body });
  return err({ code: 'conflict', sentence: 'This Idempotency-Key was used for another request within the last day. Use a new one for each act.' });
}

export const digestOf = (parts: readonly unknown[]): string => createHash('sha256').update(JSON.stringify(parts)).digest('hex');
