import { sql } from 'drizzle-orm';
import { check, index, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { TOKEN_SCOPES, type TokenScope } from '../../lib/policy/token-scopes';
import { users } from './accounts';
import { moment, randomId } from './columns';

/**
 * One bearer token for scripts, made by its owner in the account page and shown once: what is kept is
 * the SHA-256 of its 256 random bits, so that nobody can read a token from here. It dies at
 * `expires_at` or when revoked, and a row is never removed: the audit trail names it.
 */
export const apiTokens = pgTable(
  'api_tokens',
  {
    id: randomId().primaryKey(),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    /** Its first characters, by which people tell it from another. */
    hint: text('hint').notNull(),
    secretDigest: text('secret_digest').notNull().unique(),
    scopes: text('scopes').array().$type<TokenScope[]>().notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
    expiresAt: moment('expires_at').notNull(),
    lastUsedAt: moment('last_used_at'),
    revokedAt: moment('revoked_at'),
  },
  (t) => [
    index('api_tokens_user_id_idx').on(t.userId),
    check('api_tokens_digest_whole', sql`${t.secretDigest} ~ '^[0-9a-f]{64}$'`),
    check('api_tokens_scopes_known', sql.raw(`cardinality("scopes") > 0 and "scopes" <@ array[${TOKEN_SCOPES.map((s) => `'${s}'`).join(', ')}]`)),
  ],
);
