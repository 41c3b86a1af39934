import type { Finding } from '@/lib/engine/contract/finding';
import type { ArrayLayout } from '@/lib/engine/contract/array-layout';
import type { WaveformDeclaration } from '@/lib/engine/contract/layout';
import type { LineOfSight, ModeSet, Waveform } from '@/lib/engine/contract/waveform';
import type { Problem } from '@/lib/kernel/problem';
import { collect, err, ok, type Result } from '@/lib/kernel/result';
import { uniformStepOf } from './axis';
import { contentOf, type ModeTable } from './content';
import { gapFindings, type WaveTrace } from './gaps';
import { headerFindings } from './header-findings';
import type { OpenFile } from './open-file';
import { printedDigits } from './printed-digits';
import { readTable } from './read-table';
import { readArrays } from './arrays/read-arrays';
import type { ReadHdf5 } from './hdf5/hdf5-ask';
import { whereRow } from './row-place';
import { monotoneFindings, notFiniteFindings } from './series-findings';
import type { NumberTable } from './text/table';

/** What the hall makes of a waveform's files. `waveform` is null when a finding stops the claim. */
export interface ReadWaveform {
  readonly waveform: Waveform | null;
  readonly findings: readonly Finding[];
  /** What stands in the heads of its files. */
  readonly writing: readonly Writing[];
}

/** One comment of a file. */
export interface Writing {
  readonly file: string;
  readonly text: string;
}

const writingOf = (tables: readonly ModeTable[]): Writing[] =>
  [...new Map(tables.map(({ table }) => [table.file, table.comments ?? []] as const))].flatMap(([file, comments]) => comments.map(({ text }) => ({ file, text })));

/**
 * One waveform of a sheet, from its files to house convention.
 * Shape:  all modes share one axis; files of one mode each must agree on it.
 * Units:  the file's own time and amplitude unit are kept (the mass that stretches them comes later).
 * Error:  none: doubles are read exactly and only signs and the ψ₄ factor are applied.
 * Fails:  a Problem for bytes that are not the declared table; a finding that stops the claim for values
 *         that are not finite (V01) and time that does not go forward (V02).
 * Source: settings.md rules 2.1 and section 8.
 */
export async function readWaveform(declaration: WaveformDeclaration, openFile: OpenFile, readHdf5: ReadHdf5 | null = null): Promise<Result<ReadWaveform, Problem[]>> {
  if (declaration.arrays) return readArrayWaveform(declaration, declaration.arrays, openFile, readHdf5);
  const read: Result<ModeTable, Problem[]>[] = [];
  for (const { file, mode } of declaration.files) {
    const table = await readTable(file, declaration.columns, openFile);
    read.push(table.ok ? ok({ table: table.value, mode }) : table);
  }
  const tables = collect(read);
  return tables.ok ? assembleWaveform(declaration, tables.value) : tables;
}

/** The same from array files, whose columns are known once their shapes are. */
async function readArrayWaveform(declaration: WaveformDeclaration, layout: ArrayLayout, openFile: OpenFile, readHdf5: ReadHdf5 | null): Promise<Result<ReadWaveform, Problem[]>> {
  const wish = { layout, declared: declaration.columns, leastL: declaration.variable === 'phi2' ? 1 : 2 };
  const read = [];
  for (const { file, mode } of declaration.files) {
    const arrays = await readArrays(file, wish, openFile, readHdf5);
    read.push(arrays.ok ? ok({ ...arrays.value, tables: arrays.value.tables.map((one) => ({ ...one, mode: one.mode ?? mode })) }) : arrays);
  }
  const files = collect(read);
  if (!files.ok) return files;
  const whole = assembleWaveform({ ...declaration, columns: files.value[0]!.columns }, files.value.flatMap(({ tables }) => tables));
  if (!whole.ok || whole.value.waveform === null) return whole;
  return ok({ ...whole.value, findings: [...whole.value.findings, ...files.value.flatMap(({ findings }) => findings)] });
}

