import { sql, type SQL } from 'drizzle-orm';
import { timestamp, uuid } from 'drizzle-orm/pg-core';

/**
 * The cellar: one file per noun, each opened by what a row means and what it can never do.
 * Roles and append-only rules are SQL in the migrations, proven by tests/db. Ids are random
 * (version 4), never ordered in time, so that an id says nothing about when or how many.
 */
export const randomId = (name = 'id') => uuid(name).defaultRandom();

export const moment = (name: string) => timestamp(name, { withTimezone: true, mode: 'date' });

/** A closed vocabulary as a CHECK: adding a word is one line of a migration, unlike an enum type. */
export const oneOf = (column: string, words: readonly string[]): SQL =>
  sql.raw(`"${column}" in (${words.map((w) => `'${w}'`).join(', ')})`);
