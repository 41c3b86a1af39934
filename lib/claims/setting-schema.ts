import { z } from 'zod';
import type { SettingRow, SettingShape } from '@/lib/engine/quantities/settings-table';
import type { SweptValue } from '@/lib/kernel/place';

/** Schema of one setting, from its row of the settings table; the message is what was expected. */
export function settingSchema(row: SettingRow): z.ZodType {
  return shapeSchema(row.shape, expectation(row));
}

const unitAfter = (row: SettingRow): string => (row.unit === '' ? '' : ` ${row.unit}`);
const quoted = (option: string | boolean): string => (typeof option === 'string' ? `"${option}"` : String(option));

/** Schema of one value of a sweep: the setting itself, or the one number of a place that may be swept. */
export function sweptSchema(row: SettingRow): z.ZodType {
  const { shape } = row;
  if (shape.kind !== 'place' || shape.swept === undefined) return settingSchema(row);
  const number = shape.numbers.find(({ name }) => name === shape.swept) ?? {};
  return z.strictObject({ [shape.swept]: bounded(number, sweptExpectation(row)) }, { error: sweptExpectation(row) });
}

/** What a sweep over the setting takes, in words. */
export const sweptExpectation = (row: SettingRow): string => (row.shape.kind === 'place' && row.shape.swept !== undefined ? `{"${row.shape.swept}": number} in each entry` : `in each entry ${expectation(row)}`);

/** What a sweep goes over: a number, the word of a setting that has words, or the one number of a place; null where there is none of them. */
export function sweptValue({ shape }: SettingRow, value: unknown): SweptValue | null {
  const inner = shape.kind === 'place' && shape.swept !== undefined && typeof value === 'object' && value !== null ? (value as Readonly<Record<string, unknown>>)[shape.swept] : value;
  return typeof inner === 'number' || typeof inner === 'string' ? inner : null;
}

/** What the setting takes, in words. */
export function expectation(row: SettingRow): string {
  const { shape } = row;
  switch (shape.kind) {
    case 'number':
      return `a number${rangeWords(shape)}${unitAfter(row)}`;
    case 'integer':
      return `a whole number from ${shape.min} to ${shape.max}`;
    case 'choice':
      return `one of ${shape.options.map(quoted).join(', ')}`;
    case 'subset':
      return `a list of ${shape.options.map(quoted).join(', ')}, each at most once`;
    case 'interval':
      return `two numbers [from, to] with from < to${rangeWords(shape)}${unitAfter(row)}`;
    case 'modes':
      return '"all" or a list of modes such as [[2, 2], [2, -2]], each once';
    case 'response':
      return '"plus", "cross", "complex" or {"plus": number, "cross": number}';
    case 'taper':
      return `"auto", "none" or a number from ${shape.min} to ${shape.max}`;
    case 'cosmology':
      return '{"h0": 20 to 150, "omegaM": 0 to 1}';
    case 'place':
      return `one of ${shape.options.map(quoted).join(', ')}, or ${[...shape.numbers.map((number) => `{"${number.name}": number${rangeWords(number)}}`), ...(shape.flags ?? []).map((flag) => `{"${flag}": true}`)].join(' or ')}`;
  }
}

function rangeWords(shape: { min?: number; max?: number; above?: number }): string {
  const max = shape.max === undefined ? '' : ` to ${tidy(shape.max)}`;
  if (shape.above !== undefined) return ` above ${shape.above}${shape.max === undefined ? '' : `, at most ${tidy(shape.max)}`}`;
  return shape.min === undefined ? '' : ` from ${tidy(shape.min)}${max}`;
}

/** Every double beyond 10¹⁶ is a whole multiple of π to the last bit: only small ones are meant as such. */
const isTurns = (x: number): boolean => x !== 0 && Math.abs(x) < 100 && Number.isInteger(x / Math.PI);
const tidy = (x: number): string => (isTurns(x) ? `${x / Math.PI === 1 ? '' : x / Math.PI === -1 ? '−' : String(x / Math.PI).replace('-', '−')}π` : Math.abs(x) < 1e15 ? String(x) : x.toExponential().replace('e+', 'e'));

function bounded(shape: { min?: number; max?: number; above?: number }, error: string): z.ZodNumber {
  let schema = z.number({ error });
  // A printed π has a finite number of digits; the last one may round upwards.
  if (shape.min !== undefined) schema = schema.min(shape.min - Math.abs(shape.min) * 1e-9, { error });
  if (shape.max !== undefined) schema = schema.max(shape.max + Math.abs(shape.max) * 1e-9, { error });
  if (shape.above !== undefined) schema = schema.gt(shape.above, { error });
  return schema;
}

const literals = (options: readonly (string | boolean)[], error: string) => z.literal([...options], { error });

function shapeSchema(shape: SettingShape, error: string): z.ZodType {
  switch (shape.kind) {
    case 'number':
      return bounded(shape, error);
    case 'integer':
      return z.int({ error }).min(shape.min, { error }).max(shape.max, { error });
    case 'choice':
      return literals(shape.options, error);
    case 'subset':
      return z.array(literals(shape.options, error), { error }).refine((list) => new Set(list).size === list.length, { error });
    case 'interval':
      return z.tuple([bounded(shape, error), bounded(shape, error)], { error }).refine(([from, to]) => from < to, { error });
    case 'modes':
      return z.union([z.literal('all'), modeList(error)], { error });
    case 'response':
      return z.union([z.literal(['plus', 'cross', 'complex']), z.strictObject({ plus: z.number(), cross: z.number() })], { error });
    case 'taper':
      return z.union([z.literal(['auto', 'none']), bounded(shape, error)], { error });
    case 'cosmology':
      return z.strictObject({ h0: z.number().min(20).max(150), omegaM: z.number().min(0).max(1) }, { error });
    case 'place':
      return z.union([literals(shape.options, error), ...shape.numbers.map((number) => z.strictObject({ [number.name]: bounded(number, error) }, { error })), ...(shape.flags ?? []).map((flag) => z.strictObject({ [flag]: z.literal(true, { error }) }, { error }))], { error });
  }
}

function modeList(error: string): z.ZodType {
  const mode = z.tuple([z.int({ error }), z.int({ error })], { error }).refine(([l, m]) => l >= 0 && l <= 99 && Math.abs(m) <= l, { error });
  return z.array(mode, { error }).min(1, { error }).refine((list) => new Set(list.map(String)).size === list.length, { error });
}
