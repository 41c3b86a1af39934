import { endToken } from '@/db/writes/accounts/tokens';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actGenerally } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';

/** From the next request on the token opens nothing; its line stays in the list. */
export function revokeToken(actor: Actor, tokenId: string): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.manage-tokens' }, async ({ tx, grant, note }) => {
    if (!(await endToken(tx, grant, tokenId))) return { ok: false, error: NOT_FOUND };
    note('account', userIdOf(actor), { revoked: tokenId });
    return ok(null);
  });
}
