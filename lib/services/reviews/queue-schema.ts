import { z } from 'zod';
import { SUBMISSION_STATES } from '@/lib/policy/submission-state';
import { QUEUE_GROUPS } from '@/lib/reviews/queue';
import { conflictFlagSchema } from './desk-schema';
import type { QueueView } from './queue-view';

/** `queue-view.ts` as a schema, and the people an editor might ask. */
const row = z.object({
  submissionId: z.string(),
  title: z.string(),
  authors: z.array(z.string()),
  group: z.string().nullable(),
  state: z.enum(SUBMISSION_STATES),
  stateWords: z.string(),
  revision: z.int(),
  verdicts: z.array(z.enum(['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree'])),
  ball: z.object({ with: z.string(), you: z.boolean(), day: z.int(), of: z.int().nullable() }),
  because: z.string(),
  next: z.enum(['take', 'assign', 'send-to-review', 'remind', 'decide', 'look', 'open']),
});

export const queueSchema = z
  .object({ total: z.int(), needYou: z.int(), groups: z.array(z.object({ group: z.enum(QUEUE_GROUPS), rows: z.array(row) })) })
  .meta({ id: 'Queue' }) satisfies z.ZodType<QueueView>;

export const refereeCandidatesSchema = z.array(z.object({ userId: z.string(), name: z.string(), affiliation: z.string().nullable(), flags: z.array(conflictFlagSchema), load: z.int() }));
