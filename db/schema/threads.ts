import { check, index, integer, json, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import type { Anchor, AnchoredNumber } from '../../lib/reviews/anchors';
import { THREAD_KINDS, THREAD_STATES, THREAD_VISIBILITIES, type ThreadKind, type ThreadState, type ThreadVisibility } from '../../lib/reviews/threads';
import { users } from './accounts';
import { moment, oneOf, randomId } from './columns';
import { submissions } from './submissions';

/**
 * A talk about one number: where it hangs, what it asks, and how it stands. Only its state moves;
 * anchor, kind and who reads it are fixed when it is opened. Never deleted.
 */
export const threads = pgTable(
  'threads',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    kind: text('kind').$type<ThreadKind>().notNull(),
    state: text('state').$type<ThreadState>().notNull().default('open'),
    visibility: text('visibility').$type<ThreadVisibility>().notNull(),
    anchor: json('anchor').$type<Anchor>().notNull(),
    /** The number as it stood then, so that a later revision can say what changed. */
    anchored: json('anchored').$type<AnchoredNumber>().notNull(),
    openedOnRevision: integer('opened_on_revision').notNull(),
    openedBy: uuid('opened_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    openedAt: moment('opened_at').notNull().defaultNow(),
    closedBy: uuid('closed_by').references(() => users.id, { onDelete: 'restrict' }),
    closedAt: moment('closed_at'),
  },
  (t) => [
    index('threads_submission_idx').on(t.submissionId, t.openedAt),
    check('threads_kind_known', oneOf('kind', THREAD_KINDS)),
    check('threads_state_known', oneOf('state', THREAD_STATES)),
    check('threads_visibility_known', oneOf('visibility', THREAD_VISIBILITIES)),
  ],
);
