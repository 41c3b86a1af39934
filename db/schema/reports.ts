import { sql } from 'drizzle-orm';
import { check, index, integer, json, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { RECOMMENDATIONS, type Confidence, type Recommendation, type ReportAnswers } from '../../lib/reviews/report';
import { users } from './accounts';
import { moment, oneOf, randomId } from './columns';
import { submissions } from './submissions';

/**
 * What one referee handed in for one round. Append-only and one per referee and round. Authors see
 * none of a round before the decision that releases them together. The signer may count reports; it
 * cannot read `referee_id`.
 */
export const reports = pgTable(
  'reports',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    refereeId: uuid('referee_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    /** The referee's letter, so that a count of referees needs no identity. */
    slot: text('slot').notNull(),
    round: integer('round').notNull(),
    revision: integer('revision').notNull(),
    answers: json('answers').$type<ReportAnswers>().notNull(),
    recommendation: text('recommendation').$type<Recommendation>().notNull(),
    confidence: integer('confidence').$type<Confidence>().notNull(),
    handedInAt: moment('handed_in_at').notNull().defaultNow(),
  },
  (t) => [
    unique('reports_once_per_round').on(t.submissionId, t.refereeId, t.round),
    check('reports_recommendation_known', oneOf('recommendation', RECOMMENDATIONS)),
    check('reports_confidence_in_range', sql`${t.confidence} between 1 and 5`),
  ],
);

/**
 * A line from a referee to the editor alone. A table of its own, so that no query for reports can
 * carry one along. Append-only, never released.
 */
export const editorNotes = pgTable(
  'editor_notes',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    writerId: uuid('writer_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    body: text('body').notNull(),
    writtenAt: moment('written_at').notNull().defaultNow(),
  },
  (t) => [index('editor_notes_submission_idx').on(t.submissionId, t.writtenAt)],
);
