import { openAccount, type NewAccount } from '@/db/writes/accounts/open-account';
import { database, type Database } from '@/db/client';
import { hashPassword } from '@/lib/auth/password-hash';

/**
 * For seeding and for the first administrator, at the command line: an account whose address counts as
 * verified. There is no door to this; people open their own accounts through sign-up.
 */
export async function createAccount(account: Omit<NewAccount, 'passwordHash'> & { readonly password: string }, db: Database = database()): Promise<string> {
  const { password, ...rest } = account;
  const passwordHash = await hashPassword(password);
  return db.transaction((tx) => openAccount(tx, { ...rest, passwordHash }));
}
