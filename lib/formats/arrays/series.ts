import type { ArrayLayout, ArrayPart } from '@/lib/engine/contract/array-layout';
import type { Column } from '@/lib/engine/contract/layout';
import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import { arrayLimits, fewerSamples, shapeText, sizeProblem, type ArrayFacts, type ArraySource, type Reading } from './array-source';
import type { IdentityMark } from '../hidden-identity';
import { modesArray } from './modes-array';

/** Columns of one mode, or of all that have names; plain data, so that it can cross from one thread to another. */
export interface SeriesTable {
  /** Where its numbers stand in the file, for messages. */
  readonly dataset: string;
  readonly mode: ModeIndex | null;
  /** Parallel to the columns of `Series`. */
  readonly columns: readonly Float64Array[];
  readonly digits: number | null;
}

export interface Series {
  readonly columns: readonly Column[];
  readonly tables: readonly SeriesTable[];
  /** Of the whole file; absent where its format has no place for any. */
  readonly marks?: readonly IdentityMark[];
}

type Read<T> = Promise<Result<T, Problem[]>>;
export const refusal = (code: string, where: string, saw: string, expected: string, hint?: string): Result<never, Problem[]> => err([{ code, where, saw, expected, ...(hint ? { hint } : {}) }]);

/** What the sheet says of an array file, as much as reading it needs. */
export interface SeriesWish {
  readonly layout: ArrayLayout;
  readonly declared: readonly Column[];
  /** No spin-weighted harmonic of the variable lies below. */
  readonly leastL: number;
}

/** The arrays that a sheet names, as tables with their times first. */
export async function readSeries({ layout, declared, leastL }: SeriesWish, source: ArraySource): Read<Series> {
  const named = layout.parts.filter(({ role }) => role.kind === 'column');
  const room = new Room(source);
  const axis = typeof layout.time === 'string' ? await readVector(room, layout.time) : ok(null);
  if (!axis.ok) return axis;
  const reader: PartReader = { room, layout, declared, leastL, axis: axis.value?.values ?? null };
  if (named.length > 0) return readNamed(reader, named);
  const data = layout.parts.find(({ role }) => role.kind === 'data');
  return data ? readData(reader, data) : readModes(reader);
}

export interface PartReader extends SeriesWish {
  readonly room: Room;
  /** From the dataset that the sheet gives as `time`. */
  readonly axis: Float64Array | null;
}

/** The source, with one bound on all that is read from it. */
export class Room {
  private cells = 0;

  constructor(readonly source: ArraySource) {}

  where(path: string): string {
    return path === '' ? this.source.file : `${this.source.file}:${path}`;
  }

  async read(path: string, facts: ArrayFacts, reading: Reading): Read<Float64Array[]> {
    const tooLarge = sizeProblem(this.where(path), facts.shape, reading.samples);
    if (tooLarge) return err([tooLarge]);
    this.cells += facts.shape.reduce((n, d) => n * d, facts.complex ? 2 : 1);
    if (this.cells > arrayLimits.cells) return refusal('formats/too-many-rows', this.where(path), `more than ${arrayLimits.cells} numbers in the arrays of one waveform`, `at most ${arrayLimits.cells}`, fewerSamples);
    return this.source.read(path, reading);
  }
}

async function readVector(room: Room, path: string): Read<{ readonly values: Float64Array; readonly digits: number | null }> {
  const facts = await room.source.facts(path);
  if (!facts.ok) return facts;
  const { shape, complex, digits } = facts.value;
  if (shape.length !== 1 || complex) return refusal('formats/array-shape', room.where(path), shapeText(shape, complex), 'one real vector', shape.length === 2 ? 'Pick one column or row of it, such as [:,0] or [0,:].' : undefined);
  const read = await room.read(path, facts.value, { samples: 0, series: null, pair: null });
  return read.ok ? ok({ values: read.value[0]!, digits }) : read;
}

