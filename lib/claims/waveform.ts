import type { ArrayLayout } from '@/lib/engine/contract/array-layout';
import type { Column, RunFacts, SourceFile, WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Problem } from '@/lib/kernel/problem';
import { arrayWords } from './arrays';
import { checkPart, notRefused, soundEntries } from './check-part';
import { layoutProblems, modeFaults, waveformColumns } from './columns';
import { pathProblem } from './file-path';
import { describe, pointer } from './pointer';
import { waveformSchema, type RawWaveform } from './sheet-schema';

const known = Object.keys(waveformSchema.shape);
const missing = (where: string, expected: string, hint?: string): Problem => ({ code: 'claims/missing', where, saw: 'nothing', expected, ...(hint ? { hint } : {}) });
const refused = (where: string, value: unknown, expected: string, hint?: string): Problem => ({ code: 'claims/not-allowed', where, saw: describe(value), expected, ...(hint ? { hint } : {}) });

/** One entry of `waveforms`: what the hall needs to read its files, or null beside the problems. */
export function parseWaveform(name: string, value: unknown, problems: Problem[]): WaveformDeclaration | null {
  const path = ['waveforms', name];
  const whole = checkPart(waveformSchema, value, path, known, problems);
  const raw: RawWaveform | null = whole ?? soundEntries(waveformSchema, value);
  if (raw === null) return null;
  const found = [...kindProblems(raw, path), ...unitProblems(raw, path)];
  const files = filesOf(raw, path, found);
  const format = formatOf(raw);
  const { columns, arrays } = format === 'text' ? { columns: columnsOf(raw, path, found), arrays: null } : arrayWords(raw, format, leastL(raw), path, found);
  problems.push(...(whole === null ? notRefused(found, value as object, path, known) : found));
  return whole === null || found.length > 0 ? null : declarationOf(name, raw, files, columns, arrays);
}

function declarationOf(name: string, raw: RawWaveform, files: SourceFile[], columns: Column[], arrays: ArrayLayout | null): WaveformDeclaration {
  const domain = raw.domain ?? 'time';
  const named = columns.some(({ role }) => 'mode' in role && role.mode !== null) || files.some(({ mode }) => mode !== null) || raw.mode !== undefined || (arrays?.parts ?? []).some(({ role }) => role.kind === 'mode' || role.kind === 'data');
  return {
    name,
    files,
    columns,
    arrays,
    domain,
    variable: raw.variable ?? 'strain',
    timeUnit: raw.timeUnit ?? (domain === 'time' ? 'M' : '1/M'),
    amplitudeUnit: raw.amplitudeUnit ?? (raw.variable === 'phi2' ? 'geometric' : 'rh/M'),
    polarisation: raw.polarisation ?? 'plus-minus-i-cross',
    // φ₂ has no mirror rule: its modes are those that are given, whatever the sheet says.
    negativeM: raw.variable === 'phi2' ? 'given' : (raw.negativeM ?? null),
    psi4Factor: raw.psi4Factor ?? 1,
    mode: raw.mode ?? [2, 2],
    modeAssumed: !named,
    totalMassMsun: raw.totalMassMsun ?? null,
    distanceMpc: raw.distanceMpc ?? null,
    junkEndM: raw.junkEndM ?? null,
    binary: present(raw.binary ?? {}),
    run: runOf(raw),
  };
}

const runOf = ({ series, resolution, extractionRadiusM, radiusType, timeLabel, tetrad }: RawWaveform): RunFacts => present({ series, resolution, extractionRadiusM, radiusType, timeLabel, tetrad });

/** Without the `undefined` entries that zod's optional fields may carry. */
const present = <T extends object>(facts: T): { [K in keyof T]?: NonNullable<T[K]> } => Object.fromEntries(Object.entries(facts).filter(([, fact]) => fact !== undefined)) as { [K in keyof T]?: NonNullable<T[K]> };

const formatOf = (raw: RawWaveform): 'text' | 'npy' | 'npz' | 'hdf5' => raw.format ?? formatByEnding(raw.file ?? Object.values(raw.files ?? {})[0] ?? '');

