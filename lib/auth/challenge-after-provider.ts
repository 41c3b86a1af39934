import { createAuthMiddleware } from 'better-auth/api';
import { deleteSessionCookie } from 'better-auth/cookies';
import { generateRandomString } from 'better-auth/crypto';

export const CHALLENGE_LIVES_S = 600;

/**
 * The library asks for the second factor after a password alone. Whoever comes back from a provider is
 * asked as well: the session just made is taken away again and a challenge set in its place.
 */
export const challengeAfterProvider = createAuthMiddleware(async (ctx) => {
  if (ctx.path !== '/callback/:id') return;
  const made = ctx.context.newSession;
  if (!(made?.user as { twoFactorEnabled?: boolean } | undefined)?.twoFactorEnabled || !made) return;
  deleteSessionCookie(ctx, true);
  await ctx.context.internalAdapter.deleteSession(made.session.token);
  ctx.context.setNewSession(null);
  const identifier = `2fa-${generateRandomString(20)}`;
  const expiresAt = new Date(Date.now() + CHALLENGE_LIVES_S * 1000);
  await ctx.context.internalAdapter.createVerificationValue({ identifier, value: made.user.id, expiresAt });
  await ctx.context.internalAdapter.createVerificationValue({ identifier: `2fa-attempts-${identifier}`, value: '0', expiresAt });
  const cookie = ctx.context.createAuthCookie('two_factor', { maxAge: CHALLENGE_LIVES_S });
  await ctx.setSignedCookie(cookie.name, identifier, ctx.context.secret, cookie.attributes);
  const next = new Headers((ctx.context.returned as { headers?: HeadersInit } | undefined)?.headers).get('location') ?? '/';
  throw ctx.redirect(`/sign-in/second-factor?next=${encodeURIComponent(next)}`);
});
