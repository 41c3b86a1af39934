import type { Transaction } from '@/db/client';
import { accounts, users } from '@/db/schema/accounts';
import type { AccountRole } from '@/lib/policy/account-role';

export interface NewAccount {
  readonly name: string;
  readonly email: string;
  readonly role: AccountRole;
  readonly affiliation: string | null;
  readonly passwordHash: string;
  /** An iD of the local provider, as if it had been linked there; only the demonstration has one. */
  readonly linkedOrcid?: string | undefined;
  readonly typedOrcid?: string | undefined;
}

/** Takes no Grant: only the command line calls it. */
export async function openAccount(tx: Transaction, { passwordHash, linkedOrcid, ...person }: NewAccount): Promise<string> {
  const [user] = await tx.insert(users).values({ ...person, email: person.email.toLowerCase(), emailVerified: true }).returning({ id: users.id });
  if (!user) throw new Error('the database gave no row back');
  await tx.insert(accounts).values({ userId: user.id, accountId: user.id, providerId: 'credential', password: passwordHash });
  if (linkedOrcid) await tx.insert(accounts).values({ userId: user.id, accountId: linkedOrcid, providerId: 'orcid' });
  return user.id;
}
