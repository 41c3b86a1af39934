import { sql } from 'drizzle-orm';
import { check, index, integer, json, pgTable, primaryKey, text, unique, uuid } from 'drizzle-orm/pg-core';
import { SUBMISSION_STATES, type SubmissionState } from '../../lib/policy/submission-state';
import { users } from './accounts';
import { moment, oneOf, randomId } from './columns';

/**
 * One body of claims on its way from draft to record. Holds only what moves: the state, the round
 * and which revision is current. A row is never deleted; every change of `state` is guarded by the
 * state it leaves and audited in the same transaction.
 */
export const submissions = pgTable(
  'submissions',
  {
    id: randomId().primaryKey(),
    title: text('title').notNull(),
    state: text('state').$type<SubmissionState>().notNull().default('draft'),
    /** 0 until the first review begins. */
    round: integer('round').notNull().default(0),
    /** The revision being written or, once lodged, under review. */
    currentRevision: integer('current_revision').notNull().default(1),
    ownerId: uuid('owner_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    createdAt: moment('created_at').notNull().defaultNow(),
    updatedAt: moment('updated_at').notNull().defaultNow(),
    stateChangedAt: moment('state_changed_at').notNull().defaultNow(),
  },
  (t) => [
    check('submissions_state_known', oneOf('state', SUBMISSION_STATES)),
    check('submissions_round_not_negative', sql`${t.round} >= 0`),
    index('submissions_owner_idx').on(t.ownerId),
    index('submissions_state_idx').on(t.state),
  ],
);

export const AUTHOR_ROLES = ['author', 'co-author'] as const;
export type AuthorRole = (typeof AUTHOR_ROLES)[number];

/**
 * A person's authorship of one submission. Exactly one row per submission is `author` (the one who
 * may lodge). Referees are never here: who they are is kept apart, where the worker cannot read it.
 */
export const submissionPeople = pgTable(
  'submission_people',
  {
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    userId: uuid('user_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    role: text('role').$type<AuthorRole>().notNull(),
    /** Place in the printed list of authors, from 1. */
    position: integer('position').notNull(),
    /** When this person confirmed authorship and the release of the data; null while they have not. */
    confirmedAt: moment('confirmed_at'),
    addedAt: moment('added_at').notNull().defaultNow(),
  },
  (t) => [
    primaryKey({ columns: [t.submissionId, t.userId] }),
    unique('submission_people_position').on(t.submissionId, t.position),
    check('submission_people_role_known', oneOf('role', AUTHOR_ROLES)),
    index('submission_people_user_idx').on(t.userId),
  ],
);

/**
 * One numbered edition of a submission: title, statement and sheet. Written freely while
 * `lodged_at` is null; from the moment it is lodged a trigger refuses every change, to all roles.
 * A correction is the next number. `sheet` is `json`, not `jsonb`, so that the author's order and
 * digits come back as they were written.
 */
export const revisions = pgTable(
  'revisions',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    number: integer('number').notNull(),
    title: text('title').notNull(),
    statement: text('statement').notNull().default(''),
    sheet: json('sheet').notNull(),
    /** Counts saves; an edit names the version it was made on, and a stale one is a conflict. */
    version: integer('version').notNull().default(1),
    createdAt: moment('created_at').notNull().defaultNow(),
    updatedAt: moment('updated_at').notNull().defaultNow(),
    lodgedAt: moment('lodged_at'),
  },
  (t) => [unique('revisions_number').on(t.submissionId, t.number), check('revisions_number_from_one', sql`${t.number} >= 1`)],
);
