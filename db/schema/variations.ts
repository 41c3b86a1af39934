import { index, json, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { users } from './accounts';
import { moment, randomId } from './columns';
import { runs } from './runs';
import { revisions, submissions } from './submissions';

/** The settings a variation changes on one claim; what is absent stays as the author declared it. */
export interface VariationChanges {
  readonly fLowHz?: number;
  readonly fHighHz?: number;
  readonly totalMassMsun?: number;
  /** Id of a built-in curve, or the name of a noise entry of the sheet. */
  readonly noise?: { readonly curve: string } | { readonly named: string };
}

/**
 * A rerun of one claim with other settings, asked for by one person. Append-only, never official:
 * it changes no number of the record. Seen by the one who asked and by nobody else until attached to
 * a comment; the worker cannot read this table.
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
    claimId: text('claim_id').notNull(),
    changes: json('changes').$type<VariationChanges>().notNull(),
    note: text('note').notNull().default(''),
    requestedBy: uuid('requested_by')
      .notNull()
      .references(() => users.id, { onDelete: 'restrict' }),
    requestedAt: moment('requested_at').notNull().defaultNow(),
  },
  (t) => [index('variations_asked_idx').on(t.submissionId, t.requestedBy, t.requestedAt)],
);