/** Times of `samples` samples, for a part that does not bring its own. */
export function axisOf({ layout, axis, room }: PartReader, samples: number, path: string): Result<Float64Array, Problem[]> {
  const { time } = layout;
  if (axis) return axis.length === samples ? ok(axis) : refusal('formats/axes-differ', room.where(path), `${samples} samples`, `${axis.length}, as many as times in ${String(time)}`);
  if (time !== null && typeof time === 'object') return ok(Float64Array.from({ length: samples }, (_, i) => time.start + i * time.step));
  return refusal('formats/no-times', room.where(path), `${samples} samples without times`, 'a dataset with their times', 'Name it under "time", or give even steps as {"start": 0, "step": 0.1}.');
}

export const axisColumn = (declared: readonly Column[]): Column => declared.find(({ role }) => role.kind === 'axis') ?? { name: 't', role: { kind: 'axis' } };

async function readNamed(reader: PartReader, parts: readonly ArrayPart[]): Read<Series> {
  const columns: Column[] = [];
  const values: Float64Array[] = [];
  const digits: (number | null)[] = [];
  for (const { role, path } of parts) {
    const read = await readVector(reader.room, path);
    if (!read.ok) return read;
    const column = role.kind === 'column' ? reader.declared.find(({ name }) => name === role.name) : undefined;
    if (!column) continue;
    if (values[0] && values[0].length !== read.value.values.length) return refusal('formats/axes-differ', reader.room.where(path), `${read.value.values.length} samples`, `${values[0].length}, as in ${parts[0]!.path}`);
    columns.push(column);
    values.push(read.value.values);
    digits.push(read.value.digits);
  }
  const axis = axisOf(reader, values[0]?.length ?? 0, parts[0]!.path);
  if (!axis.ok) return axis;
  const table = { dataset: parts.map(({ path }) => path).join(', '), mode: null, columns: [axis.value, ...values], digits: fewest(digits) };
  return ok({ columns: [axisColumn(reader.declared), ...columns], tables: [table] });
}

async function readModes(reader: PartReader): Read<Series> {
  const tables: SeriesTable[] = [];
  const problems: Problem[] = [];
  for (const { role, path } of partsOf(reader.layout)) {
    const read = await readMode(reader, path, role.kind === 'mode' ? role.mode : null);
    if (read.ok) tables.push(read.value);
    else problems.push(...read.error);
  }
  return problems.length > 0 ? err(problems) : ok({ columns: modeColumns(reader.declared), tables });
}

/** An `.npy` has one part, without a name. */
const whole: ArrayPart = { role: { kind: 'data' }, path: '' };
const partsOf = ({ format, parts }: ArrayLayout): readonly ArrayPart[] => (format === 'npy' ? [whole] : parts);

/** The axis, then the two columns of a mode in the order in which the sheet has them. */
const modeColumns = (declared: readonly Column[]): Column[] => [axisColumn(declared), ...valueColumns(declared)];
const valueColumns = (declared: readonly Column[]): Column[] => declared.filter(({ role }) => role.kind !== 'axis' && role.kind !== 'skip');

/** For each value column of the sheet, the half of a complex number that it is: 0 for re, 1 for im. */
function complexParts({ declared }: PartReader, where: string, saw: string): Result<number[], Problem[]> {
  const values = valueColumns(declared);
  const parts = values.map(({ role }) => ['re', 'im'].indexOf(role.kind));
  if (parts.length === 2 && parts.includes(0) && parts.includes(1)) return ok(parts);
  return refusal('formats/array-shape', where, saw, `real columns, since "columns" says ${values.map(({ name }) => name).join(', ')}`, 'Complex numbers are re and im of one mode: say so under "columns", or leave "columns" out.');
}

