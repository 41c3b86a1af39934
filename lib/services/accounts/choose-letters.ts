import { chooseLetters as write } from '@/db/writes/accounts/change-account';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { OPTIONAL_LETTERS, type OptionalLetter } from '@/lib/reviews/optional-letters';
import { actGenerally } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';

/** Which of the letters one may do without are wanted. */
export function chooseLetters(actor: Actor, wanted: Readonly<Record<OptionalLetter, boolean>>): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    const declined = OPTIONAL_LETTERS.filter((letter) => !wanted[letter]);
    await write(tx, grant, declined);
    note('account', userIdOf(actor), { declined });
    return ok(null);
  });
}
