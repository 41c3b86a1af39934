import { hasPassword } from '@/db/reads/accounts/ways-in';
import { unlinkOrcid as write } from '@/db/writes/accounts/change-account';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actGenerally } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';

/** Never the last way in. Records that were signed with the iD keep it. */
export function unlinkOrcid(actor: Actor): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    if (!(await hasPassword(tx, userIdOf(actor) ?? ''))) return fail('precondition', 'ORCID is the only way into this account. Set a password by mail first (“Set a new password” on the sign-in page), then unlink it.');
    if (!(await write(tx, grant))) return fail('conflict', 'No ORCID iD is linked to this account. Reload the page.');
    note('account', userIdOf(actor));
    return ok(null);
  });
}
