import type { z } from 'zod';
import type { Problem } from '@/lib/kernel/problem';
import { describe, pointer } from '@/lib/claims/pointer';
import { findUnkeepable } from '@/lib/kernel/plain-text';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { DoorError } from './problem-response';

/** Sheets and statements are small; files come by another way, as streams. */
export const MAX_JSON_BYTES = 1024 * 1024;

export function parseInput<T>(schema: z.ZodType<T>, raw: unknown): Result<T, DoorError> {
  // Before any schema, for what text columns cannot keep is bad input wherever it stands.
  const unkeepable = findUnkeepable(raw);
  if (unkeepable) return err({ code: 'invalid', sentence: 'The input holds something that cannot be kept.', problems: [{ code: 'http/bad-text', ...unkeepable, expected: 'text of whole characters, without U+0000' }] });
  const parsed = schema.safeParse(raw);
  if (parsed.success) return ok(parsed.data);
  const problems = parsed.error.issues.map((issue) => asProblem(issue, raw));
  return err({ code: 'invalid', sentence: problems.length === 1 ? 'One field is not as expected.' : `${problems.length} fields are not as expected.`, problems });
}

/** `where` is a JSON Pointer into the body, or names the parameter of the address. */
function asProblem(issue: z.core.$ZodIssue, raw: unknown): Problem {
  const where = pointer(...issue.path);
  if (issue.code === 'unrecognized_keys') return { code: 'http/unknown-field', where, saw: issue.keys.join(', '), expected: 'no field of that name' };
  return { code: `http/${issue.code.replaceAll('_', '-')}`, where, saw: seen(raw, issue.path), expected: issue.message };
}

/** What stood there, but for what nobody else should read over a shoulder. */
function seen(raw: unknown, path: readonly PropertyKey[]): string {
  if (path.some((part) => /password|secret|token|code/i.test(String(part)))) return 'what was sent';
  return describe(path.reduce<unknown>((value, part) => (typeof value === 'object' && value !== null ? (value as Record<PropertyKey, unknown>)[part] : undefined), raw));
}

/** Reads a JSON body within its limit; an absent body is `undefined`, which a schema may allow. */
export async function readJson(request: Request): Promise<Result<unknown, DoorError>> {
  const text = await readText(request);
  if (!text.ok) return text;
  if (text.value === '') return ok(undefined);
  const type = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase();
  if (type !== 'application/json') return err({ code: 'unsupported-media', sentence: `The body is ${type ?? 'of no declared type'}; expected application/json.` });
  try {
    return ok(JSON.parse(text.value) as unknown);
  } catch {
    return err({ code: 'invalid', sentence: 'The body is not JSON.' });
  }
}

async function readText(request: Request): Promise<Result<string, DoorError>> {
  if (!request.body) return ok('');
  const chunks: Uint8Array[] = [];
  let bytes = 0;
  for await (const chunk of request.body as unknown as AsyncIterable<Uint8Array>) {
    bytes += chunk.byteLength;
    if (bytes > MAX_JSON_BYTES) return err({ code: 'too-large', sentence: `The body is longer than ${MAX_JSON_BYTES} bytes. Send files as files.` });
    chunks.push(chunk);
  }
  return ok(Buffer.concat(chunks).toString('utf8'));
}
