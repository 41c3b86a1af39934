import { z } from 'zod';
import { RECORD_STANDINGS } from '@/lib/badges/standing';
import { recordSchema } from '@/lib/badges/record-schema';
import type { RegisterRow } from './record-view';

/** One row of the register, and the record itself, as the interface gives them. */
export const registerRowSchema = z
  .object({
    id: z.string(),
    title: z.string(),
    authors: z.array(z.string()),
    enteredOn: z.string().describe('UTC day.'),
    revision: z.int(),
    level: z.int(),
    standing: z.enum(RECORD_STANDINGS),
    standingSince: z.string(),
    quantities: z.array(z.string()),
    noises: z.array(z.string()),
    verdicts: z.array(z.enum(['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree'])),
  })
  .meta({ id: 'RegisterRow' }) satisfies z.ZodType<RegisterRow>;

export const publishedRecordSchema = recordSchema.meta({ id: 'Record', description: 'A `counterfoil-record/1`, byte for byte as it was signed; its own schema is at /schemas/counterfoil-record/1.' });
