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
