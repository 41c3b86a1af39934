import { pgTable, uuid } from 'drizzle-orm/pg-core';
import { moment } from './columns';
import { runs } from './runs';

/**
 * Whoever asked for a check or a variation wants it no longer. The worker looks here while it computes;
 * as in `runs`, who asked stands in the audit trail alone. Append-only.
 */
export const runStops = pgTable('run_stops', {
  runId: uuid('run_id')
    .primaryKey()
    .references(() => runs.id, { onDelete: 'restrict' }),
  askedAt: moment('asked_at').notNull().defaultNow(),
});
