import type { Problem } from '@/lib/kernel/problem';
import type { Result } from '@/lib/kernel/result';
import type { ModeIndex } from '@/lib/engine/contract/settings';

/** An array before its numbers are read. A last dimension of two in a three-dimensional real array may stand for re and im. */
export interface ArrayFacts {
  readonly shape: readonly number[];
  readonly complex: boolean;
  /** Decimal digits that its storage keeps; null when exact. */
  readonly digits: number | null;
}

/** Which dimension runs along the samples, which along the series, and which holds re and im beside each other. */
export interface Reading {
  readonly samples: number;
  readonly series: number | null;
  readonly pair: number | null;
}

/** A file of named arrays. Everything is read at most once, and nothing before it is asked for. */
export interface ArraySource {
  readonly file: string;
  readonly facts: (path: string) => Promise<Result<ArrayFacts, Problem[]>>;
  /** One column a series, or two (re, im) for a complex one. */
  readonly read: (path: string, reading: Reading) => Promise<Result<Float64Array[], Problem[]>>;
  /** Modes that an attribute of the dataset lists; null when none does. */
  readonly listedModes: (path: string) => Promise<ModeIndex[] | null>;
}

/** As many samples as a text table may have rows, and as many numbers in all. */
export const arrayLimits = { rows: 2 ** 21, cells: 2 ** 25 };

export const fewerSamples = 'Thin the record to the steps that its highest frequency needs, or cut it before the part that the claims use.';

/** Refused before a byte of it is read: the declared shape alone says it. */
export function sizeProblem(where: string, shape: readonly number[], samples: number): Problem | null {
  const rows = shape[samples] ?? 1;
  const cells = shape.reduce((n, d) => n * d, 1);
  if (rows > arrayLimits.rows) return { code: 'formats/too-many-rows', where, saw: `${rows} samples`, expected: `at most ${arrayLimits.rows} samples a mode`, hint: fewerSamples };
  if (cells > arrayLimits.cells) return { code: 'formats/too-many-rows', where, saw: `${cells} numbers in one array`, expected: `at most ${arrayLimits.cells}`, hint: fewerSamples };
  return null;
}

export const shapeText = (shape: readonly number[], complex = false): string => `${shape.length === 0 ? 'a single number' : shape.join('×')}${complex ? ' complex' : ''}`;

/** The columns a reading makes, as one block: column c of N samples begins at c·N. */
export function columnsFor({ shape, complex }: Pick<ArrayFacts, 'shape' | 'complex'>, reading: Reading): { readonly out: Float64Array; readonly strides: number[]; readonly toImaginary: number; readonly columns: Float64Array[] } {
  const rows = shape[reading.samples] ?? 1;
  const series = reading.series === null ? 1 : (shape[reading.series] ?? 1);
  const each = complex || reading.pair !== null ? 2 : 1;
  const out = new Float64Array(rows * series * each);
  const strides = shape.map((_, d) => (d === reading.samples ? 1 : d === reading.series ? rows * each : d === reading.pair ? rows : 0));
  return { out, strides, toImaginary: rows, columns: Array.from({ length: series * each }, (_, c) => out.subarray(c * rows, (c + 1) * rows)) };
}
