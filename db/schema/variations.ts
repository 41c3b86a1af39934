import { sql } from 'drizzle-orm';
import { boolean, index, json, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { users } from './accounts';
import type { Mask } from '../../lib/explain/read-otherwise';
import { moment, randomId } from './columns';
import { runs } from './runs';
import { revisions, submissions } from './submissions';

/** What a variation changes on one claim; what is absent stays as the author declared it. */
export interface VariationChanges {
  /** By name, as in a sheet; null takes a declared one away. The swept setting takes the place of its sweep. */
  readonly settings?: Readonly<Record<string, unknown>>;
  /** Id of a built-in curve, or the name of a noise entry of the sheet. */
  readonly noise?: { readonly curve: string } | { readonly named: string };
  /** Conventions read otherwise, with the words that the base run had for them. */
  readonly readings?: readonly { readonly id: string; readonly clause: string }[];
  /** A stretch of the files' own time that is set to zero. */
  readonly mask?: Mask;
}

/** As rows were written when four things could be changed. They stay as they are; `lib/services/variations/changes.ts` reads both. */
export interface FirstVariationChanges {
  readonly fLowHz?: number;
  readonly fHighHz?: number;
  readonly totalMassMsun?: number;
  readonly noise?: VariationChanges['noise'];
}

/**
 * A rerun of one claim with other settings, asked for by one person. Append-only, never official:
 * it changes no number of the record. Seen by the one who asked alone until attached to a comment or
 * made readable by its link; the worker cannot read this table.
 */
export const variations = pgTable(
  'variations',
  {
    id: randomId().primaryKey(),
    runId: uuid('run_id')
      .notNull()
      .unique()
      .references(() => runs.id, { onDelete: 'restrict' }),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    revisionId: uuid('revision_id')
      .notNull()
      .references(() => revisions.id, { onDelete: 'restrict' }),
    /** The run beside whose numbers it stands: the official one, or the authors' check. Null in rows of earlier versions. */
    baseRunId: uuid('base_run_id').references(() => runs.id, { onDelete: 'restrict' }),
    claimId: text('claim_id').notNull(),
    changes: json('changes').$type<VariationChanges | FirstVariationChanges>().notNull(),
    note: text('note').notNull().default(''),
    requestedBy: uuid('requested_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    requestedAt: moment('requested_at').notNull().defaultNow(),
  },
  (t) => [index('variations_asked_idx').on(t.submissionId, t.requestedBy, t.requestedAt)],
);

/**
 * Its owner opened a variation to whoever has the link, or shut it again. Append-only: the last word
 * counts. Says nothing of who the owner is.
 */
export const variationSharings = pgTable(
  'variation_sharings',
  {
    id: randomId().primaryKey(),
    variationId: uuid('variation_id')
      .notNull()
      .references(() => variations.id, { onDelete: 'restrict' }),
    readable: boolean('readable').notNull(),
    at: moment('at').notNull().default(sql`clock_timestamp()`),
  },
  (t) => [index('variation_sharings_last_idx').on(t.variationId, t.at)],
);
