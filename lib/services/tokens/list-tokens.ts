import { database } from '@/db/client';
import { listTokens as readTokens } from '@/db/reads/accounts/tokens';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { mayGenerally } from '@/lib/policy/grant';
import type { Outcome } from '@/lib/services/app-error';
import type { TokenView } from './token-view';

/** One's own tokens, live ones first, then the newest. */
export async function listTokens(actor: Actor, now: Date = new Date()): Promise<Outcome<readonly TokenView[]>> {
  const grant = mayGenerally('account.manage-tokens', actor);
  if (!grant.ok) return grant;
  const rows = await readTokens(database(), userIdOf(actor) ?? '');
  const views = rows.map(({ createdAt, expiresAt, lastUsedAt, revokedAt, ...row }): TokenView => ({
    ...row,
    state: revokedAt !== null ? 'revoked' : expiresAt.getTime() <= now.getTime() ? 'expired' : 'live',
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    lastUsedAt: lastUsedAt?.toISOString() ?? null,
    revokedAt: revokedAt?.toISOString() ?? null,
  }));
  return ok(views.toSorted((a, b) => Number(b.state === 'live') - Number(a.state === 'live')));
}
