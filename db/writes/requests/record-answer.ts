import { and, eq, lt, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { idempotencyKeys } from '@/db/schema/idempotency-keys';

export interface KeptAnswer {
  readonly userId: string;
  readonly key: string;
  readonly requestDigest: string;
  readonly status: number;
  readonly body: unknown;
}

/** Of others' old answers so many are let go with each new one: the table stays small without a job of its own. */
const LET_GO_AT_ONCE = 50;

/** A second row under the same live key violates the primary key and undoes the second act with it. Takes no Grant: the act it belongs to had one. */
export async function recordAnswer(tx: Transaction, answer: KeptAnswer): Promise<void> {
  await letGo(tx, answer);
  // An answer of nothing is the JSON null, which is not the absence of a value.
  await tx.insert(idempotencyKeys).values({ ...answer, body: sql`${JSON.stringify(answer.body ?? null)}::json` });
}

async function letGo(tx: Transaction, { userId, key }: KeptAnswer): Promise<void> {
  const old = lt(idempotencyKeys.createdAt, sql`now() - interval '24 hours'`);
  await tx.delete(idempotencyKeys).where(and(old, eq(idempotencyKeys.userId, userId), eq(idempotencyKeys.key, key)));
  // One sweeper at a time: two that meet at the same rows could wait for each other for ever.
  const { rows } = await tx.execute<{ mine: boolean }>(sql`select pg_try_advisory_xact_lock(hashtext('idempotency_keys')) as mine`);
  if (!rows[0]?.mine) return;
  const some = tx.select({ row: sql`ctid` }).from(idempotencyKeys).where(old).limit(LET_GO_AT_ONCE);
  await tx.delete(idempotencyKeys).where(and(old, sql`ctid in ${some}`));
}
