import { sql } from 'drizzle-orm';
import { check, index, json, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { ConflictFlag } from '../../lib/reviews/conflicts';
import { users } from './accounts';
import { moment, oneOf, randomId } from './columns';
import { submissions } from './submissions';

/**
 * Which editor holds a submission. One row each; written when it is taken from the queue and never
 * passed on in silence: a change of hands is an update that the audit trail tells.
 */
export const assignments = pgTable(
  'assignments',
  {
    submissionId: uuid('submission_id')
      .primaryKey()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    editorId: uuid('editor_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    takenAt: moment('taken_at').notNull().defaultNow(),
  },
  (t) => [index('assignments_editor_idx').on(t.editorId)],
);

export const INVITATION_STATES = ['asked', 'accepted', 'declined', 'lapsed', 'relieved'] as const;
export type InvitationState = (typeof INVITATION_STATES)[number];

/**
 * One person asked to referee one submission, and the letter they are known by in it. This is where
 * a referee's identity lives; the worker and the signer cannot read it. Answered once; a letter is
 * never given to a second person of the same submission.
 */
export const invitations = pgTable(
  'invitations',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    refereeId: uuid('referee_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    invitedBy: uuid('invited_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    /** Drawn at random, so that the order of asking cannot be read off. */
    slot: text('slot').notNull(),
    state: text('state').$type<InvitationState>().notNull().default('asked'),
    /** What spoke against asking when it was done; kept though the facts may change. */
    flags: json('flags').$type<readonly ConflictFlag[]>().notNull().default([]),
    /** The editor's sentence why an ask flag is no bar. */
    reason: text('reason'),
    /** The referee's own statement that they have no conflict, signed by accepting. */
    statedNoConflict: text('stated_no_conflict'),
    invitedAt: moment('invited_at').notNull().defaultNow(),
    answeredAt: moment('answered_at'),
  },
  (t) => [
    unique('invitations_slot').on(t.submissionId, t.slot),
    uniqueIndex('invitations_once_live')
      .on(t.submissionId, t.refereeId)
      .where(sql`${t.state} in ('asked', 'accepted')`),
    index('invitations_referee_idx').on(t.refereeId, t.state),
    check('invitations_state_known', oneOf('state', INVITATION_STATES)),
    check('invitations_answered', sql`(${t.state} = 'asked') = (${t.answeredAt} is null)`),
  ],
);
