import { z } from 'zod';
import type { ArrayStructure } from '@/lib/formats/arrays/structure';

/** What a file of arrays holds; `trouble` says why nothing is listed. */
export interface StructureView extends ArrayStructure {
  readonly trouble: readonly string[];
}

const entry = z.object({
  path: z.string(),
  kind: z.enum(['group', 'dataset']),
  shape: z.array(z.number()).nullable(),
  complex: z.boolean(),
  type: z.string().describe('The stored type in words.'),
  attributes: z.array(z.object({ name: z.string(), value: z.string() })),
  refusal: z.string().nullable().describe('Why it cannot be used; null when it can.'),
});

export const structureSchema = z.object({
  format: z.enum(['npy', 'npz', 'hdf5']),
  entries: z.array(entry),
  cut: z.boolean().describe('More is in the file than is listed.'),
  trouble: z.array(z.string()).describe('Sentences, when the file could not be read.'),
});