async function readMode(reader: PartReader, path: string, mode: ModeIndex | null): Read<SeriesTable> {
  const facts = await reader.room.source.facts(path);
  if (!facts.ok) return facts;
  const { shape, complex, digits } = facts.value;
  const where = reader.room.where(path);
  const done = (axis: Float64Array, columns: readonly Float64Array[]): Result<SeriesTable, never> => ok({ dataset: path, mode, columns: [axis, ...columns], digits });
  if (complex && shape.length === 1) {
    const parts = complexParts(reader, where, shapeText(shape, complex));
    if (!parts.ok) return parts;
    const axis = axisOf(reader, shape[0]!, path);
    if (!axis.ok) return axis;
    const read = await reader.room.read(path, facts.value, { samples: 0, series: null, pair: null });
    return read.ok ? done(axis.value, parts.value.map((part) => read.value[part]!)) : read;
  }
  const inside = columnsInside(reader, shape, complex);
  if (inside === null) return refusal('formats/array-shape', where, shapeText(shape, complex), expectedMode(reader), hintFor(shape, complex, reader));
  const axisAt = inside.findIndex(({ role }) => role.kind === 'axis');
  const ownAxis = axisAt >= 0;
  if (ownAxis && reader.layout.time !== null) return refusal('formats/array-shape', where, `${shapeText(shape)}, with times of its own beside "time"`, 'either its own times or "time"');
  const alongFirst = shape[1] === inside.length;
  const read = await reader.room.read(path, facts.value, alongFirst ? { samples: 0, series: 1, pair: null } : { samples: 1, series: 0, pair: null });
  if (!read.ok) return read;
  const axis = ownAxis ? ok(read.value[axisAt]!) : axisOf(reader, read.value[0]!.length, path);
  return axis.ok ? done(axis.value, valueColumns(inside).map((column) => read.value[inside.indexOf(column)]!)) : axis;
}

/** The declared columns that a two-dimensional dataset holds: all of them, or all but the times. */
function columnsInside({ declared }: PartReader, shape: readonly number[], complex: boolean): readonly Column[] | null {
  if (complex || shape.length !== 2) return null;
  const without = declared.filter(({ role }) => role.kind !== 'axis');
  return [declared, without].find(({ length }) => shape[1] === length) ?? [declared, without].find(({ length }) => shape[0] === length) ?? null;
}

const expectedMode = ({ declared }: PartReader): string => {
  const names = declared.map(({ name }) => name).join(', ');
  return `N×${declared.length} (${names}), N×${declared.length - 1} with "time", or one complex vector with "time"`;
};

function hintFor(shape: readonly number[], complex: boolean, { layout }: PartReader): string | undefined {
  if (shape.length === 1 && !complex) return 'Give its real and imaginary parts as datasets of their own: {"re22": "…", "im22": "…"}.';
  if (complex && shape.length === 2 && layout.format !== 'npy') return 'For all modes in one array, name it "data" and the list of its (l, m) "modes".';
  return shape.length > 1 ? 'Pick a part of it, such as [0,:].' : undefined;
}

async function readData(reader: PartReader, data: ArrayPart): Read<Series> {
  const facts = await reader.room.source.facts(data.path);
  if (!facts.ok) return facts;
  const { shape, complex, digits } = facts.value;
  const where = reader.room.where(data.path);
  const paired = !complex && shape.length === 3 && shape[2] === 2;
  if (!paired && !(complex && shape.length === 2)) return refusal('formats/array-shape', where, shapeText(shape, complex), 'L×N complex numbers, or L×N×2 real ones');
  const parts = complexParts(reader, where, shapeText(shape, complex));
  if (!parts.ok) return parts;
  const modes = await modesArray(reader, data.path);
  if (!modes.ok) return modes;
  const alongSecond = shape[0] === modes.value.length;
  if (!alongSecond && shape[1] !== modes.value.length) return refusal('formats/array-shape', where, shapeText(shape, complex), `one side as long as the list of modes, ${modes.value.length}`);
  const [samples, series] = alongSecond && !(shape[1] === modes.value.length && reader.layout.format === 'hdf5') ? [1, 0] : [0, 1];
  const axis = axisOf(reader, shape[samples]!, data.path);
  if (!axis.ok) return axis;
  const read = await reader.room.read(data.path, facts.value, { samples, series, pair: paired ? 2 : null });
  if (!read.ok) return read;
  const tables = modes.value.map((mode, i): SeriesTable => ({ dataset: data.path, mode, columns: [axis.value, ...parts.value.map((part) => read.value[2 * i + part]!)], digits }));
  return ok({ columns: modeColumns(reader.declared), tables });
}

function fewest(digits: readonly (number | null)[]): number | null {
  const known = digits.filter((n) => n !== null);
  return known.length > 0 ? Math.min(...known) : null;
}
