import { sql } from 'drizzle-orm';
import { bigint, boolean, check, index, integer, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { ACCOUNT_ROLES, type AccountRole } from '../../lib/policy/account-role';
import { OPTIONAL_LETTERS, type OptionalLetter } from '../../lib/reviews/optional-letters';
import { moment, oneOf, randomId } from './columns';

/**
 * One person with an account. A row is never deleted while anything bears their name.
 * `role` is what they may be asked to do here; author, co-author and referee are never account
 * roles but facts about one submission.
 */
export const users = pgTable(
  'users',
  {
    id: randomId().primaryKey(),
    name: text('name').notNull(),
    email: text('email').notNull().unique(),
    emailVerified: boolean('email_verified').notNull().default(false),
    image: text('image'),
    role: text('role').$type<AccountRole>().notNull().default('member'),
    affiliation: text('affiliation'),
    /** An ORCID iD as its owner typed it; one that ORCID itself vouched for is a row of `accounts`. */
    typedOrcid: text('typed_orcid'),
    /** True once a code of the second factor was given; `two_factors` holds its secret. */
    twoFactorEnabled: boolean('two_factor_enabled').notNull().default(false),
    createdAt: moment('created_at').notNull().defaultNow(),
    updatedAt: moment('updated_at').notNull().defaultNow(),
  },
  (t) => [check('users_role_known', oneOf('role', ACCOUNT_ROLES)), check('users_typed_orcid_form', sql`${t.typedOrcid} ~ '^\\d{4}-\\d{4}-\\d{4}-\\d{3}[\\dX]$'`)],
);

/**
 * One signed-in browser. Lives while used (idle limit in `expires_at`) and never beyond seven days
 * from `created_at`. Ended by sign-out, by a password reset and by a change of role.
 */
export const sessions = pgTable(
  'sessions',
  {
    id: randomId().primaryKey(),
    expiresAt: moment('expires_at').notNull(),
    token: text('token').notNull().unique(),
    createdAt: moment('created_at').notNull().defaultNow(),
    updatedAt: moment('updated_at').notNull().defaultNow(),
    ipAddress: text('ip_address'),
    userAgent: text('user_agent'),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
  },
  (t) => [index('sessions_user_id_idx').on(t.userId)],
);

/**
 * One way in for one person, keyed by (provider, subject), because some providers give no address.
 * `password` holds a salted scrypt hash and is readable by the web role alone.
 */
export const accounts = pgTable(
  'accounts',
  {
    id: randomId().primaryKey(),
    accountId: text('account_id').notNull(),
    providerId: text('provider_id').notNull(),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    accessToken: text('access_token'),
    refreshToken: text('refresh_token'),
    idToken: text('id_token'),
    accessTokenExpiresAt: moment('access_token_expires_at'),
    refreshTokenExpiresAt: moment('refresh_token_expires_at'),
    scope: text('scope'),
    password: text('password'),
    createdAt: moment('created_at').notNull().defaultNow(),
    updatedAt: moment('updated_at').notNull().defaultNow(),
  },
  (t) => [index('accounts_user_id_idx').on(t.userId), unique('accounts_provider_subject').on(t.providerId, t.accountId)],
);

/** A mailed link that has not been used: address verification or password reset. Single use, dies at `expires_at`. */
export const verifications = pgTable(
  'verifications',
  {
    id: randomId().primaryKey(),
    identifier: text('identifier').notNull(),
    value: text('value').notNull(),
    expiresAt: moment('expires_at').notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
    updatedAt: moment('updated_at').notNull().defaultNow(),
  },
  (t) => [index('verifications_identifier_idx').on(t.identifier)],
);

/** How often one address knocked at one sign-in path lately. Kept here so that restarts and second processes do not forgive. */
export const rateLimits = pgTable('rate_limits', {
  id: randomId().primaryKey(),
  key: text('key').notNull().unique(),
  count: integer('count').notNull(),
  lastRequest: bigint('last_request', { mode: 'number' }).notNull(),
});

/**
 * The second factor of one person. Secret and recovery codes are encrypted under AUTH_SECRET; a
 * recovery code is taken out when it is used. `verified` is false until the first code was given,
 * and `locked_until` rests further tries after ten wrong ones in a row.
 */
export const twoFactors = pgTable('two_factors', {
  id: randomId().primaryKey(),
  userId: uuid('user_id')
    .notNull()
    .unique()
    .references(() => users.id, { onDelete: 'cascade' }),
  secret: text('secret').notNull(),
  backupCodes: text('backup_codes').notNull(),
  verified: boolean('verified').notNull().default(false),
  failedVerificationCount: integer('failed_verification_count').notNull().default(0),
  lockedUntil: moment('locked_until'),
});

/** A kind of letter that one person does not want. No row means it is sent; only kinds that may be left off can be here. */
export const declinedLetters = pgTable(
  'declined_letters',
  {
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    letter: text('letter').$type<OptionalLetter>().notNull(),
    since: moment('since').notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.letter] }), check('declined_letters_optional', oneOf('letter', OPTIONAL_LETTERS))],
);
