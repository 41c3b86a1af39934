import { check, index, integer, json, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { moment, oneOf, randomId } from './columns';

export const MAIL_STATES = ['waiting', 'sent', 'given-up'] as const;

/**
 * A mail that somebody's act brought about, written in the transaction of the act: if the act stands,
 * the mail will go out, however long the mail server is away. Text is rendered when it is written, so
 * the worker that delivers it needs to read nothing else. Delivered at least once; `message_id` is
 * the same on every try, so that a mail server or reader can drop a second copy. Once sent, recipient
 * and text are blanked: who was asked to referee what does not stay where the worker can read.
 */
export const outbox = pgTable(
  'outbox',
  {
    id: randomId().primaryKey(),
    messageId: text('message_id').notNull().unique(),
    /** What happened, once: the same act repeated finds its mail already written. */
    dedupeKey: text('dedupe_key').notNull(),
    recipient: text('recipient').notNull(),
    subject: text('subject').notNull(),
    body: text('body').notNull(),
    headers: json('headers').$type<Readonly<Record<string, string>>>().notNull().default({}),
    state: text('state').$type<(typeof MAIL_STATES)[number]>().notNull().default('waiting'),
    attempts: integer('attempts').notNull().default(0),
    lastError: text('last_error'),
    createdAt: moment('created_at').notNull().defaultNow(),
    /** Not tried again before this moment. */
    dueAt: moment('due_at').notNull().defaultNow(),
    sentAt: moment('sent_at'),
  },
  (t) => [
    unique('outbox_once').on(t.dedupeKey),
    index('outbox_due_idx').on(t.state, t.dueAt),
    check('outbox_state_known', oneOf('state', MAIL_STATES)),
  ],
);
