import { createHash, randomBytes } from 'node:crypto';
import { countLiveTokens } from '@/db/reads/accounts/tokens';
import { writeToken } from '@/db/writes/accounts/tokens';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { actGenerally } from '@/lib/services/act';
import { fail, type Outcome } from '@/lib/services/app-error';
import type { TokenInput } from './token-input';
import type { MadeToken } from './token-view';

export const LIVE_TOKENS_AT_MOST = 20;

/** A token for scripts: 256 random bits, kept as their SHA-256 and given out this once. */
export function createToken(actor: Actor, input: TokenInput): Promise<Outcome<MadeToken>> {
  return actGenerally({ actor, action: 'account.manage-tokens' }, async ({ tx, grant, note }) => {
    if ((await countLiveTokens(tx, userIdOf(actor) ?? '')) >= LIVE_TOKENS_AT_MOST) return fail('limit', `You have ${LIVE_TOKENS_AT_MOST} tokens. Revoke one that is not in use.`);
    const token = `cf_${randomBytes(32).toString('base64url')}`;
    const scopes = [...new Set(input.scopes)];
    const made = await writeToken(tx, grant, { name: input.name, hint: token.slice(0, 7), secretDigest: createHash('sha256').update(token).digest('hex'), scopes, days: input.days });
    note('account', userIdOf(actor), { tokenId: made.id, scopes, days: input.days });
    return ok({ id: made.id, token, expiresAt: made.expiresAt.toISOString() });
  });
}