function kindProblems(raw: RawWaveform, path: readonly string[]): Problem[] {
  if (raw.format === undefined) {
    const kinds = [...new Set(Object.values(raw.files ?? {}).map(formatByEnding))];
    if (kinds.length > 1) return [refused(pointer(...path, 'files'), raw.files, 'files of one format, by their endings or by "format"')];
  }
  if (formatOf(raw) !== 'text' || (raw.datasets === undefined && raw.time === undefined)) return [];
  return [refused(pointer(...path, raw.datasets ? 'datasets' : 'time'), raw.datasets ?? raw.time, 'no dataset paths for a text file', 'If the file is of another format than its ending says, name it under "format".')];
}

export function formatByEnding(file: string): 'text' | 'npy' | 'npz' | 'hdf5' {
  const ending = /\.([A-Za-z0-9]+)$/.exec(file)?.[1]?.toLowerCase();
  if (ending === 'npy' || ending === 'npz') return ending;
  return ending === 'h5' || ending === 'hdf5' || ending === 'hdf' ? 'hdf5' : 'text';
}

/** Strain in rh/M against seconds: the file's own mass turns its times into M. */
const stretchedByMass = ({ timeUnit, variable = 'strain', totalMassMsun }: RawWaveform): boolean => timeUnit === 's' && variable === 'strain' && totalMassMsun !== undefined;

function unitProblems(raw: RawWaveform, path: readonly string[]): Problem[] {
  const problems: Problem[] = [];
  const domain = raw.domain ?? 'time';
  const units = domain === 'time' ? ['M', 's'] : ['1/M', 'Hz'];
  if (raw.timeUnit !== undefined && !units.includes(raw.timeUnit)) return [refused(pointer(...path, 'timeUnit'), raw.timeUnit, `"${units[0]}" or "${units[1]}" for domain "${domain}"`)];
  const physicalTime = raw.timeUnit === 's' || raw.timeUnit === 'Hz';
  // A word that only restates the house default says nothing wrong.
  if (raw.tetrad !== undefined && raw.tetrad !== 'symmetric' && raw.variable !== 'phi2') problems.push(refused(pointer(...path, 'tetrad'), raw.tetrad, 'it only beside variable "phi2"'));
  if (raw.psi4Factor !== undefined && raw.psi4Factor !== 1 && raw.variable !== 'psi4') problems.push(refused(pointer(...path, 'psi4Factor'), raw.psi4Factor, 'it only beside variable "psi4"'));
  if (raw.variable === 'luminosity') return [...problems, ...luminosityProblems(raw, path)];
  if (raw.variable === 'phi2') return [...problems, ...phi2Problems(raw, path)];
  const amplitude = raw.amplitudeUnit ?? 'rh/M';
  if (amplitude === 'geometric' || amplitude === 'perField') problems.push(refused(pointer(...path, 'amplitudeUnit'), amplitude, '"rh/M" or "strain"', 'These units are for φ₂.'));
  else if (physicalTime !== (amplitude === 'strain') && !stretchedByMass(raw))
    problems.push(
      refused(
        pointer(...path, 'amplitudeUnit'), raw.amplitudeUnit ?? '"rh/M", the house default', physicalTime ? `"strain" with times in "${raw.timeUnit}"` : '"rh/M" with times in M',
        'Either both axis and amplitude are physical (s and strain; news in 1/s, ψ₄ in 1/s²) or both are in units of M. Strain modes in rh/M against seconds are read where totalMassMsun beside them says how long an M is.',
      ),
    );
  return problems;
}

function luminosityProblems(raw: RawWaveform, path: readonly string[]): Problem[] {
  const alien = (['amplitudeUnit', 'polarisation', 'negativeM', 'mode'] as const).filter((name) => raw[name] !== undefined);
  return [
    ...alien.map((name) => refused(pointer(...path, name), raw[name], 'it not beside a luminosity, which is in erg/s and has no modes')),
    ...(raw.domain === 'frequency' ? [refused(pointer(...path, 'domain'), raw.domain, '"time" for a luminosity')] : []),
  ];
}

