import { check, customType, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { RECORD_STANDINGS, type RecordStanding } from '../../lib/badges/standing';
import { moment, oneOf, randomId } from './columns';
import { decisions } from './decisions';
import { submissions } from './submissions';
import { users } from './accounts';

const bytes = customType<{ data: Buffer; driverData: Buffer }>({ dataType: () => 'bytea' });

/**
 * One published record: the very bytes that were signed, and the signature. Append-only, written by
 * the signer alone; served as stored, never rebuilt. A later revision is a further row.
 */
export const records = pgTable(
  'records',
  {
    /** Printed on badges, so short; random, so that nothing can be counted. */
    id: text('id').primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    decisionId: uuid('decision_id')
      .notNull()
      .unique()
      .references(() => decisions.id, { onDelete: 'restrict' }),
    revision: integer('revision').notNull(),
    level: integer('level').notNull(),
    /** Canonical `counterfoil-record/1`. */
    document: bytes('document').notNull(),
    /** Canonical `counterfoil-signature/1`. */
    signature: bytes('signature').notNull(),
    /** SHA-256 of `document`: the strong ETag. */
    documentDigest: text('document_digest').notNull(),
    keyId: text('key_id')
      .notNull()
      .references(() => signingKeys.id, { onDelete: 'restrict' }),
    enteredAt: moment('entered_at').notNull().defaultNow(),
  },
  (t) => [unique('records_one_per_revision').on(t.submissionId, t.revision), index('records_entered_idx').on(t.enteredAt)],
);

/** A public key that has signed or may sign. Append-only: a key that is no longer used stays published. */
export const signingKeys = pgTable('signing_keys', {
  /** First 16 hexadecimal digits of the SHA-256 of the public key. */
  id: text('id').primaryKey(),
  /** SubjectPublicKeyInfo, PEM. */
  publicKey: text('public_key').notNull(),
  firstUsedAt: moment('first_used_at').notNull().defaultNow(),
});

/**
 * How a record stands since a moment; the newest row is its standing. Append-only, public, with a
 * reason: a struck record stays, and so does the history of its striking.
 */
export const recordStandings = pgTable(
  'record_standings',
  {
    id: randomId().primaryKey(),
    recordId: text('record_id')
      .notNull()
      .references(() => records.id, { onDelete: 'restrict' }),
    standing: text('standing').$type<RecordStanding>().notNull(),
    reason: text('reason').notNull().default(''),
    /** Null when the signer entered it. */
    setBy: uuid('set_by').references(() => users.id, { onDelete: 'restrict' }),
    since: moment('since').notNull().defaultNow(),
  },
  (t) => [index('record_standings_record_idx').on(t.recordId, t.since), check('record_standings_known', oneOf('standing', RECORD_STANDINGS))],
);

/**
 * Why the signer did not sign a decision. Append-only; the editor reads it and decides anew, which is
 * the next attempt on the same revision.
 */
export const signingRefusals = pgTable('signing_refusals', {
  decisionId: uuid('decision_id')
    .primaryKey()
    .references(() => decisions.id, { onDelete: 'restrict' }),
  code: text('code').notNull(),
  reason: text('reason').notNull(),
  refusedAt: moment('refused_at').notNull().defaultNow(),
});
