import { index, integer, json, pgTable, text } from 'drizzle-orm/pg-core';
import { moment, randomId } from './columns';

/**
 * A job that was tried as often as it may be and given up: the queue itself keeps no dead letters.
 * Append-only; trying it again is a new job, audited under the administrator who asked for it.
 */
export const failedJobs = pgTable(
  'failed_jobs',
  {
    id: randomId().primaryKey(),
    task: text('task').notNull(),
    payload: json('payload').notNull(),
    attempts: integer('attempts').notNull(),
    lastError: text('last_error').notNull(),
    failedAt: moment('failed_at').notNull().defaultNow(),
  },
  (t) => [index('failed_jobs_failed_at_idx').on(t.failedAt)],
);
