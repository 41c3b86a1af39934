import type { AccountRole } from './account-role';
import type { Actor } from './actor';

/**
 * What an account still has to add before it may act as more than a visitor. Its own account pages
 * stay open to it, since that is where it adds it. A token acts for the account and lacks the same.
 */
export type Lack = 'confirmed-address' | 'second-factor';

export interface AccountStrength {
  readonly emailVerified: boolean;
  readonly accountRole: AccountRole;
  readonly twoFactorEnabled: boolean;
}

/** Whoever can decide or administer proves it twice; in the demonstration passwords stand on the screen anyway. */
export const secondFactorMissing = ({ accountRole, twoFactorEnabled }: Omit<AccountStrength, 'emailVerified'>, demo: boolean): boolean =>
  !demo && accountRole !== 'member' && !twoFactorEnabled;

export function lackOf(account: AccountStrength, demo: boolean): Lack | undefined {
  if (!account.emailVerified) return 'confirmed-address';
  return secondFactorMissing(account, demo) ? 'second-factor' : undefined;
}

export const lackIn = (actor: Actor): Lack | undefined => ('lacks' in actor ? actor.lacks : undefined);

export const LACK_SENTENCES: Readonly<Record<Lack, string>> = {
  'confirmed-address': 'This account has no confirmed e-mail address yet, so it can only read. Give an address at /account/address and open the link of the letter.',
  'second-factor': 'Editors and administrators need a second factor, and this account has none yet. Set one up at /account/second-factor, then try again.',
};

/** Where it is added. */
export const LACK_PAGES: Readonly<Record<Lack, '/account/address' | '/account/second-factor'>> = {
  'confirmed-address': '/account/address',
  'second-factor': '/account/second-factor',
};
