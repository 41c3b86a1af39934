import { AsyncLocalStorage } from 'node:async_hooks';
import type { Transaction } from '@/db/client';
import { recordAnswer } from '@/db/writes/requests/record-answer';

/**
 * A request that carries an Idempotency-Key, for as long as it is served. The act that serves it
 * records the answer in its own transaction, so that there is no moment in which the deed is done
 * and the key unknown.
 */
export interface OnceKey {
  readonly userId: string;
  readonly key: string;
  /** Of an upload it is known only when the bytes have been read, which is before the act. */
  readonly requestDigest: () => string;
  /** How the door will answer this value. */
  readonly answer: (value: unknown) => { readonly status: number; readonly body: unknown };
}

const current = new AsyncLocalStorage<OnceKey | null>();

export const underKey = <T>(key: OnceKey, work: () => Promise<T>): Promise<T> => current.run(key, work);

/** For an act that only clears up after a refusal: what it answers is not the answer to the request. */
export const withoutKey = <T>(work: () => Promise<T>): Promise<T> => current.run(null, work);

export async function recordAnswerOnce(tx: Transaction, value: unknown): Promise<void> {
  const key = current.getStore();
  if (key) await recordAnswer(tx, { userId: key.userId, key: key.key, requestDigest: key.requestDigest(), ...key.answer(value) });
}
