import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { accounts, rateLimits, sessions, users, verifications } from '@/db/schema/accounts';
import { database, type Database } from '@/db/client';
import { isLoopback, webEnv } from '@/lib/env';
import { allowedOrigins } from './allowed-origins';
import { postAccountMail, type AccountMail } from './account-mail';
import { hashPassword, verifyPassword } from './password-hash';

export interface AuthParts {
  readonly database: Database;
  readonly env: { readonly APP_URL: string; readonly DEMO: boolean; readonly AUTH_SECRET: string; readonly TRUSTED_PROXY?: string | undefined };
  readonly post: (mail: AccountMail) => Promise<void>;
}

export const PASSWORD_LENGTH = { min: 15, max: 256 } as const;
const DAY_S = 24 * 3600;
export const SESSION_ABSOLUTE_S = 7 * DAY_S;

/** What the library may not be asked for: nothing here uses it, so it is no door. */
const CLOSED_PATHS = [
  '/update-user', '/change-email', '/delete-user', '/delete-user/callback', '/link-social', '/unlink-account', '/sign-in/social',
  '/list-accounts', '/refresh-token', '/get-access-token', '/account-info', '/verify-password', '/update-session', '/error',
];

/**
 * The absolute life of a session is the library's `expiresIn` without refresh; the idle limit is
 * ours (`current-actor.ts`), because a page cannot renew a cookie and would sign people out mid-work.
 */
export function createAuth({ database: db, env, post }: AuthParts) {
  const secure = env.APP_URL.startsWith('https:');
  const cookie = (name: string) => ({
    name: `${secure ? '__Host-' : ''}counterfoil.${name}`,
    attributes: { httpOnly: true, secure, sameSite: 'lax' as const, path: '/' },
  });
  return betterAuth({
    baseURL: env.APP_URL,
    basePath: '/api/auth',
    secret: env.AUTH_SECRET,
    trustedOrigins: [...allowedOrigins(env)],
    telemetry: { enabled: false },
    disabledPaths: CLOSED_PATHS,
    database: drizzleAdapter(db, {
      provider: 'pg',
      usePlural: true,
      transaction: true,
      schema: { users, sessions, accounts, verifications, rateLimits },
    }),
    user: {
      additionalFields: {
        role: { type: 'string', required: false, input: false, defaultValue: 'member' },
        affiliation: { type: 'string', required: false, input: false },
      },
    },
    session: { expiresIn: SESSION_ABSOLUTE_S, disableSessionRefresh: true, cookieCache: { enabled: false } },
    emailAndPassword: {
      enabled: true,
      requireEmailVerification: true,
      minPasswordLength: PASSWORD_LENGTH.min,
      maxPasswordLength: PASSWORD_LENGTH.max,
      password: { hash: hashPassword, verify: verifyPassword },
      revokeSessionsOnPasswordReset: true,
      resetPasswordTokenExpiresIn: 3600,
      sendResetPassword: ({ user, token }) =>
        post({ kind: 'reset-password', to: user.email, name: user.name, url: `${env.APP_URL}/reset-password?token=${encodeURIComponent(token)}` }),
    },
    emailVerification: {
      sendOnSignUp: true,
      sendOnSignIn: true,
      autoSignInAfterVerification: true,
      expiresIn: DAY_S,
      sendVerificationEmail: ({ user, url }) => post({ kind: 'verify-address', to: user.email, name: user.name, url }),
    },
    rateLimit: signInLimits(env),
    advanced: {
      database: { generateId: 'uuid' },
      useSecureCookies: false, // the names below carry the stronger __Host- prefix themselves
      cookies: { session_token: cookie('session'), dont_remember: cookie('dont_remember'), session_data: cookie('session_data'), account_data: cookie('account_data') },
      ipAddress: env.TRUSTED_PROXY
        ? { ipAddressHeaders: ['x-forwarded-for'], trustedProxies: [env.TRUSTED_PROXY] }
        : { ipAddressHeaders: ['x-counterfoil-client-address'] },
    },
    logger: { level: 'error' },
  });
}

/**
 * Per address and path. Without a configured proxy no address can be believed and all clients share
 * one count, so that limit is wider; guessing at one account is slowed separately (`guess-limit.ts`).
 */
function signInLimits(env: AuthParts['env']) {
  const oneAddress = Boolean(env.TRUSTED_PROXY);
  const demo = env.DEMO && isLoopback(env.APP_URL);
  const rule = (perAddress: number) => ({ window: 60, max: demo ? 600 : oneAddress ? perAddress : perAddress * 20 });
  return {
    enabled: true,
    storage: 'database' as const,
    window: 60,
    max: demo ? 6000 : oneAddress ? 120 : 2400,
    customRules: {
      '/sign-in/email': rule(10),
      '/sign-up/email': rule(5),
      '/request-password-reset': rule(5),
      '/reset-password': rule(10),
      '/send-verification-email': rule(5),
      '/get-session': false as const,
    },
  };
}

export type Auth = ReturnType<typeof createAuth>;

const shared = globalThis as { counterfoilAuth?: { database: Database; auth: Auth } };

/** This process's sign-in service. */
export function auth(): Auth {
  const db = database();
  if (shared.counterfoilAuth?.database !== db) shared.counterfoilAuth = { database: db, auth: createAuth({ database: db, env: webEnv(), post: postAccountMail }) };
  return shared.counterfoilAuth.auth;
}
