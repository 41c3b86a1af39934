import { bigint, integer, pgTable, varchar } from 'drizzle-orm/pg-core';

/**
 * Points one actor has spent at one door (route or action) in the current window. Column names are
 * those of the limiter library, which reads and writes the table itself.
 */
export const ratePoints = pgTable('rate_points', {
  key: varchar('key', { length: 255 }).primaryKey(),
  points: integer('points').notNull().default(0),
  expire: bigint('expire', { mode: 'number' }),
});
