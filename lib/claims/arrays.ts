import type { ArrayLayout, ArrayPart } from '@/lib/engine/contract/array-layout';
import type { Column } from '@/lib/engine/contract/layout';
import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Problem } from '@/lib/kernel/problem';
import { layoutProblems, modeFaults, waveformColumns } from './columns';
import { describe, pointer } from './pointer';
import type { RawWaveform } from './sheet-schema';

export interface ArrayWords {
  readonly arrays: ArrayLayout;
  readonly columns: Column[];
}

type Path = readonly PropertyKey[];
type Format = ArrayLayout['format'];
const refused = (where: string, value: unknown, expected: string, hint?: string): Problem => ({ code: 'claims/not-allowed', where, saw: describe(value), expected, ...(hint ? { hint } : {}) });
const axisName = (raw: RawWaveform): 't' | 'f' => (raw.domain === 'frequency' ? 'f' : 't');

/** What `datasets`, `time` and `columns` say of a file of arrays. */
export function arrayWords(raw: RawWaveform, format: Format, leastL: number, path: Path, problems: Problem[]): ArrayWords {
  if (format === 'npy') return { arrays: { format, parts: [], time: evenOnly(raw, path, problems) }, columns: arrayColumns(raw, leastL, path, problems) };
  if (raw.files !== undefined) problems.push(refused(pointer(...path, 'files'), raw.files, 'one "file", whose "datasets" name its modes'));
  const given = raw.datasets ?? (format === 'npz' ? { data: 'data', modes: 'modes' } : {});
  const time = raw.time ?? (format === 'npz' && raw.datasets === undefined ? 't' : null);
  const parts = Object.entries(given).map(([key, at]) => partOf(key, at, leastL, path, problems));
  if (parts.length === 0) problems.push({ code: 'claims/missing', where: pointer(...path, 'datasets'), saw: 'nothing', expected: 'the datasets of the file, such as {"2,2": "/l2_m2"}' });
  problems.push(...mixProblems(raw, parts, path), ...repeated(parts, path));
  const named = parts.some(({ role }) => role.kind === 'column');
  const columns = named ? namedColumns(raw, parts, leastL, path, problems) : modeColumns(raw, leastL, path, problems);
  return { arrays: { format, parts, time }, columns };
}

/** One array has no dataset to take times from. */
function evenOnly(raw: RawWaveform, path: Path, problems: Problem[]): ArrayLayout['time'] {
  if (raw.datasets !== undefined) problems.push(refused(pointer(...path, 'datasets'), raw.datasets, 'no dataset paths for an .npy, which is one array'));
  if (typeof raw.time === 'string') problems.push(refused(pointer(...path, 'time'), raw.time, 'times in a column of the array, or even steps such as {"start": 0, "step": 0.1}'));
  return typeof raw.time === 'object' ? raw.time : null;
}

function partOf(key: string, at: string, leastL: number, path: Path, problems: Problem[]): ArrayPart {
  const where = pointer(...path, 'datasets', key);
  if (at === '' || at.length > 500 || /[\u0000-\u001f]/.test(at)) problems.push(refused(where, at, 'the path of a dataset, of at most 500 characters'));
  const mode = modeOf(key);
  if (mode) problems.push(...modeFaults(mode, key, leastL, where));
  if (mode) return { role: { kind: 'mode', mode }, path: at };
  return { role: key === 'data' || key === 'modes' ? { kind: key } : { kind: 'column', name: key }, path: at };
}

function modeOf(key: string): ModeIndex | null {
  const found = /^\s*(\d{1,2})\s*,\s*(-?\d{1,2})\s*$/.exec(key);
  return found ? [Number(found[1]), Number(found[2]) + 0] : null;
}

