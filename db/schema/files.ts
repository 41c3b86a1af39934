import { sql } from 'drizzle-orm';
import { bigint, check, index, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { moment, randomId } from './columns';
import { revisions, submissions } from './submissions';
import { users } from './accounts';

/**
 * Bytes somebody uploaded to one submission, known by their SHA-256. Append-only: the row and the
 * object it points at never change, whatever later happens to the draft that used them. The same
 * bytes twice in one submission are one row.
 */
export const storedFiles = pgTable(
  'stored_files',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    /** Lower-case hexadecimal. */
    sha256: text('sha256').notNull(),
    bytes: bigint('bytes', { mode: 'number' }).notNull(),
    storageKey: text('storage_key').notNull(),
    originalName: text('original_name').notNull(),
    uploadedBy: uuid('uploaded_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    uploadedAt: moment('uploaded_at').notNull().defaultNow(),
  },
  (t) => [
    unique('stored_files_once_per_submission').on(t.submissionId, t.sha256),
    index('stored_files_sha256_idx').on(t.sha256),
    check('stored_files_sha256_form', sql`${t.sha256} ~ '^[0-9a-f]{64}$'`),
    check('stored_files_bytes_not_negative', sql`${t.bytes} >= 0`),
  ],
);

/**
 * A file under the name by which one revision's sheet calls it. May be added and removed while the
 * revision is unlodged; after lodging a trigger refuses both.
 */
export const revisionFiles = pgTable(
  'revision_files',
  {
    revisionId: uuid('revision_id')
      .notNull()
      .references(() => revisions.id, { onDelete: 'restrict' }),
    name: text('name').notNull(),
    fileId: uuid('file_id')
      .notNull()
      .references(() => storedFiles.id, { onDelete: 'restrict' }),
    addedAt: moment('added_at').notNull().defaultNow(),
  },
  (t) => [primaryKey({ columns: [t.revisionId, t.name] }), index('revision_files_file_idx').on(t.fileId)],
);
