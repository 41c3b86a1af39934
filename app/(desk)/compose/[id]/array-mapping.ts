/**
 * What stands where in a file of arrays: the part of a waveform's sheet under `datasets` and `time`, as
 * rows of a form and back, and what the names in a file propose.
 */
import { modeFromName } from '@/lib/formats/arrays/mode-name';
import type { StructureEntry } from '@/lib/formats/arrays/structure';

type Json = Readonly<Record<string, unknown>>;

export interface MappingRow {
  /** A mode such as `2,2`, or `plus`, `re22`, `data`, `modes`. */
  readonly stands: string;
  readonly path: string;
}

export interface Mapping {
  readonly rows: readonly MappingRow[];
  readonly time: string;
  readonly start: string;
  readonly step: string;
}

export interface Proposal {
  readonly words: string;
  readonly mapping: Mapping;
}

export const noMapping: Mapping = { rows: [], time: '', start: '', step: '' };

const arrayFile = /\.(h5|hdf5|hdf|npz)$/i;
export const hasDatasets = (file: string): boolean => arrayFile.test(file);

const text = (value: unknown): string => (typeof value === 'string' ? value : typeof value === 'number' ? String(value) : '');
const objectOf = (value: unknown): Json => (typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Json) : {});

export function mappingOf(rest: Json): Mapping {
  const { start, step } = objectOf(rest['time']);
  return {
    rows: Object.entries(objectOf(rest['datasets'])).map(([stands, path]) => ({ stands, path: text(path) })),
    time: text(rest['time']),
    start: text(start),
    step: text(step),
  };
}

const numberOr = (typed: string): unknown => (Number.isFinite(Number(typed)) && typed.trim() !== '' ? Number(typed) : typed.trim());

/** A row without a name or a dataset is not settled yet and waits outside the sheet. */
export function withMapping(rest: Json, { rows, time, start, step }: Mapping): Json {
  const others = Object.fromEntries(Object.entries(rest).filter(([name]) => name !== 'datasets' && name !== 'time'));
  const settled = rows.filter((row) => row.stands.trim() !== '' && row.path.trim() !== '').map((row) => [row.stands.trim(), row.path.trim()] as const);
  const axis = time.trim() !== '' ? time.trim() : step.trim() !== '' ? { start: start.trim() === '' ? 0 : numberOr(start), step: numberOr(step) } : undefined;
  return { ...others, ...(settled.length > 0 ? { datasets: Object.fromEntries(settled) } : {}), ...(axis === undefined ? {} : { time: axis }) };
}

const leaf = (path: string): string => path.slice(path.lastIndexOf('/') + 1);
const groupOf = (path: string): string => path.slice(0, Math.max(0, path.lastIndexOf('/')));

/** Mappings that the names in the file suggest, the one with most modes first. Each is shown before it is used. */
export function proposals(entries: readonly StructureEntry[]): readonly Proposal[] {
  const usable = entries.filter((entry) => entry.kind === 'dataset' && entry.refusal === null && entry.shape !== null);
  const groups = [...new Set(usable.map(({ path }) => groupOf(path)))];
  const ofModes = groups.flatMap((group) => modesIn(group, usable) ?? []);
  ofModes.sort((a, b) => b.mapping.rows.length - a.mapping.rows.length);
  return [...usable.flatMap((entry) => wholeSet(entry, usable) ?? []), ...ofModes];
}

function modesIn(group: string, usable: readonly StructureEntry[]): Proposal | null {
  const found = new Map<string, StructureEntry>();
  for (const entry of usable) {
    const mode = groupOf(entry.path) === group && holdsOneMode(entry) ? modeSaid(entry) : null;
    if (mode !== null && !found.has(mode)) found.set(mode, entry);
  }
  const [first] = found.values();
  if (!first) return null;
  const rows = [...found].map(([stands, { path }]) => ({ stands, path }));
  const own = !first.complex && (first.shape?.[1] === 3 || first.shape?.[0] === 3);
  const time = own ? '' : timesFor(first, usable);
  return { words: `${rows.length} ${rows.length === 1 ? 'mode' : 'modes'}${group === '' ? '' : ` of ${group}`}${time === '' ? '' : `, times in ${time}`}`, mapping: { rows, time, start: '', step: '' } };
}

function holdsOneMode({ shape, complex }: StructureEntry): boolean {
  if (complex) return shape?.length === 1;
  return shape?.length === 2 && shape.some((n) => n === 2 || n === 3);
}

function modeSaid({ path, attributes }: StructureEntry): string | null {
  const named = modeFromName(leaf(path));
  if (named) return named.join(',');
  const [l, m] = ['l', 'm'].map((name) => attributes.find((one) => one.name === name)?.value);
  return l !== undefined && m !== undefined && /^\d{1,2}$/.test(l) && /^-?\d{1,2}$/.test(m) ? `${l},${m}` : null;
}

/** All modes in one array, with the list of them beside it or in an attribute. */
function wholeSet(entry: StructureEntry, usable: readonly StructureEntry[]): Proposal | null {
  const shape = entry.shape ?? [];
  if (!(entry.complex && shape.length === 2) && !(shape.length === 3 && shape[2] === 2)) return null;
  const list = usable.find((one) => groupOf(one.path) === groupOf(entry.path) && leaf(one.path) === 'modes' && one.shape?.length === 2 && one.shape[1] === 2);
  if (!list && entry.attributes.length === 0) return null;
  const time = timesFor(entry, usable);
  const rows = [{ stands: 'data', path: entry.path }, ...(list ? [{ stands: 'modes', path: list.path }] : [])];
  return { words: `all modes in ${entry.path}, listed in ${list ? list.path : 'an attribute of it'}${time === '' ? '' : `, times in ${time}`}`, mapping: { rows, time, start: '', step: '' } };
}

const timeNames = /^(t|time|times|tortoise_?time|u)$/i;

/** A vector of as many numbers whose name says that it is the time, the nearest group first. */
function timesFor(entry: StructureEntry, usable: readonly StructureEntry[]): string {
  const vectors = usable.filter((one) => !one.complex && one.shape?.length === 1 && entry.shape?.includes(one.shape[0] ?? NaN) && timeNames.test(leaf(one.path)) && entry.path.startsWith(groupOf(one.path)));
  return vectors.reduce<StructureEntry | null>((best, one) => (best && best.path.length >= one.path.length ? best : one), null)?.path ?? '';
}
