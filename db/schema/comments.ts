import { check, index, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { moment, oneOf, randomId } from './columns';
import { users } from './accounts';
import { threads } from './threads';
import { variations } from './variations';

export const COMMENT_SIDES = ['authors', 'referee', 'editor'] as const;

/**
 * One utterance in a thread. Append-only: a correction is a further comment. `side` is on which side
 * of the anonymity line its writer stood when writing. A variation is attached once, by its own
 * asker, and is private until then.
 */
export const comments = pgTable(
  'comments',
  {
    id: randomId().primaryKey(),
    threadId: uuid('thread_id')
      .notNull()
      .references(() => threads.id, { onDelete: 'restrict' }),
    writerId: uuid('writer_id')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    side: text('side').$type<(typeof COMMENT_SIDES)[number]>().notNull(),
    body: text('body').notNull(),
    variationId: uuid('variation_id').references(() => variations.id, { onDelete: 'restrict' }),
    writtenAt: moment('written_at').notNull().defaultNow(),
  },
  (t) => [
    index('comments_thread_idx').on(t.threadId, t.writtenAt),
    unique('comments_variation_attached_once').on(t.variationId),
    check('comments_side_known', oneOf('side', COMMENT_SIDES)),
  ],
);
