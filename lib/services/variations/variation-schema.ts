import { z } from 'zod';
import { runSchema } from '@/lib/services/runs/run-schema';

const changes = z.object({
  fLowHz: z.number().optional(),
  fHighHz: z.number().optional(),
  totalMassMsun: z.number().optional(),
  noise: z.union([z.object({ curve: z.string() }), z.object({ named: z.string() })]).optional(),
});

/** `variation-view.ts` as a schema. */
export const variationSchema = z
  .object({ id: z.string(), claimId: z.string(), changes, note: z.string(), requestedAt: z.string(), run: runSchema })
  .meta({ id: 'Variation', description: 'A rerun with other settings, as the one who asked for it sees it. Never official.' });
