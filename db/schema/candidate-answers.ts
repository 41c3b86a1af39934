import { sql } from 'drizzle-orm';
import { check, index, integer, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { users } from './accounts';
import { moment, oneOf, randomId } from './columns';
import { runs } from './runs';
import { revisions, submissions } from './submissions';

export const CANDIDATE_ANSWERS = ['confirmed', 'not-so', 'cannot-tell'] as const;
export type CandidateAnswer = (typeof CANDIDATE_ANSWERS)[number];

/**
 * What the authors say to one candidate of one run. Append-only: a change of mind is a further row, and
 * the latest speaks. It changes no number and no verdict; what is confirmed may be taken over into a revision.
 */
export const candidateAnswers = pgTable(
  'candidate_answers',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    revisionId: uuid('revision_id')
      .notNull()
      .references(() => revisions.id, { onDelete: 'restrict' }),
    runId: uuid('run_id')
      .notNull()
      .references(() => runs.id, { onDelete: 'restrict' }),
    claimId: text('claim_id').notNull(),
    candidateId: text('candidate_id').notNull(),
    /** Which reading of the class is meant; null where the answer is about all of them. */
    reading: integer('reading'),
    /** The reading in words, as the answer was given to it. */
    clause: text('clause').notNull(),
    answer: text('answer').$type<CandidateAnswer>().notNull(),
    note: text('note').notNull().default(''),
    answeredBy: uuid('answered_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    answeredAt: moment('answered_at').notNull().defaultNow(),
  },
  (t) => [
    check('candidate_answers_answer_known', oneOf('answer', CANDIDATE_ANSWERS)),
    check('candidate_answers_lengths', sql`char_length(${t.note}) <= 2000 and char_length(${t.clause}) <= 2000`),
    index('candidate_answers_asked_idx').on(t.submissionId, t.answeredAt),
  ],
);
