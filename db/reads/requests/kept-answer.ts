import { and, eq, gte, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { idempotencyKeys } from '@/db/schema/idempotency-keys';

/** Kept for a day by the database's clock; after that the key is free. */
export async function findKeptAnswer(reader: Reader, userId: string, key: string) {
  const [row] = await reader
    .select({ requestDigest: idempotencyKeys.requestDigest, status: idempotencyKeys.status, body: idempotencyKeys.body })
    .from(idempotencyKeys)
    .where(and(eq(idempotencyKeys.userId, userId), eq(idempotencyKeys.key, key), gte(idempotencyKeys.createdAt, sql`now() - interval '24 hours'`)));
  return row;
}
