import { betterAuth } from 'better-auth';
import { drizzleAdapter } from 'better-auth/adapters/drizzle';
import { twoFactor } from 'better-auth/plugins';
import { accounts, rateLimits, sessions, twoFactors, users, verifications } from '@/db/schema/accounts';
import { database, type Database } from '@/db/client';
import { isLoopback, webEnv } from '@/lib/env';
import { allowedOrigins } from './allowed-origins';
import { postAccountMail, type AccountMail } from './account-mail';
import { challengeAfterProvider, CHALLENGE_LIVES_S } from './challenge-after-provider';
import { ORCID, orcidClientOf, orcidPlugin, type OrcidClient } from './orcid';
import { hashPassword, verifyPassword } from './password-hash';
import { isPlaceholderAddress } from './placeholder-address';

export interface AuthParts {
  readonly database: Database;
  readonly env: { readonly APP_URL: string; readonly DEMO: boolean; readonly AUTH_SECRET: string; readonly TRUSTED_PROXY?: string | undefined };
  readonly post: (mail: AccountMail) => Promise<void>;
  /** Given to the doors that lead to ORCID and back; all others need not wait for its discovery document. */
  readonly orcid?: OrcidClient;
}

export const PASSWORD_LENGTH = { min: 15, max: 256 } as const;
const DAY_S = 24 * 3600;
export const SESSION_ABSOLUTE_S = 7 * DAY_S;

/** What the library may not be asked for: nothing here uses it, so it is no door. */
const CLOSED_PATHS = [
  '/update-user', '/change-email', '/delete-user', '/delete-user/callback', '/unlink-account', '/list-accounts', '/refresh-token',
  '/get-access-token', '/account-info', '/verify-password', '/update-session', '/error',
  '/two-factor/get-totp-uri', '/two-factor/send-otp', '/two-factor/verify-otp',
];
const PROVIDER_PATHS = ['/sign-in/social', '/link-social', '/callback/:id'];

/** Wrong codes in a row, over all challenges, before an account's second factor rests. */
export const WRONG_CODES = { atMost: 10, restsS: 15 * 60 } as const;

/**
 * The absolute life of a session is the library's `expiresIn` without refresh; the idle limit is
 * ours (`current-actor.ts`), because a page cannot renew a cookie and would sign people out mid-work.
 */
export function createAuth({ database: db, env, post, orcid }: AuthParts) {
  return betterAuth({
    baseURL: env.APP_URL,
    basePath: '/api/auth',
    secret: env.AUTH_SECRET,
    trustedOrigins: [...allowedOrigins(env)],
    telemetry: { enabled: false },
    disabledPaths: orcid ? CLOSED_PATHS : [...CLOSED_PATHS, ...PROVIDER_PATHS],
    database: drizzleAdapter(db, {
      provider: 'pg',
      usePlural: true,
      transaction: true,
      schema: { users, sessions, accounts, verifications, rateLimits, twoFactors },
    }),
    plugins: [secondFactor(), ...(orcid ? [orcidPlugin(orcid)] : [])],
    hooks: { after: challengeAfterProvider },
    onAPIError: { errorURL: `${env.APP_URL}/sign-in` },
    account: {
      // ORCID vouches for an iD, not for an address, so no two accounts are ever joined by an address.
      accountLinking: { enabled: true, trustedProviders: [ORCID], allowDifferentEmails: true, disableImplicitLinking: true },
      updateAccountOnSignIn: false,
    },
    databaseHooks: { account: { create: { before: async (account) => ({ data: { ...account, ...NO_TOKENS } }) }, update: { before: async (account) => ({ data: { ...account, ...NO_TOKENS } }) } } },
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
      sendResetPassword: async ({ user, token }) =>
        isPlaceholderAddress(user.email) ? undefined : post({ kind: 'reset-password', to: user.email, name: user.name, url: `${env.APP_URL}/reset-password?token=${encodeURIComponent(token)}` }),
    },
    emailVerification: {
      sendOnSignUp: true,
      sendOnSignIn: true,
      autoSignInAfterVerification: true,
      expiresIn: DAY_S,
      sendVerificationEmail: async ({ user, url }) => (isPlaceholderAddress(user.email) ? undefined : post({ kind: 'verify-address', to: user.email, name: user.name, url })),
    },
    rateLimit: signInLimits(env),
    advanced: placesAndCookies(env),
    logger: { level: 'error' },
  });
}

/** ORCID's own tokens are of no use here, and what is not kept cannot leak. */
const NO_TOKENS = { accessToken: null, refreshToken: null, idToken: null, accessTokenExpiresAt: null, refreshTokenExpiresAt: null };

/** An account without a password (ORCID alone) proves itself by a young session instead; `serve-auth` sees to that. */
const secondFactor = () =>
  twoFactor({
    issuer: 'Counterfoil',
    allowPasswordless: true,
    twoFactorCookieMaxAge: CHALLENGE_LIVES_S,
    accountLockout: { enabled: true, maxFailedAttempts: WRONG_CODES.atMost, durationSeconds: WRONG_CODES.restsS },
  });

/** Ids, and cookies that a script cannot read; behind TLS they carry the prefix that ties them to this very host. */
function placesAndCookies(env: AuthParts['env']) {
  const secure = env.APP_URL.startsWith('https:');
  const cookie = (name: string) => ({
    name: `${secure ? '__Host-' : ''}counterfoil.${name}`,
    attributes: { httpOnly: true, secure, sameSite: 'lax' as const, path: '/' },
  });
  return {
    database: { generateId: 'uuid' as const },
    useSecureCookies: false, // the names below carry the stronger __Host- prefix themselves
    cookies: { session_token: cookie('session'), ...Object.fromEntries(['dont_remember', 'session_data', 'account_data', 'two_factor', 'trust_device', 'state'].map((name) => [name, cookie(name)])) },
    ipAddress: env.TRUSTED_PROXY
      ? { ipAddressHeaders: ['x-forwarded-for'], trustedProxies: [env.TRUSTED_PROXY] }
      : { ipAddressHeaders: ['x-counterfoil-client-address'] },
  };
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
      '/sign-in/social': rule(10),
      '/link-social': rule(10),
      '/two-factor/*': rule(20),
      '/get-session': false as const,
    },
  };
}

export type Auth = ReturnType<typeof createAuth>;

const shared = globalThis as { counterfoilAuth?: { database: Database; auth: Auth; orcid: Map<string, Auth> } };

function room() {
  const db = database();
  if (shared.counterfoilAuth?.database !== db) shared.counterfoilAuth = { database: db, auth: createAuth({ database: db, env: webEnv(), post: postAccountMail }), orcid: new Map() };
  return shared.counterfoilAuth;
}

/** This process's sign-in service. */
export const auth = (): Auth => room().auth;

/**
 * The same with ORCID behind it, for one of our own origins: the way back leads to the name under which
 * the person came, where the cookie of the sign-in lies. Null when ORCID is not configured.
 */
export function orcidAuth(origin: string): Auth | null {
  const env = webEnv();
  const orcid = orcidClientOf(env);
  if (!orcid) return null;
  const { orcid: known, database: db } = room();
  const made = known.get(origin) ?? createAuth({ database: db, env: { ...env, APP_URL: origin }, post: postAccountMail, orcid });
  known.set(origin, made);
  return made;
}
