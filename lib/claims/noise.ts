import type { NoiseDeclaration } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { checkPart } from './check-part';
import { noiseColumns } from './columns';
import { pathProblem } from './file-path';
import { didYouMean } from './nearest-name';
import { describe, pointer } from './pointer';
import { noiseSchema } from './sheet-schema';
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
    for (const field of ['columns', 'sided'] as const)
      if (raw[field] !== undefined) problems.push({ code: 'claims/not-allowed', where: pointer(...path, field), saw: describe(raw[field]), expected: `no "${field}" for a built-in curve` });
    return problems.length > before ? null : { kind: 'built-in', name, curve: raw.curve };
  }
  const file = raw.file ?? '';
  const fault = pathProblem(file, pointer(...path, 'file'));
  if (fault) problems.push(fault);
  const format = formatByEnding(file);
  if (format !== 'text' && format !== 'npy') problems.push({ code: 'claims/not-allowed', where: pointer(...path, 'file'), saw: `a file in the format ${format}`, expected: 'a curve as text or as an .npy of N×2 numbers', hint: 'Export the curve as text.' });
  if (raw.columns === undefined) problems.push({ code: 'claims/missing', where: pointer(...path, 'columns'), saw: 'nothing', expected: 'the columns of the text file, such as ["f", "asd"]' });
  const columns = noiseColumns(raw.columns ?? ['f', 'asd'], [...path, 'columns'], problems);
  return problems.length > before ? null : { kind: 'table', name, file, format: format === 'npy' ? 'npy' : 'text', columns, sided: raw.sided ?? 'one' };
}