function phi2Problems(raw: RawWaveform, path: readonly string[]): Problem[] {
  const problems: Problem[] = [];
  if (raw.domain === 'frequency') problems.push(refused(pointer(...path, 'domain'), raw.domain, '"time" for φ₂'));
  if (raw.timeUnit !== undefined && raw.timeUnit !== 'M') problems.push(refused(pointer(...path, 'timeUnit'), raw.timeUnit, '"M" for φ₂'));
  if (raw.amplitudeUnit === 'rh/M' || raw.amplitudeUnit === 'strain') problems.push(refused(pointer(...path, 'amplitudeUnit'), raw.amplitudeUnit, '"geometric" or "perField" for φ₂'));
  return problems;
}

/** Spin weight −1 begins at l = 1, −2 at l = 2. */
const leastL = (raw: RawWaveform): number => (raw.variable === 'phi2' ? 1 : 2);

function filesOf(raw: RawWaveform, path: readonly string[], problems: Problem[]): SourceFile[] {
  if ((raw.file === undefined) === (raw.files === undefined)) {
    problems.push(raw.file === undefined ? missing(pointer(...path, 'file'), '"file", or "files" for one file a mode') : refused(pointer(...path, 'files'), raw.files, 'either "file" or "files", not both'));
    return [];
  }
  if (raw.file !== undefined) {
    const fault = pathProblem(raw.file, pointer(...path, 'file'));
    if (fault) problems.push(fault);
    return [{ file: raw.file, mode: null }];
  }
  return filesByMode(raw, path, problems);
}

function filesByMode(raw: RawWaveform, path: readonly string[], problems: Problem[]): SourceFile[] {
  const files: SourceFile[] = [];
  const seen = new Set<string>();
  const entries = Object.entries(raw.files ?? {});
  if (entries.length === 0) problems.push(missing(pointer(...path, 'files'), 'at least one file, such as {"2,2": "l2_m2.txt"}'));
  if (raw.mode !== undefined) problems.push(refused(pointer(...path, 'mode'), raw.mode, 'no "mode" beside "files", which name theirs'));
  for (const [key, file] of entries) {
    const where = pointer(...path, 'files', key);
    const fault = pathProblem(file, where);
    if (fault) problems.push(fault);
    const found = /^\s*(\d{1,2})\s*,\s*(-?\d{1,2})\s*$/.exec(key);
    if (!found) {
      problems.push({ code: 'claims/mode', where, saw: describe(key), expected: 'a mode such as "2,2" or "2,-1"' });
      continue;
    }
    const mode: ModeIndex = [Number(found[1]), Number(found[2]) + 0];
    problems.push(...modeFaults(mode, key, leastL(raw), where));
    if (seen.has(String(mode))) problems.push({ code: 'claims/mode', where, saw: `the mode ${String(mode)} twice`, expected: 'each mode once' });
    seen.add(String(mode));
    files.push({ file, mode });
  }
  return files;
}

function columnsOf(raw: RawWaveform, path: readonly string[], problems: Problem[]): Column[] {
  if (raw.columns === undefined) {
    problems.push(missing(pointer(...path, 'columns'), 'the columns of the text file, such as ["t", "re22", "im22"]'));
    return [];
  }
  const at = [...path, 'columns'];
  const domain = raw.domain ?? 'time';
  const before = problems.length;
  const columns = waveformColumns(raw.columns, domain, leastL(raw), at, problems);
  if (raw.mode !== undefined) problems.push(...modeFaults(raw.mode, `mode ${raw.mode.join(', ')}`, leastL(raw), pointer(...path, 'mode')));
  if (problems.length > before) return columns;
  problems.push(...layoutProblems(columns, domain === 'time' ? 't' : 'f', raw.variable === 'luminosity', at));
  const named = columns.some(({ role }) => 'mode' in role && role.mode !== null);
  const polarised = columns.some(({ role }) => role.kind === 'plus');
  if (raw.files !== undefined && (named || polarised || raw.variable === 'luminosity')) problems.push(refused(pointer(...at), raw.columns, '"re im" or "amplitude phase" without a mode, as "files" name it'));
  if (raw.mode !== undefined && (named || polarised)) problems.push(refused(pointer(...path, 'mode'), raw.mode, named ? 'no "mode" beside columns that name theirs' : 'no "mode" for plus and cross columns'));
  if (domain === 'frequency' && polarised) problems.push(refused(pointer(...at), raw.columns, '"re im" or "amplitude phase", since a transform is complex'));
  return columns;
}
