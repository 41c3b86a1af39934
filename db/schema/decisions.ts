import { sql } from 'drizzle-orm';
import { check, integer, json, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { DECISION_KINDS, type DecisionKind, type DecisionRemark, type Level } from '../../lib/reviews/decision';
import type { LetterNumber, LetterPoint } from '../../lib/reviews/letter';
import { users } from './accounts';
import { moment, oneOf, randomId } from './columns';
import { runs } from './runs';
import { submissions } from './submissions';

/** The letter as it was sent. */
export interface StoredLetter {
  readonly numbers: readonly LetterNumber[];
  readonly points: readonly LetterPoint[];
  readonly prose: string;
}

/**
 * What an editor decided about one revision, with the letter. Append-only; releases the reports of
 * its round. One live decision a revision: `attempt` grows only after the signer refused the one
 * before, so of two editors who decide at once, one finds the place taken.
 */
export const decisions = pgTable(
  'decisions',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    round: integer('round').notNull(),
    revision: integer('revision').notNull(),
    attempt: integer('attempt').notNull().default(1),
    kind: text('kind').$type<DecisionKind>().notNull(),
    level: integer('level').$type<Level>(),
    remarks: json('remarks').$type<readonly DecisionRemark[]>().notNull().default([]),
    covers: json('covers').$type<readonly string[]>().notNull().default([]),
    /** The official run whose numbers the letter prints; null when set aside without one. */
    runId: uuid('run_id').references(() => runs.id, { onDelete: 'restrict' }),
    letter: json('letter').$type<StoredLetter>().notNull(),
    publicSentence: text('public_sentence').notNull().default(''),
    decidedBy: uuid('decided_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    decidedAt: moment('decided_at').notNull().defaultNow(),
  },
  (t) => [
    unique('decisions_one_live').on(t.submissionId, t.revision, t.attempt),
    check('decisions_kind_known', oneOf('kind', DECISION_KINDS)),
    check('decisions_level', sql`(${t.kind} = 'enter') = (${t.level} is not null) and (${t.level} is null or ${t.level} between 1 and 3)`),
    check('decisions_entered_run', sql`${t.kind} <> 'enter' or ${t.runId} is not null`),
  ],
);