/** The synchronous half, for a browser that has parsed the bytes itself. */
export function assembleWaveform(declaration: WaveformDeclaration, tables: readonly ModeTable[]): Result<ReadWaveform, Problem[]> {
  const axisAt = declaration.columns.findIndex((column) => column.role.kind === 'axis');
  const first = tables[0]!.table;
  const unit = declaration.timeUnit;
  const stops = tables.flatMap(({ table }) => [...notFiniteFindings(table, declaration.columns, unit), ...monotoneFindings(table, table.columns[axisAt]!, unit)]);
  const writing = writingOf(tables);
  if (stops.length > 0) return ok({ waveform: null, findings: stops, writing });
  const axis = first.columns[axisAt]!;
  const apart = tables.flatMap(({ table }) => axesApart(first, axis, table, table.columns[axisAt]!));
  if (apart.length > 0) return err(apart);
  if (declaration.domain === 'frequency' && !(axis[0]! > 0))
    return err([{ code: 'formats/frequency-not-positive', where: whereRow(first, 0), saw: `f = ${axis[0]} ${unit}`, expected: 'frequencies above zero', hint: 'Leave out zero and negative frequencies.' }]);
  const waveform = waveformOf(declaration, tables, axis);
  const gaps = declaration.domain === 'time' && waveform.uniformStep === null ? gapFindings(first, axis, unit, traceOf(waveform.content)) : [];
  return ok({ waveform, findings: [...gaps, ...headerFindings(declaration, tables)], writing });
}

function waveformOf(declaration: WaveformDeclaration, tables: readonly ModeTable[], axis: Float64Array): Waveform {
  const inM = declaration.timeUnit === 'M' || declaration.timeUnit === '1/M';
  return {
    name: declaration.name,
    domain: declaration.domain,
    unit: inM ? 'M' : 's',
    amplitudeUnit: declaration.amplitudeUnit,
    variable: declaration.variable,
    axis,
    uniformStep: uniformStepOf(axis),
    content: contentOf(declaration, tables),
    negativeM: declaration.negativeM,
    ownTotalMassMsun: declaration.totalMassMsun,
    ownDistanceMpc: declaration.distanceMpc,
    junkEndM: declaration.junkEndM,
    binary: declaration.binary,
    ...declaration.run,
    significantDigits: printedDigits(tables.map(({ table }) => table), declaration.columns),
  };
}

/** Files of one simulation share their times; a millionth of a step is the rounding of a print. */
function axesApart(first: NumberTable, axis: Float64Array, other: NumberTable, otherAxis: Float64Array): Problem[] {
  const expected = `the times of ${first.file}: all modes of a waveform share one axis`;
  if (axis.length !== otherAxis.length) return [{ code: 'formats/axes-differ', where: other.file, saw: `${otherAxis.length} rows against ${axis.length}`, expected }];
  const tolerance = (1e-6 * (axis[axis.length - 1]! - axis[0]!)) / (axis.length - 1);
  const at = axis.findIndex((t, i) => !(Math.abs(t - otherAxis[i]!) <= tolerance));
  return at < 0 ? [] : [{ code: 'formats/axes-differ', where: whereRow(other, at), saw: `${otherAxis[at]} against ${axis[at]}`, expected }];
}

function traceOf(content: ModeSet | LineOfSight): WaveTrace {
  if (content.kind === 'line-of-sight') return { re: content.plus, im: content.cross };
  const peak = (samples: { re: Float64Array; im: Float64Array }) => samples.re.reduce((most, x, i) => Math.max(most, Math.hypot(x, samples.im[i]!)), 0);
  const turning = content.modes.filter((mode) => mode.m > 0);
  const ranked = [...(turning.length > 0 ? turning : content.modes)].map((mode) => ({ mode, peak: peak(mode) }));
  return ranked.reduce((best, next) => (next.peak > best.peak ? next : best)).mode;
}
