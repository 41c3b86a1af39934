import { z } from 'zod';
import { resultSchema } from '@/lib/claims/result-schema';
import { problemSchema } from '@/lib/services/problem-schema';

/** What the interface says of runs; the views are in `submission-view.ts` beside this folder. */
const instant = z.string().describe('ISO 8601, UTC.');
const result = resultSchema.meta({ id: 'Result', description: 'A `counterfoil-result/1`; its own schema is at /schemas/counterfoil-result/1.' });

const head = { id: z.string(), kind: z.enum(['check', 'official', 'variation']), engine: z.string(), requestedAt: instant };

const measured = z.object({ ...head, state: z.literal('measured'), finishedAt: instant, result, resultDigest: z.string().describe('SHA-256 of the canonical result (RFC 8785).'), log: z.array(z.object({ atMs: z.number(), doing: z.string() })) });

export const runSchema = z
  .discriminatedUnion('state', [
    z.object({ ...head, state: z.enum(['queued', 'running']), fraction: z.number().min(0).max(1), doing: z.string() }),
    z.object({ ...head, state: z.literal('stopped'), stoppedAt: instant, because: z.string() }),
    z.object({ ...head, state: z.literal('refused'), finishedAt: instant, problems: z.array(problemSchema) }),
    measured,
  ])
  .meta({ id: 'Run' });

export const checkSchema = z
  .object({
    run: runSchema,
    current: z.boolean().describe('Sheet and files are still what it checked.'),
    stoppedBy: z.string().nullable().describe('The author who stopped it.'),
    before: z.object({ run: measured.meta({ id: 'MeasuredRun' }), current: z.boolean() }).nullable().describe('Where the latest check has no numbers: the one before it whose numbers stand.'),
  })
  .meta({ id: 'Check', description: 'The latest check of a draft.' });

const axis = z.object({ label: z.string(), unit: z.string(), scale: z.enum(['linear', 'log']), values: z.array(z.number()), words: z.array(z.string()).optional() });
const series = z.object({ label: z.string(), unit: z.string(), role: z.string(), axis: z.enum(['left', 'right']), scale: z.enum(['linear', 'log']), values: z.array(z.number().nullable()), points: z.literal(true).optional() });
const plane = z.object({ y: z.object({ label: z.string(), unit: z.string(), values: z.array(z.number()) }), level: z.object({ label: z.string(), unit: z.string(), values: z.array(z.number().nullable()) }), threshold: z.number() });
const figure = z.looseObject({ kind: z.string(), title: z.string(), at: z.record(z.string(), z.union([z.number(), z.string()])).optional(), x: axis, series: z.array(series), plane: plane.optional() });

export const figuresSchema = z.object({ runId: z.string(), figures: z.record(z.string(), z.array(figure)) }).meta({ id: 'Figures' });