function mixProblems(raw: RawWaveform, parts: readonly ArrayPart[], path: Path): Problem[] {
  const where = pointer(...path, 'datasets');
  const kinds = new Set(parts.map(({ role }) => (role.kind === 'modes' ? 'data' : role.kind)));
  const problems: Problem[] = [];
  if (kinds.size > 1) problems.push(refused(where, Object.keys(raw.datasets ?? {}), 'datasets of one kind: modes such as "2,2", or "data" with "modes", or columns such as "plus" and "re22"'));
  if (parts.some(({ role }) => role.kind === 'modes') && !parts.some(({ role }) => role.kind === 'data')) problems.push(refused(where, Object.keys(raw.datasets ?? {}), '"data" beside "modes"'));
  if (raw.mode !== undefined && !kinds.has('column')) problems.push(refused(pointer(...path, 'mode'), raw.mode, 'no "mode" beside datasets that name theirs'));
  return problems;
}

function repeated(parts: readonly ArrayPart[], path: Path): Problem[] {
  const modes = parts.flatMap(({ role }) => (role.kind === 'mode' ? [String(role.mode)] : []));
  return [...new Set(modes.filter((mode, i) => modes.indexOf(mode) !== i))].map((mode) => ({ code: 'claims/mode', where: pointer(...path, 'datasets'), saw: `the mode ${mode} twice`, expected: 'each mode once' }));
}

function namedColumns(raw: RawWaveform, parts: readonly ArrayPart[], leastL: number, path: Path, problems: Problem[]): Column[] {
  if (raw.columns !== undefined) problems.push(refused(pointer(...path, 'columns'), raw.columns, 'no "columns" beside datasets that are columns themselves'));
  const names = parts.flatMap(({ role }) => (role.kind === 'column' ? [role.name] : []));
  return judged([axisName(raw), ...names], raw, leastL, [...path, 'datasets'], problems);
}

/** What stands in an N×K dataset of one mode: times, re, im unless the sheet says otherwise. */
function modeColumns(raw: RawWaveform, leastL: number, path: Path, problems: Problem[]): Column[] {
  const columns = judged(raw.columns ?? [axisName(raw), 're', 'im'], raw, leastL, [...path, 'columns'], problems);
  if (raw.variable === 'luminosity') problems.push(refused(pointer(...path, 'datasets'), Object.keys(raw.datasets ?? {}), '{"L": "/path"} for a luminosity'));
  else if (columns.some(({ role }) => role.kind === 'plus' || ('mode' in role && role.mode !== null))) problems.push(refused(pointer(...path, 'columns'), raw.columns, '"re im" or "amplitude phase" without a mode, as "datasets" name it'));
  return columns;
}

function arrayColumns(raw: RawWaveform, leastL: number, path: Path, problems: Problem[]): Column[] {
  const columns = judged(raw.columns ?? [axisName(raw), 're', 'im'], raw, leastL, [...path, 'columns'], problems);
  const named = columns.some(({ role }) => 'mode' in role && role.mode !== null);
  const sighted = columns.some(({ role }) => role.kind === 'plus' || role.kind === 'luminosity');
  if (raw.files !== undefined && (named || sighted)) problems.push(refused(pointer(...path, 'columns'), raw.columns, '"re im" or "amplitude phase" without a mode, as "files" name it'));
  if (raw.mode !== undefined && (named || sighted)) problems.push(refused(pointer(...path, 'mode'), raw.mode, named ? 'no "mode" beside columns that name theirs' : 'no "mode" for columns without modes'));
  return columns;
}

function judged(names: readonly string[], raw: RawWaveform, leastL: number, at: Path, problems: Problem[]): Column[] {
  const before = problems.length;
  const columns = waveformColumns(names, raw.domain ?? 'time', leastL, at, problems);
  if (raw.mode !== undefined) problems.push(...modeFaults(raw.mode, `mode ${raw.mode.join(', ')}`, leastL, pointer(...at)));
  if (problems.length === before) problems.push(...layoutProblems(columns, axisName(raw), raw.variable === 'luminosity', at));
  if (raw.domain === 'frequency' && columns.some(({ role }) => role.kind === 'plus')) problems.push(refused(pointer(...at), names, '"re im" or "amplitude phase", since a transform is complex'));
  return columns;
}
