import { z } from 'zod';

/** What every `counterfoil-record/1` has to have before anything in it is believed. Further fields are allowed: the format may grow. */
const sha256 = z.string().regex(/^[0-9a-f]{64}$/);
const day = z.string().regex(/^\d{4}-\d{2}-\d{2}$/);

const claim = z.looseObject({
  id: z.string(),
  quantity: z.string(),
  unit: z.string(),
  verdict: z.enum(['agrees', 'differs', 'unsettled', 'not-computable', 'routes-disagree']),
  covered: z.boolean(),
  points: z.array(
    z.looseObject({
      at: z.record(z.string(), z.union([z.number(), z.string()])),
      printed: z.string(),
      value: z.number().nullable(),
      expandedUncertainty: z.number().nullable(),
      tolerance: z.number().nullable(),
      verdict: z.string(),
    }),
  ),
});

export const recordSchema = z.looseObject({
  format: z.literal('counterfoil-record/1'),
  domain: z.string(),
  id: z.string(),
  title: z.string(),
  authors: z.array(z.string()),
  orcids: z.array(z.looseObject({ position: z.number().int().positive(), orcid: z.string() })).optional(),
  revision: z.number().int().positive(),
  enteredAt: day,
  decision: z.looseObject({ by: z.string(), role: z.literal('editor'), level: z.union([z.literal(1), z.literal(2), z.literal(3)]), remarks: z.array(z.string()) }),
  engine: z.string(),
  claims: z.array(claim).min(1),
  files: z.array(z.looseObject({ name: z.string(), bytes: z.number().int().nonnegative(), sha256 })),
  resultDigest: sha256,
  cautions: z.array(z.looseObject({ number: z.number().int(), text: z.string() })),
  supersedes: z.string().nullable(),
  keyId: z.string().regex(/^[0-9a-f]{16}$/),
  logIndex: z.number().int().nonnegative().nullable(),
});

export const signatureSchema = z.strictObject({
  format: z.literal('counterfoil-signature/1'),
  keyId: z.string().regex(/^[0-9a-f]{16}$/),
  signature: z.string(),
});

/** Record and signature in one file, as the record page offers it for download. */
export const bundleSchema = z.strictObject({
  format: z.literal('counterfoil-signed-record/1'),
  record: z.record(z.string(), z.unknown()),
  signature: z.record(z.string(), z.unknown()),
});
