import { database } from '@/db/client';
import { findAccount, findAddressRequest, listDeclinedLetters } from '@/db/reads/accounts/account';
import { hasPassword, listOrcidLinks } from '@/db/reads/accounts/ways-in';
import { isPlaceholderAddress } from '@/lib/auth/placeholder-address';
import { ok } from '@/lib/kernel/result';
import type { AccountRole } from '@/lib/policy/account-role';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import { lackIn, type Lack } from '@/lib/policy/lack';
import type { OptionalLetter } from '@/lib/reviews/optional-letters';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';

export interface OwnAccount {
  readonly id: string;
  readonly name: string;
  /** Null until an account opened through ORCID has confirmed one. */
  readonly email: string | null;
  /** To where a link is on its way, while there is no confirmed address. */
  readonly addressAsked: string | null;
  readonly role: AccountRole;
  readonly affiliation: string | null;
  readonly typedOrcid: string | null;
  /** Authenticated by ORCID, with the day it was linked. */
  readonly orcid: { readonly id: string; readonly since: string } | null;
  readonly hasPassword: boolean;
  readonly secondFactor: boolean;
  readonly declinedLetters: readonly OptionalLetter[];
  readonly lacks: Lack | null;
}

export async function getOwnAccount(actor: Actor): Promise<Outcome<OwnAccount>> {
  const grant = mayGenerally('account.read-own', actor);
  if (!grant.ok) return grant;
  const userId = userIdOf(actor) ?? '';
  const db = database();
  const account = await findAccount(db, userId);
  if (!account) return { ok: false, error: NOT_FOUND };
  const [link] = await listOrcidLinks(db, userId);
  const { id, name, role, affiliation, typedOrcid, email, twoFactorEnabled } = account;
  return ok({
    id,
    name,
    role,
    affiliation,
    typedOrcid,
    email: isPlaceholderAddress(email) ? null : email,
    addressAsked: account.emailVerified ? null : ((await findAddressRequest(db, userId))?.email ?? null),
    orcid: link ? { id: link.orcid, since: link.since.toISOString() } : null,
    hasPassword: await hasPassword(db, userId),
    secondFactor: twoFactorEnabled,
    declinedLetters: await listDeclinedLetters(db, userId),
    lacks: lackIn(actor) ?? null,
  });
}
