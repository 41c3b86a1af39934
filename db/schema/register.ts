import { customType, date, index, integer, pgTable, primaryKey, text } from 'drizzle-orm/pg-core';
import { moment } from './columns';
import { records } from './records';

const searchVector = customType<{ data: string }>({ dataType: () => 'tsvector' });

/**
 * What the register finds a record by: words and days drawn from the signed document, its statement and
 * its sheet. Written by a trigger when a record is entered and by nothing else, so that no record is
 * missing and nothing that was not entered can ever be found or counted. Append-only.
 */
export const registerEntries = pgTable(
  'register_entries',
  {
    recordId: text('record_id')
      .primaryKey()
      .references(() => records.id, { onDelete: 'restrict' }),
    title: text('title').notNull(),
    authors: text('authors').array().notNull(),
    enteredAt: moment('entered_at').notNull(),
    /** The UTC day that the document prints. */
    enteredOn: date('entered_on', { mode: 'string' }).notNull(),
    /** Title before authors before quantities before statement. */
    search: searchVector('search').notNull(),
  },
  (t) => [index('register_entries_search_idx').using('gin', t.search), index('register_entries_entered_idx').on(t.enteredAt, t.recordId)],
);

/** One claim of an entered record, as the register filters by it. Written with its entry. Append-only. */
export const registerClaims = pgTable(
  'register_claims',
  {
    recordId: text('record_id')
      .notNull()
      .references(() => registerEntries.recordId, { onDelete: 'restrict' }),
    /** Place in the document, from 1. */
    position: integer('position').notNull(),
    claimId: text('claim_id').notNull(),
    quantity: text('quantity').notNull(),
    verdict: text('verdict').notNull(),
    /** Id of a built-in curve, `attached` for the authors' own table, `none` where no curve enters. */
    noise: text('noise').notNull(),
  },
  (t) => [primaryKey({ columns: [t.recordId, t.position] }), index('register_claims_words_idx').on(t.quantity, t.verdict, t.noise)],
);
