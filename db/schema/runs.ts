import { sql } from 'drizzle-orm';
import { check, index, integer, json, pgTable, real, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { ReadOtherwise } from '../../lib/explain/read-otherwise';
import type { ReadingsByClaim } from '../../lib/pipeline/explain/offered-readings';
import type { FiguresByClaim, ResultDocument } from '../../lib/pipeline/result';
import type { Problem } from '../../lib/kernel/problem';
import { moment, oneOf, randomId } from './columns';
import { revisions, submissions } from './submissions';

export const RUN_KINDS = ['check', 'official', 'variation'] as const;
export type RunKind = (typeof RUN_KINDS)[number];

/** What a run reads: the name in the sheet, and the bytes it stood for when the run was asked for. */
export interface RunInput {
  readonly name: string;
  readonly sha256: string;
  readonly bytes: number;
  readonly storageKey: string;
}

/**
 * One computation that was asked for, with the very sheet and file hashes it is about: a draft may
 * change afterwards, the run does not. Append-only. Who asked is not here but in the audit trail and
 * in `variations`, since the worker reads this table and must not learn who a referee is.
 */
export const runs = pgTable(
  'runs',
  {
    id: randomId().primaryKey(),
    submissionId: uuid('submission_id')
      .notNull()
      .references(() => submissions.id, { onDelete: 'restrict' }),
    revisionId: uuid('revision_id')
      .notNull()
      .references(() => revisions.id, { onDelete: 'restrict' }),
    kind: text('kind').$type<RunKind>().notNull(),
    engine: text('engine').notNull(),
    sheet: json('sheet').notNull(),
    inputs: json('inputs').$type<readonly RunInput[]>().notNull(),
    /** SHA-256 of the canonical form of sheet, names and hashes: says whether a draft is still what was checked. */
    inputsDigest: text('inputs_digest').notNull(),
    /** What a variation reads otherwise than its sheet and files say. */
    otherwise: json('otherwise').$type<ReadOtherwise>(),
    requestedAt: moment('requested_at').notNull().defaultNow(),
  },
  (t) => [
    check('runs_kind_known', oneOf('kind', RUN_KINDS)),
    // Nothing read otherwise can ever be official.
    check('runs_otherwise_only_varied', sql`${t.otherwise} is null or ${t.kind} = 'variation'`),
    index('runs_revision_idx').on(t.revisionId, t.kind, t.requestedAt),
    // One official run for a revision and an engine: the second request finds the first.
    uniqueIndex('runs_official_once').on(t.revisionId, t.engine).where(sql`${t.kind} = 'official'`),
  ],
);

/** One new activity of a run, and when it began, counted from the run's own start. */
export interface RunStep {
  readonly atMs: number;
  readonly doing: string;
}

export const RUN_OUTCOMES = ['measured', 'refused'] as const;
export type RunOutcome = (typeof RUN_OUTCOMES)[number];

/**
 * What one run found: the result document and its figures, or the problems for which the sheet could
 * not be read. Append-only and one per run, so a worker that dies and is followed by another completes
 * the run exactly once. `result_digest` is the SHA-256 of the canonical result (RFC 8785).
 */
export const runResults = pgTable(
  'run_results',
  {
    runId: uuid('run_id')
      .primaryKey()
      .references(() => runs.id, { onDelete: 'restrict' }),
    outcome: text('outcome').$type<RunOutcome>().notNull(),
    engine: text('engine').notNull(),
    result: json('result').$type<ResultDocument>(),
    figures: json('figures').$type<FiguresByClaim>(),
    /** How each claim could be read otherwise: what a variation may choose from. Beside the result, never part of it. */
    readings: json('readings').$type<ReadingsByClaim>(),
    resultDigest: text('result_digest'),
    problems: json('problems').$type<readonly Problem[]>().notNull().default([]),
    /** What the run did and when: beside the result, never part of it. */
    log: json('log').$type<readonly RunStep[]>().notNull().default([]),
    finishedAt: moment('finished_at').notNull().defaultNow(),
  },
  (t) => [
    check('run_results_outcome_known', oneOf('outcome', RUN_OUTCOMES)),
    check(
      'run_results_whole',
      sql`(${t.outcome} = 'measured' and ${t.result} is not null and ${t.resultDigest} ~ '^[0-9a-f]{64}$') or (${t.outcome} = 'refused' and ${t.result} is null)`,
    ),
  ],
);

export const RUN_STATES = ['queued', 'running', 'finished', 'stopped'] as const;
export type RunState = (typeof RUN_STATES)[number];

/**
 * Where a run stands now. The one table about runs that is overwritten; nothing is ever concluded
 * from it. `beat_at` is the worker's sign of life.
 */
export const runProgress = pgTable(
  'run_progress',
  {
    runId: uuid('run_id')
      .primaryKey()
      .references(() => runs.id, { onDelete: 'restrict' }),
    state: text('state').$type<RunState>().notNull().default('queued'),
    /** 0 to 1. */
    fraction: real('fraction').notNull().default(0),
    doing: text('doing').notNull().default(''),
    attempt: integer('attempt').notNull().default(0),
    /** A sentence for people when the run was given up. */
    stoppedBecause: text('stopped_because'),
    beatAt: moment('beat_at').notNull().defaultNow(),
  },
  (t) => [
    check('run_progress_state_known', oneOf('state', RUN_STATES)),
    check('run_progress_fraction_in_range', sql`${t.fraction} between 0 and 1`),
  ],
);
