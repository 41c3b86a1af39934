import { z } from 'zod';
import type { Problem } from '@/lib/kernel/problem';
import { didYouMean } from './nearest-name';
import { describe, pointer } from './pointer';

/** One part of the sheet against its schema: the parsed part, or every problem with its place. */
export function checkPart<T>(schema: z.ZodType<T>, value: unknown, base: readonly PropertyKey[], known: readonly string[], problems: Problem[]): T | null {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  for (const issue of parsed.error.issues) problems.push(...issueProblems(issue, value, base, known));
  return null;
}

/** The entries of an object that are sound by themselves: what else is wrong with them can be told beside the entries that are not. */
export function soundEntries<S extends z.core.$ZodLooseShape>(schema: z.ZodObject<S>, value: unknown): Partial<z.infer<z.ZodObject<S>>> | null {
  if (typeof value !== 'object' || value === null || Array.isArray(value)) return null;
  const shape: Readonly<Record<string, z.core.SomeType>> = schema.shape;
  const sound = Object.entries(value).filter(([name, entry]) => Object.hasOwn(shape, name) && z.safeParse(shape[name] as z.ZodType, entry).success);
  return Object.fromEntries(sound) as Partial<z.infer<z.ZodObject<S>>>;
}

/** Problems found beside unsound entries, less those that call missing what is there and was refused, or is there by a misspelt name. */
export function notRefused(problems: readonly Problem[], value: object, base: readonly PropertyKey[], known?: readonly string[]): Problem[] {
  const names = Object.keys(value);
  const misspelt = known !== undefined && names.some((name) => !known.includes(name));
  return problems.filter(({ code, where }) => code !== 'claims/missing' || !(misspelt || names.some((name) => where === pointer(...base, name))));
}

function issueProblems(issue: z.core.$ZodIssue, value: unknown, base: readonly PropertyKey[], known: readonly string[]): Problem[] {
  if (issue.code === 'unrecognized_keys') return issue.keys.map((key) => unknownName(key, [...base, ...issue.path], issue.path.length === 0 ? known : []));
  const seen = issue.path.reduce<unknown>((at, part) => (at as Record<PropertyKey, unknown> | null | undefined)?.[part], value);
  const code = seen === undefined ? 'claims/missing' : issue.code === 'too_small' || issue.code === 'too_big' ? 'claims/out-of-range' : 'claims/not-allowed';
  return [{ code, where: pointer(...base, ...issue.path), saw: describe(seen), expected: issue.message }];
}

export function unknownName(name: string, path: readonly PropertyKey[], known: readonly string[]): Problem {
  const hint = didYouMean(name, known);
  return { code: 'claims/unknown-name', where: pointer(...path, name), saw: `the unknown name ${describe(name)}`, expected: known.length > 0 ? `one of ${known.join(', ')}` : 'only names of the format', ...(hint ? { hint } : {}) };
}
