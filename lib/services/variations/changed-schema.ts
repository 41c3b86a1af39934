import { z } from 'zod';

/** What a variation changed, as it is kept; `changes.ts` judges what may be asked for. */
export const changedSchema = z
  .object({
    settings: z.record(z.string(), z.unknown()).optional().describe('By name, as in a sheet; null took a declared one away.'),
    noise: z.union([z.object({ curve: z.string() }), z.object({ named: z.string() })]).optional(),
  })
  .meta({ id: 'VariationChanges' });
