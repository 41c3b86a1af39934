import { createHash, timingSafeEqual } from 'node:crypto';
import { database } from '@/db/client';
import { findTokenByDigest } from '@/db/reads/accounts/tokens';
import { touchToken } from '@/db/writes/accounts/tokens';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { isTokenScope } from '@/lib/policy/token-scopes';

/** Why a credential that was shown does not open anything; told only to whoever holds it. */
export type CredentialFault = 'unknown-token' | 'expired-token' | 'revoked-token';

/** `cf_` and 256 random bits. */
const FORM = /^bearer (cf_[A-Za-z0-9_-]{43})$/i;

export const digestOfToken = (token: string): string => createHash('sha256').update(token).digest('hex');

/** The member a bearer token stands for, within its scopes and without any role of the account. */
export async function findTokenActor(authorization: string, now: Date): Promise<Result<Actor, CredentialFault>> {
  const token = FORM.exec(authorization.trim())?.[1];
  if (token === undefined) return err('unknown-token');
  const digest = digestOfToken(token);
  const row = await findTokenByDigest(database(), digest);
  // Looked up by its hash, of which a guesser knows nothing; compared once more without regard to where the two part.
  if (!row || !timingSafeEqual(Buffer.from(row.secretDigest, 'hex'), Buffer.from(digest, 'hex'))) return err('unknown-token');
  if (row.revokedAt !== null) return err('revoked-token');
  if (row.expiresAt.getTime() <= now.getTime()) return err('expired-token');
  await touchToken(row.id);
  const lacks = row.emailVerified ? undefined : 'confirmed-address';
  return ok({ kind: 'token', userId: row.userId, name: row.name, accountRole: 'member', tokenId: row.id, scopes: row.scopes.filter(isTokenScope), lacks });
}
