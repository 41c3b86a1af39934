import type { ArrayLayout } from '@/lib/engine/contract/array-layout';
import type { Column, NoiseDeclaration } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { checkPart } from './check-part';
import { noiseColumns } from './columns';
import { pathProblem } from './file-path';
import { didYouMean } from './nearest-name';
import { describe, pointer } from './pointer';
import { noiseSchema, type RawNoise } from './sheet-schema';
import { formatByEnding } from './waveform';

const known = Object.keys(noiseSchema.shape);

/** One entry of `noise`: an uploaded table or a built-in curve, or null beside the problems. */
export function parseNoise(name: string, value: unknown, curves: readonly string[], problems: Problem[]): NoiseDeclaration | null {
  const path = ['noise', name];
  const raw = checkPart(noiseSchema, value, path, known, problems);
  if (raw === null) return null;
  const before = problems.length;
  if ((raw.file === undefined) === (raw.curve === undefined)) {
    problems.push({ code: raw.file === undefined ? 'claims/missing' : 'claims/not-allowed', where: pointer(...path), saw: raw.file === undefined ? 'neither "file" nor "curve"' : 'both "file" and "curve"', expected: 'either a "file" with its columns or a built-in "curve"' });
    return null;
  }
  if (raw.curve !== undefined) {
    const hint = didYouMean(raw.curve, curves);
    if (!curves.includes(raw.curve)) problems.push({ code: 'claims/unknown-name', where: pointer(...path, 'curve'), saw: `the unknown curve ${describe(raw.curve)}`, expected: `one of ${curves.join(', ')}`, ...(hint ? { hint } : {}) });
    for (const field of ['columns', 'datasets', 'sided'] as const)
      if (raw[field] !== undefined) problems.push({ code: 'claims/not-allowed', where: pointer(...path, field), saw: describe(raw[field]), expected: `no "${field}" for a built-in curve` });
    return problems.length > before ? null : { kind: 'built-in', name, curve: raw.curve };
  }
  const file = raw.file ?? '';
  const fault = pathProblem(file, pointer(...path, 'file'));
  if (fault) problems.push(fault);
  const format = formatByEnding(file);
  const named = raw.columns ?? (raw.datasets && Object.keys(raw.datasets));
  if (named === undefined) problems.push({ code: 'claims/missing', where: pointer(...path, 'columns'), saw: 'nothing', expected: 'the columns of the file, such as ["f", "asd"]' });
  const columns = noiseColumns(named ?? ['f', 'asd'], [...path, raw.columns ? 'columns' : 'datasets'], problems);
  const arrays = arraysOf(raw, format, columns, path, problems);
  return problems.length > before ? null : { kind: 'table', name, file, arrays, columns, sided: raw.sided ?? 'one' };
}

/** One vector a column, under the column's own name unless `datasets` says where; an .npy is one array with all of them. */
function arraysOf({ datasets = {} }: RawNoise, format: ReturnType<typeof formatByEnding>, columns: readonly Column[], path: readonly PropertyKey[], problems: Problem[]): ArrayLayout | null {
  const where = pointer(...path, 'datasets');
  const vectors = format === 'npz' || format === 'hdf5';
  if (!vectors && Object.keys(datasets).length > 0) problems.push({ code: 'claims/not-allowed', where, saw: describe(datasets), expected: `no dataset paths for ${format === 'npy' ? 'an .npy, which is one array' : 'text'}` });
  for (const name of vectors ? Object.keys(datasets) : [])
    if (!columns.some((column) => column.name === name)) problems.push({ code: 'claims/not-allowed', where: pointer(...path, 'datasets', name), saw: describe(name), expected: `one of the columns ${columns.map((column) => column.name).join(', ')}` });
  if (format === 'text') return null;
  if (!vectors) return { format, parts: [], time: null };
  const placed = columns.filter(({ role }) => role.kind !== 'skip').map(({ name, role }) => ({ name, role, at: datasets[name] ?? name }));
  return {
    format,
    parts: placed.filter(({ role }) => role.kind === 'noise').map(({ name, at }) => ({ role: { kind: 'column', name }, path: at })),
    time: placed.find(({ role }) => role.kind === 'axis')?.at ?? null,
  };
}
