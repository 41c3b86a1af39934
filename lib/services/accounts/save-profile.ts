import { saveProfile as write } from '@/db/writes/accounts/change-account';
import { parseOrcidId } from '@/lib/kernel/orcid-id';
import { formatProblem } from '@/lib/kernel/problem';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actGenerally } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';

export interface ProfileInput {
  readonly name: string;
  readonly affiliation: string;
  /** As typed; empty for none. */
  readonly orcid: string;
}

export function saveProfile(actor: Actor, { name, affiliation, orcid }: ProfileInput): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    const typed = orcid.trim() === '' ? null : parseOrcidId(orcid);
    if (typed && !typed.ok) return fail('invalid', `The ORCID iD is not whole. ${formatProblem(typed.error)}`);
    await write(tx, grant, { name, affiliation: affiliation.trim() || null, typedOrcid: typed?.value ?? null });
    note('account', userIdOf(actor));
    return ok(null);
  });
}
