import { index, integer, json, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { users } from './accounts';
import { moment } from './columns';

/**
 * The answer that was given to one request carrying an Idempotency-Key, written in the transaction of
 * the act itself: the same key again gets the same answer and acts no second time. Never changed, and
 * removed only when it is older than a day, after which the key is free.
 */
export const idempotencyKeys = pgTable(
  'idempotency_keys',
  {
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    key: text('key').notNull(),
    /** Door and digest of its input: the same key with another request is refused. */
    requestDigest: text('request_digest').notNull(),
    status: integer('status').notNull(),
    body: json('body').notNull(),
    createdAt: moment('created_at').notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.userId, t.key] }), index('idempotency_keys_created_idx').on(t.createdAt)],
);
