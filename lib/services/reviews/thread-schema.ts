import { z } from 'zod';
import { THREAD_KINDS, THREAD_STATES, THREAD_VISIBILITIES } from '@/lib/reviews/threads';
import { changedSchema } from '@/lib/services/variations/changed-schema';
import type { ThreadView } from './thread-view';

/** `thread-view.ts` as a schema. */
const at = z.record(z.string(), z.union([z.number(), z.string()]));
const anchored = z.object({ printed: z.string().nullable(), value: z.number().nullable(), expandedUncertainty: z.number().nullable().optional().describe('Not kept with threads of earlier versions.'), unit: z.string().optional() });
export const anchorSchema = z.object({ claim: z.string(), at: at.nullable() });
export const reAnchoringSchema = z.union([
  z.object({ standing: z.literal('same') }),
  z.object({ standing: z.literal('changed'), was: anchored, now: anchored }),
  z.object({ standing: z.literal('lost'), was: anchored }),
]);

/** Across the anonymity line a moment is a day. */
export const seenTimeSchema = z.union([z.object({ precision: z.literal('instant'), at: z.string() }), z.object({ precision: z.literal('day'), on: z.string() })]).meta({ id: 'SeenTime' });

export const seenVariationSchema = z
  .object({
    id: z.string(),
    claim: z.string(),
    changes: z.array(z.string()),
    changed: changedSchema,
    state: z.enum(['queued', 'running', 'finished', 'stopped']),
    points: z.array(z.object({ at, value: z.number().nullable(), expandedUncertainty: z.number().nullable(), official: z.number().nullable(), officialUncertainty: z.number().nullable() })),
    unit: z.string(),
    note: z.string(),
    seenBy: z.enum(['you alone', 'referees and editor', 'authors too']),
  })
  .meta({ id: 'AttachedVariation' });

const comment = z
  .object({ id: z.string(), by: z.string(), side: z.enum(['authors', 'referee', 'editor']), yours: z.boolean(), when: seenTimeSchema, body: z.string().describe('Markdown with mathematics.'), variation: seenVariationSchema.nullable() })
  .meta({ id: 'Comment' });

export const threadSchema = z
  .object({
    id: z.string(),
    number: z.int(),
    kind: z.enum(THREAD_KINDS),
    state: z.enum(THREAD_STATES),
    visibility: z.enum(THREAD_VISIBILITIES),
    anchor: anchorSchema.extend({ opened: anchored, openedOnRevision: z.int(), now: z.union([...reAnchoringSchema.options, z.object({ standing: z.literal('waiting') })]) }),
    comments: z.array(comment),
    may: z.object({ reply: z.boolean(), close: z.array(z.enum(['resolved', 'overruled', 'moot'])) }),
  })
  .meta({ id: 'Thread' }) satisfies z.ZodType<ThreadView>;
