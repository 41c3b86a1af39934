import { and, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { idempotencyKeys } from '@/db/schema/idempotency-keys';

export async function findKeptAnswer(reader: Reader, userId: string, key: string) {
  const [row] = await reader
    .select({ requestDigest: idempotencyKeys.requestDigest, status: idempotencyKeys.status, body: idempotencyKeys.body })
    .from(idempotencyKeys)
    .where(and(eq(idempotencyKeys.userId, userId), eq(idempotencyKeys.key, key)));
  return row;
}
