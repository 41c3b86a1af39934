import { sql } from 'drizzle-orm';
import { bigint, check, index, integer, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { users } from './accounts';
import { moment, randomId } from './columns';
import { submissions } from './submissions';

/**
 * A long file on its way, part by part, so that a broken connection costs one part and not the whole.
 * The row goes when the file has arrived, when its owner lets it go, or when its time is over; nothing
 * of it is history.
 */
export const uploads = pgTable(
  'uploads',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'cascade' }),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'cascade' }),
    name: text('name').notNull(),
    bytes: bigint('bytes', { mode: 'number' }).notNull(),
    /** As the sender says; what arrives is hashed again and compared. */
    sha256: text('sha256').notNull(),
    expiresAt: moment('expires_at').notNull(),
  },
  (t) => [
    // The same person sends one file of one name at a time.
    unique('uploads_one_per_name').on(t.submissionId, t.userId, t.name),
    index('uploads_expiry_idx').on(t.expiresAt),
    check('uploads_sha256_form', sql`${t.sha256} ~ '^[0-9a-f]{64}$'`),
    check('uploads_bytes_positive', sql`${t.bytes} > 0`),
  ],
);

/** One part that is in the store. */
export const uploadParts = pgTable(
  'upload_parts',
  {
    uploadId: uuid('upload_id')
      .notNull()
      .references(() => uploads.id, { onDelete: 'cascade' }),
    /** From 0. */
    number: integer('number').notNull(),
    storageKey: text('storage_key').notNull(),
  },
  (t) => [primaryKey({ columns: [t.uploadId, t.number] }), check('upload_parts_number_not_negative', sql`${t.number} >= 0`)],
);
