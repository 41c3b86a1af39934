import { z } from 'zod';
import { recordSchema } from './record-schema';

/** `counterfoil-record/1` as JSON Schema 2020-12, drawn from the schema by which a record is verified. */
export function recordJsonSchema(): Readonly<Record<string, unknown>> {
  const { $schema, ...rest } = z.toJSONSchema(recordSchema, { target: 'draft-2020-12', io: 'input' });
  return { $schema, $id: '/schemas/counterfoil-record/1', title: 'A published record of Counterfoil', ...rest };
}
