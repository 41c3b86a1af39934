import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { openApiDocument } from '@/lib/http/openapi-document';

/**
 * The parts of OpenAPI 3.1 that the document uses, as strict shapes: no package that holds the official
 * schema is among the pinned ones, so what is checked here is structure, references and JSON Schema dialect.
 */
const description = z.string().min(1);
const schemaTypes = ['string', 'number', 'integer', 'boolean', 'object', 'array', 'null'] as const;
const schema: z.ZodType = z.lazy(() =>
  z.union([
    z.boolean(),
    z.strictObject({
      $ref: z.string().startsWith('#/components/schemas/').optional(), type: z.union([z.enum(schemaTypes), z.array(z.enum(schemaTypes)).min(1)]).optional(), description: z.string().optional(), title: z.string().optional(),
      properties: z.record(z.string(), schema).optional(), required: z.array(z.string()).optional(), additionalProperties: schema.optional(), propertyNames: schema.optional(),
      items: schema.optional(), prefixItems: z.array(schema).optional(), minItems: z.int().optional(), maxItems: z.int().optional(),
      anyOf: z.array(schema).min(1).optional(), oneOf: z.array(schema).min(1).optional(), allOf: z.array(schema).min(1).optional(), not: schema.optional(),
      enum: z.array(z.unknown()).min(1).optional(), const: z.unknown().optional(), default: z.unknown().optional(), format: z.string().optional(), pattern: z.string().optional(), contentEncoding: z.string().optional(),
      minLength: z.int().optional(), maxLength: z.int().optional(), minimum: z.number().optional(), maximum: z.number().optional(), exclusiveMinimum: z.number().optional(), exclusiveMaximum: z.number().optional(),
      discriminator: z.strictObject({ propertyName: z.string(), mapping: z.record(z.string(), z.string()).optional() }).optional(), id: z.string().optional(),
    }),
  ]),
);
const content = z.record(z.string().regex(/^[a-z]+\/[a-z0-9.+-]+$/), z.strictObject({ schema: schema.optional() }));
const response = z.strictObject({ description, headers: z.record(z.string(), z.strictObject({ description: z.string().optional(), schema })).optional(), content: content.optional() });
const parameter = z.strictObject({ name: z.string(), in: z.enum(['path', 'query', 'header']), required: z.boolean().optional(), description: z.string().optional(), schema });
const operation = z.strictObject({
  operationId: z.string().regex(/^[a-z][A-Za-z0-9]*$/),
  summary: description,
  parameters: z.array(parameter).optional(),
  requestBody: z.strictObject({ required: z.boolean().optional(), content }).optional(),
  responses: z.record(z.string().regex(/^[1-5]\d\d$/), response),
  security: z.array(z.record(z.string(), z.array(z.string()))),
});
const documentShape = z.strictObject({
  openapi: z.string().regex(/^3\.1\.\d+$/),
  info: z.strictObject({ title: description, version: description, description: z.string().optional() }),
  servers: z.array(z.strictObject({ url: z.string() })),
  paths: z.record(z.string().startsWith('/'), z.strictObject({ get: operation.optional(), post: operation.optional(), put: operation.optional(), patch: operation.optional(), delete: operation.optional() })),
  components: z.strictObject({ schemas: z.record(z.string().regex(/^[A-Za-z0-9._-]+$/), schema), securitySchemes: z.record(z.string(), z.looseObject({ type: z.enum(['http', 'apiKey']) })) }),
});
// As it goes over the wire: without what JSON leaves out.
const plain = JSON.parse(JSON.stringify(openApiDocument())) as z.infer<typeof documentShape>;
const operations = Object.entries(plain.paths).flatMap(([path, item]) => Object.entries(item).map(([method, described]) => ({ path, method, described: described as z.infer<typeof operation> })));

describe('the OpenAPI document', () => {
  it('has the structure of version 3.1 in every part it uses', () => {
    const parsed = documentShape.safeParse(plain);
    expect(parsed.success ? [] : parsed.error.issues.slice(0, 5)).toEqual([]);
  });

  it('refers to nothing that is not there, and names nothing that nobody refers to', () => {
    const refs = new Set([...JSON.stringify(plain).matchAll(/"\$ref":"#\/components\/schemas\/([^"]+)"/g)].map(([, name = '']) => name));
    expect([...refs].sort()).toEqual(Object.keys(plain.components.schemas).sort());
  });

  it('declares each place of a path once, as needed, and no other', () => {
    for (const { path, method, described } of operations) {
      const places = [...path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name).sort();
      const declared = (described.parameters ?? []).filter((p) => p.in === 'path');
      expect(declared.map((p) => p.name).sort(), `${method} ${path}`).toEqual(places);
      expect(declared.every((p) => p.required === true)).toBe(true);
    }
  });

  it('gives every operation an id of its own, a success, and problems of RFC 9457', () => {
    expect(new Set(operations.map(({ described }) => described.operationId)).size).toBe(operations.length);
    for (const { path, method, described } of operations) {
      const statuses = Object.keys(described.responses);
      expect(statuses.some((s) => s.startsWith('2')), `${method} ${path}`).toBe(true);
      for (const status of statuses.filter((s) => s >= '400')) expect(Object.keys(described.responses[status]?.content ?? {}), `${method} ${path} ${status}`).toEqual(['application/problem+json']);
      for (const requirement of described.security) for (const scheme of Object.keys(requirement)) expect(Object.keys(plain.components.securitySchemes)).toContain(scheme);
    }
  });

  it('offers the Idempotency-Key at every POST, and If-Match where an edit can be stale', () => {
    for (const { path, method, described } of operations) {
      const headers = (described.parameters ?? []).filter((p) => p.in === 'header').map((p) => p.name);
      expect(headers.includes('Idempotency-Key'), `${method} ${path}`).toBe(method === 'post');
      if (method === 'patch') expect(headers).toContain('If-Match');
    }
  });

  it('forbids no field that an answer may come to have', () => {
    for (const { path, method, described } of operations)
      for (const [status, { content: bodies }] of Object.entries(described.responses)) expect(JSON.stringify(bodies ?? {}), `${method} ${path} ${status}`).not.toContain('"additionalProperties":false');
  });
});
