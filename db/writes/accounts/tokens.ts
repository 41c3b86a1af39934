import { and, eq, isNull, lt, or, sql } from 'drizzle-orm';
import { database, type Transaction } from '@/db/client';
import { apiTokens } from '@/db/schema/api-tokens';
import { userIdOf } from '@/lib/policy/actor';
import type { Grant } from '@/lib/policy/grant';
import type { TokenScope } from '@/lib/policy/token-scopes';

export interface NewToken {
  readonly name: string;
  readonly hint: string;
  readonly secretDigest: string;
  readonly scopes: readonly TokenScope[];
  readonly days: number;
}

type MayManage = Grant<'account.manage-tokens'>;
const ownerOf = (grant: MayManage): string => userIdOf(grant.actor) ?? '';

/** For the one whose grant it is, and nobody else. */
export async function writeToken(tx: Transaction, grant: MayManage, { days, scopes, ...token }: NewToken) {
  const [row] = await tx
    .insert(apiTokens)
    .values({ ...token, scopes: [...scopes], userId: ownerOf(grant), expiresAt: sql`now() + make_interval(days => ${days})` })
    .returning({ id: apiTokens.id, expiresAt: apiTokens.expiresAt });
  if (!row) throw new Error('the database gave no row back');
  return row;
}

/** False when it is not one's own, or revoked already. */
export async function endToken(tx: Transaction, grant: MayManage, tokenId: string): Promise<boolean> {
  const ended = await tx
    .update(apiTokens)
    .set({ revokedAt: sql`now()` })
    .where(and(eq(apiTokens.id, tokenId), eq(apiTokens.userId, ownerOf(grant)), isNull(apiTokens.revokedAt)))
    .returning({ id: apiTokens.id });
  return ended.length > 0;
}

/** Notes that it is in use, at most once a minute. Takes no Grant: holding the token is the right to it. */
export async function touchToken(tokenId: string): Promise<void> {
  await database()
    .update(apiTokens)
    .set({ lastUsedAt: sql`now()` })
    .where(and(eq(apiTokens.id, tokenId), or(isNull(apiTokens.lastUsedAt), lt(apiTokens.lastUsedAt, sql`now() - interval '1 minute'`))));
}
