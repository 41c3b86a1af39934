import { and, count, desc, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { apiTokens } from '@/db/schema/api-tokens';

/** With the name of the member it stands for. */
export async function findTokenByDigest(reader: Reader, secretDigest: string) {
  const [row] = await reader
    .select({ id: apiTokens.id, userId: apiTokens.userId, secretDigest: apiTokens.secretDigest, scopes: apiTokens.scopes, expiresAt: apiTokens.expiresAt, revokedAt: apiTokens.revokedAt, name: users.name, emailVerified: users.emailVerified })
    .from(apiTokens)
    .innerJoin(users, eq(users.id, apiTokens.userId))
    .where(eq(apiTokens.secretDigest, secretDigest));
  return row;
}

/** The newest first; never the digest. */
export const listTokens = (reader: Reader, userId: string) =>
  reader
    .select({ id: apiTokens.id, name: apiTokens.name, hint: apiTokens.hint, scopes: apiTokens.scopes, createdAt: apiTokens.createdAt, expiresAt: apiTokens.expiresAt, lastUsedAt: apiTokens.lastUsedAt, revokedAt: apiTokens.revokedAt })
    .from(apiTokens)
    .where(eq(apiTokens.userId, userId))
    .orderBy(desc(apiTokens.createdAt), desc(apiTokens.id));

export async function countLiveTokens(reader: Reader, userId: string): Promise<number> {
  const [row] = await reader
    .select({ n: count() })
    .from(apiTokens)
    .where(and(eq(apiTokens.userId, userId), isNull(apiTokens.revokedAt), gt(apiTokens.expiresAt, sql`now()`)));
  return row?.n ?? 0;
}
