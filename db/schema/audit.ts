import { index, json, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { moment, randomId } from './columns';

/**
 * One thing somebody did, written in the transaction that did it. Append-only: no role but the owner
 * can change or remove a row. `actor_id` carries no foreign key, so that no removal of an account can
 * ever touch the trail. Never shown to authors or referees: rows name referees.
 */
export const auditEntries = pgTable(
  'audit_entries',
  {
    id: randomId().primaryKey(),
    at: moment('at').notNull().defaultNow(),
    actorKind: text('actor_kind').notNull(),
    actorId: uuid('actor_id'),
    /** `submission.lodge`, `file.add`, … */
    action: text('action').notNull(),
    subjectKind: text('subject_kind').notNull(),
    subjectId: uuid('subject_id'),
    details: json('details').$type<Readonly<Record<string, unknown>>>().notNull().default({}),
  },
  (t) => [index('audit_entries_subject_idx').on(t.subjectKind, t.subjectId, t.at)],
);
