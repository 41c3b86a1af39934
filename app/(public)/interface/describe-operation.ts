import { z } from 'zod';
import { operationIdOf } from '@/lib/http/openapi-document';
import type { Operation } from '@/lib/http/operation';
import { scopesOfDoor } from '@/lib/http/token-scope';

/** One field of what a call takes or gives, as the page prints it. */
export interface FieldLine {
  readonly name: string;
  readonly type: string;
  readonly needed: boolean;
  readonly note: string;
}

export interface OperationLine {
  readonly id: string;
  readonly door: string;
  readonly summary: string;
  readonly scope: string;
  readonly status: number;
  readonly query: readonly FieldLine[];
  readonly body: readonly FieldLine[];
  readonly upload: 'folder' | 'bytes' | null;
  readonly answer: readonly FieldLine[];
  /** What an answer is that has no fields. */
  readonly answerWord: string;
}

type JsonSchema = Readonly<Record<string, unknown>>;

export function describeOperation(operation: Operation<unknown, unknown, unknown>): OperationLine {
  const { door, summary = '', status = 200, query, body, answer, media } = operation;
  return {
    id: operationIdOf(door),
    door,
    summary,
    scope: scopeWord(door),
    status,
    query: query ? fieldsOf(query, 'input') : [],
    body: body && typeof body !== 'string' ? fieldsOf(body, 'input') : [],
    upload: body === 'stream' ? 'folder' : body === 'bytes' ? 'bytes' : null,
    answer: answer ? fieldsOf(answer, 'output') : [],
    answerWord: media ?? wordOf(answer ? toSchema(answer, 'output') : {}),
  };
}

function scopeWord(door: Operation<unknown, unknown, unknown>['door']): string {
  const scopes = scopesOfDoor(door);
  if (scopes === null) return 'none';
  return scopes.length === 0 ? 'session only' : scopes.join(' or ');
}

const toSchema = (schema: z.ZodType, io: 'input' | 'output'): JsonSchema => z.toJSONSchema(schema, { io, unrepresentable: 'any' }) as JsonSchema;

/** Fields of an object, or of each of several forms; a schema named for the document is followed one step. */
function fieldsOf(schema: z.ZodType, io: 'input' | 'output'): readonly FieldLine[] {
  const whole = toSchema(schema, io);
  const defs = (whole['$defs'] ?? {}) as Readonly<Record<string, JsonSchema>>;
  const resolve = (part: JsonSchema): JsonSchema => (typeof part['$ref'] === 'string' ? (defs[part['$ref'].replace('#/$defs/', '')] ?? {}) : part);
  const forms = formsOf(resolve(whole), resolve);
  const lines = new Map<string, FieldLine>();
  for (const form of forms) {
    const required = new Set(forms.length === 1 ? ((form['required'] ?? []) as string[]) : []);
    for (const [name, part] of Object.entries((form['properties'] ?? {}) as Readonly<Record<string, JsonSchema>>))
      if (!lines.has(name)) lines.set(name, { name, type: wordOf(part), needed: required.has(name), note: String(part['description'] ?? resolve(part)['description'] ?? '') });
  }
  return [...lines.values()];
}

function formsOf(schema: JsonSchema, resolve: (part: JsonSchema) => JsonSchema): readonly JsonSchema[] {
  const several = (schema['anyOf'] ?? schema['oneOf']) as readonly JsonSchema[] | undefined;
  if (several) return several.flatMap((part) => formsOf(resolve(part), resolve));
  const items = schema['items'] as JsonSchema | undefined;
  return items ? formsOf(resolve(items), resolve) : [schema];
}

/** `string`, `list of Thread`, `"a" or "b"`: what fits in a cell. */
function wordOf(part: JsonSchema): string {
  if (typeof part['$ref'] === 'string') return part['$ref'].replace('#/$defs/', '').replace(/^__schema\d+$/, 'object');
  const several = (part['anyOf'] ?? part['oneOf']) as readonly JsonSchema[] | undefined;
  if (several) return [...new Set(several.map(wordOf))].join(' or ');
  if (Array.isArray(part['enum'])) return part['enum'].map((word) => JSON.stringify(word)).join(' or ');
  if ('const' in part) return JSON.stringify(part['const']);
  if (part['type'] === 'array') return `list of ${wordOf((part['items'] ?? {}) as JsonSchema)}`;
  return typeof part['type'] === 'string' ? part['type'] : 'any';
}
