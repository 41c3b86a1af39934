import { database } from '@/db/client';
import { findAccount } from '@/db/reads/accounts/account';
import { ok } from '@/lib/kernel/result';
import type { AccountRole } from '@/lib/policy/account-role';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';

export interface OwnAccount {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: AccountRole;
  readonly affiliation: string | null;
}

export async function getOwnAccount(actor: Actor): Promise<Outcome<OwnAccount>> {
  const grant = mayGenerally('account.read-own', actor);
  if (!grant.ok) return grant;
  const account = await findAccount(database(), userIdOf(actor) ?? '');
  return account ? ok(account) : { ok: false, error: NOT_FOUND };
}
