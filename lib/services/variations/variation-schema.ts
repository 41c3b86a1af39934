import { z } from 'zod';
import { resultClaimSchema } from '@/lib/claims/result-schema';
import { problemSchema } from '@/lib/services/problem-schema';
import { runSchema } from '@/lib/services/runs/run-schema';
import { changedSchema } from './changed-schema';
import { VARIATION_VISIBILITIES } from './variation-view';

const head = {
  id: z.string(),
  claimId: z.string(),
  changes: changedSchema,
  note: z.string(),
  revision: z.int().describe('Number of the revision it varies.'),
  ofDraft: z.boolean().describe('It was asked for by an author before that revision was lodged.'),
  visibility: z.enum(VARIATION_VISIBILITIES).describe('private: you alone; comment: who reads the comment it is attached to; link: whoever has the link.'),
};

/** `variation-view.ts` as a schema. */
export const variationSchema = z
  .object({ ...head, requestedAt: z.string(), run: runSchema })
  .meta({ id: 'Variation', description: 'A rerun with other settings, as the one who asked for it sees it. Never official.' });

/** `OfferedReading` as a schema. */
export const offeredReadingSchema = z
  .object({
    id: z.string(),
    convention: z.string(),
    clause: z.string().describe('To stand after “as if”.'),
    says: z.object({ settings: z.record(z.string(), z.unknown()).optional(), noise: z.string().optional() }).nullable().describe('Settings, or a built-in curve, that say the same.'),
    factor: z.union([z.number(), z.array(z.number())]).nullable().describe('On the number, where it is one; a list has one a point.'),
  })
  .meta({ id: 'OfferedReading', description: 'One way in which a convention of a claim could be read otherwise.' });

const variedRun = z.discriminatedUnion('state', [
  z.object({ state: z.enum(['queued', 'running']), fraction: z.number(), doing: z.string() }),
  z.object({ state: z.literal('stopped'), because: z.string() }),
  z.object({ state: z.literal('refused'), problems: z.array(problemSchema) }),
  z.object({ state: z.literal('measured'), claim: resultClaimSchema }),
]);

export const variationPageSchema = z
  .object({
    ...head,
    submissionId: z.string(),
    title: z.string(),
    yours: z.boolean(),
    mayShare: z.boolean(),
    from: z.object({ kind: z.enum(['draft', 'submission', 'review', 'record']), id: z.string() }),
    officialRunId: z.string(),
    officialEngine: z.string(),
    official: resultClaimSchema.describe('The claim as its official run, or the check of a draft, has it.'),
    runId: z.string(),
    engine: z.string(),
    run: variedRun,
  })
  .meta({ id: 'VariationPage', description: 'A variation beside the number it varies. Says nothing of who asked.' });
