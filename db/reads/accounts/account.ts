import { and, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { declinedLetters, users, verifications } from '@/db/schema/accounts';
import type { OptionalLetter } from '@/lib/reviews/optional-letters';

export async function findAccount(reader: Reader, userId: string) {
  const [row] = await reader
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      emailVerified: users.emailVerified,
      role: users.role,
      affiliation: users.affiliation,
      typedOrcid: users.typedOrcid,
      twoFactorEnabled: users.twoFactorEnabled,
      createdAt: users.createdAt,
    })
    .from(users)
    .where(eq(users.id, userId));
  return row;
}

export async function isAddressTaken(reader: Reader, email: string): Promise<boolean> {
  const rows = await reader.select({ id: users.id }).from(users).where(eq(users.email, email.toLowerCase()));
  return rows.length > 0;
}

export const listDeclinedLetters = async (reader: Reader, userId: string): Promise<readonly OptionalLetter[]> =>
  (await reader.select({ letter: declinedLetters.letter }).from(declinedLetters).where(eq(declinedLetters.userId, userId))).map((row) => row.letter);

/** Does the person at this address not want this kind of letter? */
export async function isDeclined(reader: Reader, email: string, letter: OptionalLetter): Promise<boolean> {
  const rows = await reader
    .select({ letter: declinedLetters.letter })
    .from(declinedLetters)
    .innerJoin(users, eq(users.id, declinedLetters.userId))
    .where(and(eq(users.email, email.toLowerCase()), eq(declinedLetters.letter, letter)));
  return rows.length > 0;
}

export const addressRequestOf = (userId: string): string => `address-of:${userId}`;

/** The address that an account without one has named, and the digest of the link that was mailed to it. */
export async function findAddressRequest(reader: Reader, userId: string): Promise<{ readonly email: string; readonly digest: string; readonly expiresAt: Date } | undefined> {
  const [row] = await reader
    .select({ value: verifications.value, expiresAt: verifications.expiresAt })
    .from(verifications)
    .where(eq(verifications.identifier, addressRequestOf(userId)));
  return row && { ...(JSON.parse(row.value) as { email: string; digest: string }), expiresAt: row.expiresAt };
}
