import { z } from 'zod';

/** What a variation changed, as it is kept; `changes.ts` judges what may be asked for. */
export const changedSchema = z
  .object({
    settings: z.record(z.string(), z.unknown()).optional().describe('By name, as in a sheet; null took a declared one away.'),
    noise: z.union([z.object({ curve: z.string() }), z.object({ named: z.string() })]).optional(),
    readings: z.array(z.object({ id: z.string(), clause: z.string() })).optional().describe('Conventions read otherwise, in the words of the base run: the number is as if clause.'),
    mask: z.object({ from: z.number(), to: z.number() }).optional().describe('A stretch of the files’ own time that was set to zero.'),
  })
  .meta({ id: 'VariationChanges' });
