import { and, eq, notInArray, sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { addressRequestOf } from '@/db/reads/accounts/account';
import { accounts, declinedLetters, sessions, users, verifications } from '@/db/schema/accounts';
import { userIdOf } from '@/lib/policy/actor';
import type { Grant } from '@/lib/policy/grant';
import type { OptionalLetter } from '@/lib/reviews/optional-letters';

type OwnAccount = Grant<'account.edit-own'>;
const self = (grant: OwnAccount): string => userIdOf(grant.actor) ?? '';

export interface Profile {
  readonly name: string;
  readonly affiliation: string | null;
  readonly typedOrcid: string | null;
}

export async function saveProfile(tx: Transaction, grant: OwnAccount, profile: Profile): Promise<void> {
  await tx.update(users).set({ ...profile, updatedAt: sql`now()` }).where(eq(users.id, self(grant)));
}

export async function nameAccount(tx: Transaction, grant: OwnAccount, name: string): Promise<void> {
  await tx.update(users).set({ name, updatedAt: sql`now()` }).where(eq(users.id, self(grant)));
}

/** A new request takes the place of the one before: only the link mailed last works. */
export async function keepAddressRequest(tx: Transaction, grant: OwnAccount, request: { readonly email: string; readonly digest: string; readonly hours: number }): Promise<void> {
  const { hours, ...value } = request;
  const identifier = addressRequestOf(self(grant));
  await tx.delete(verifications).where(eq(verifications.identifier, identifier));
  await tx.insert(verifications).values({ identifier, value: JSON.stringify(value), expiresAt: sql`now() + make_interval(hours => ${hours})` });
}

/** False when the account has a confirmed address already. */
export async function confirmAddress(tx: Transaction, grant: OwnAccount, email: string): Promise<boolean> {
  await tx.delete(verifications).where(eq(verifications.identifier, addressRequestOf(self(grant))));
  const confirmed = await tx
    .update(users)
    .set({ email: email.toLowerCase(), emailVerified: true, updatedAt: sql`now()` })
    .where(and(eq(users.id, self(grant)), eq(users.emailVerified, false)))
    .returning({ id: users.id });
  return confirmed.length === 1;
}

export async function unlinkOrcid(tx: Transaction, grant: OwnAccount): Promise<boolean> {
  const gone = await tx.delete(accounts).where(and(eq(accounts.userId, self(grant)), eq(accounts.providerId, 'orcid'))).returning({ id: accounts.id });
  return gone.length > 0;
}

/** An account that never got an address lets go of its ways in; nothing bears its name, and nobody can open it again. */
export async function letGo(tx: Transaction, grant: OwnAccount): Promise<boolean> {
  const left = await tx
    .update(users)
    .set({ name: 'Account given up', affiliation: null, typedOrcid: null, updatedAt: sql`now()` })
    .where(and(eq(users.id, self(grant)), eq(users.emailVerified, false)))
    .returning({ id: users.id });
  if (left.length === 0) return false;
  await tx.delete(verifications).where(eq(verifications.identifier, addressRequestOf(self(grant))));
  await tx.delete(accounts).where(eq(accounts.userId, self(grant)));
  await tx.delete(sessions).where(eq(sessions.userId, self(grant)));
  return true;
}

export async function chooseLetters(tx: Transaction, grant: OwnAccount, declined: readonly OptionalLetter[]): Promise<void> {
  const own = eq(declinedLetters.userId, self(grant));
  await tx.delete(declinedLetters).where(declined.length > 0 ? and(own, notInArray(declinedLetters.letter, [...declined])) : own);
  if (declined.length > 0) await tx.insert(declinedLetters).values(declined.map((letter) => ({ userId: self(grant), letter }))).onConflictDoNothing();
}
