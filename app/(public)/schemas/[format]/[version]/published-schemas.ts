import { createHash } from 'node:crypto';
import { recordJsonSchema } from '@/lib/badges/record-json-schema';
import { claimSheetJsonSchema, resultJsonSchema } from '@/lib/claims/json-schemas';
import { catalogue } from '@/lib/pipeline/catalogue';

interface PublishedSchema {
  readonly text: string;
  readonly etag: string;
}

const publish = (schema: unknown): PublishedSchema => {
  const text = `${JSON.stringify(schema, null, 2)}\n`;
  return { text, etag: `"${createHash('sha256').update(text).digest('hex')}"` };
};

const made = new Map<string, PublishedSchema>();
const MAKERS: Readonly<Record<string, () => unknown>> = {
  'counterfoil-claim/1': () => claimSheetJsonSchema(catalogue),
  'counterfoil-result/1': resultJsonSchema,
  'counterfoil-record/1': recordJsonSchema,
};

export function findPublishedSchema(name: string): PublishedSchema | undefined {
  const maker = Object.hasOwn(MAKERS, name) ? MAKERS[name] : undefined;
  if (maker && !made.has(name)) made.set(name, publish(maker()));
  return made.get(name);
}
