import { createHash, randomBytes, randomUUID, timingSafeEqual } from 'node:crypto';
import { findAccount, findAddressRequest, isAddressTaken } from '@/db/reads/accounts/account';
import { confirmAddress as writeAddress, keepAddressRequest, letGo, nameAccount } from '@/db/writes/accounts/change-account';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actGenerally } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { appOrigin } from '@/lib/services/mail-outbox/app-origin';
import { addressTakenLetter, confirmAddressLetter } from '@/lib/services/mail-outbox/letters';
import { queueMail } from '@/lib/services/mail-outbox/queue-mail';

const HOURS = 24;
const HAS_ONE = 'This account has a confirmed address already. Reload the page.';
const digestOf = (token: string): string => createHash('sha256').update(token).digest('hex');

/**
 * The first address of an account that ORCID opened. It belongs to the account only once the mailed link
 * was opened in the same account: nobody can sit on an address that is not theirs, and one that has an
 * account already is never joined to this one. The answer is the same for either; the letter tells.
 */
export function giveAddress(actor: Actor, input: { readonly name: string; readonly email: string }): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    const userId = userIdOf(actor) ?? '';
    const account = await findAccount(tx, userId);
    if (!account) return { ok: false, error: NOT_FOUND };
    if (account.emailVerified) return fail('conflict', HAS_ONE);
    const token = randomBytes(32).toString('base64url');
    await nameAccount(tx, grant, input.name);
    await keepAddressRequest(tx, grant, { email: input.email, digest: digestOf(token), hours: HOURS });
    const facts = { name: input.name, url: `${appOrigin()}/account/address?token=${token}` };
    const letter = (await isAddressTaken(tx, input.email)) ? addressTakenLetter({ url: `${appOrigin()}/sign-in?next=/account` }) : confirmAddressLetter(facts);
    await queueMail(tx, input.email, `address:${randomUUID()}`, letter);
    note('account', userId);
    return ok(null);
  });
}

export function confirmAddress(actor: Actor, { token }: { readonly token: string }): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    const userId = userIdOf(actor) ?? '';
    const asked = await findAddressRequest(tx, userId);
    const matches = asked !== undefined && timingSafeEqual(Buffer.from(asked.digest), Buffer.from(digestOf(token)));
    if (!matches || asked.expiresAt.getTime() < Date.now()) return fail('precondition', 'This link has been used, is older than a day, or belongs to another account. Ask for a new letter.');
    if (await isAddressTaken(tx, asked.email)) return fail('conflict', 'An account with this address has been opened meanwhile. Sign in there with its password and link ORCID on its account page.');
    if (!(await writeAddress(tx, grant, asked.email))) return fail('conflict', HAS_ONE);
    note('account', userId);
    return ok(null);
  });
}

/** For somebody who has an account already: the iD comes free, to be linked there. */
export function giveUpAccount(actor: Actor): Promise<Outcome<null>> {
  return actGenerally({ actor, action: 'account.edit-own' }, async ({ tx, grant, note }) => {
    if (!(await letGo(tx, grant))) return fail('conflict', 'An account with a confirmed address is not given up here.');
    note('account', userIdOf(actor));
    return ok(null);
  });
}
