import { and, asc, eq, gt, isNotNull, sql } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { accounts, sessions, twoFactors, users } from '@/db/schema/accounts';

/** How one person signs in, and where they are signed in. Never a hash, token or secret. */
export async function hasPassword(reader: Reader, userId: string): Promise<boolean> {
  const rows = await reader.select({ id: accounts.id }).from(accounts).where(and(eq(accounts.userId, userId), eq(accounts.providerId, 'credential'), isNotNull(accounts.password)));
  return rows.length > 0;
}

/** iDs that ORCID itself vouched for, the oldest link first. */
export const listOrcidLinks = (reader: Reader, userId: string) =>
  reader
    .select({ orcid: accounts.accountId, since: accounts.createdAt })
    .from(accounts)
    .where(and(eq(accounts.userId, userId), eq(accounts.providerId, 'orcid')))
    .orderBy(asc(accounts.createdAt));

export const listLiveSessions = (reader: Reader, userId: string) =>
  reader
    .select({ id: sessions.id, startedAt: sessions.createdAt, lastSeenAt: sessions.updatedAt, expiresAt: sessions.expiresAt, userAgent: sessions.userAgent })
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, sql`now()`), gt(sessions.updatedAt, sql`now() - interval '12 hours'`)))
    .orderBy(sql`${sessions.updatedAt} desc`);

export async function hasSecondFactor(reader: Reader, userId: string): Promise<boolean> {
  const rows = await reader
    .select({ id: twoFactors.id })
    .from(twoFactors)
    .innerJoin(users, eq(users.id, twoFactors.userId))
    .where(and(eq(twoFactors.userId, userId), eq(twoFactors.verified, true), eq(users.twoFactorEnabled, true)));
  return rows.length > 0;
}
