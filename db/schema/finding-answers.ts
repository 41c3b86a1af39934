import { sql } from 'drizzle-orm';
import { check, pgTable, primaryKey, text, uuid } from 'drizzle-orm/pg-core';
import { moment } from './columns';
import { revisions } from './submissions';

/**
 * What the authors answer to one finding of a revision, known by its code, place and words: should a
 * number in the finding change, the answer no longer fits and is asked for again. Inserted and removed
 * while the revision is unlodged; after lodging a trigger refuses both.
 */
export const findingAnswers = pgTable(
  'finding_answers',
  {
    revisionId: uuid('revision_id')
      .notNull()
      .references(() => revisions.id, { onDelete: 'restrict' }),
    code: text('code').notNull(),
    place: text('place').notNull(),
    finding: text('finding').notNull(),
    answer: text('answer').notNull(),
    answeredAt: moment('answered_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.revisionId, t.code, t.place, t.finding] }),
    // An index row holds 2,704 bytes; a finding is a sentence or three.
    check('finding_answers_lengths', sql`octet_length(${t.finding}) <= 2000 and char_length(${t.answer}) between 1 and 2000`),
  ],
);
