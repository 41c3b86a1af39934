import type { ArrayLayout } from '@/lib/engine/contract/array-layout';
import type { Finding } from '@/lib/engine/contract/finding';
import type { Column } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { err, ok, type Result } from '@/lib/kernel/result';
import type { ModeTable } from '../content';
import { identityOfMarks } from '../hidden-identity';
import { FileRefused, type OpenFile } from '../open-file';
import { npySource } from '../npy/npy-source';
import { openNpz } from '../npy/npz-source';
import type { ArrayTable } from '../row-place';
import type { ReadHdf5 } from '../hdf5/hdf5-ask';
import { readSeries, type Series, type SeriesTable, type SeriesWish } from './series';

/** Tables of an array file, with the columns they share. */
export interface ArrayTables {
  readonly columns: readonly Column[];
  readonly tables: readonly ModeTable[];
  readonly findings: readonly Finding[];
}

export const arrayFileBytes = 512 * 2 ** 20;

/**
 * The arrays of one file of a sheet. HDF5 is read by `readHdf5`, in a thread of its own that this room
 * cannot start; where there is none (in a browser) such files are refused with that reason.
 */
export async function readArrays(file: string, wish: SeriesWish, openFile: OpenFile, readHdf5: ReadHdf5 | null): Promise<Result<ArrayTables, Problem[]>> {
  const series = await seriesOf(file, wish, (name) => bounded(openFile(name)), readHdf5);
  if (!series.ok) return series;
  const { columns, tables, marks = [] } = series.value;
  const short = tables.flatMap((table) => fewSamples(file, table));
  if (short.length > 0) return err(short);
  return ok({ columns, tables: tables.map((table) => ({ table: numberTable(file, table), mode: table.mode })), findings: identityOfMarks(file, marks) });
}

async function seriesOf(file: string, wish: SeriesWish, open: OpenFile, readHdf5: ReadHdf5 | null): Promise<Result<Series, Problem[]>> {
  const { format } = wish.layout satisfies ArrayLayout;
  if (format === 'npy') return readSeries(wish, npySource(file, open));
  if (format === 'hdf5') return readHdf5 ? readHdf5(file, open(file), wish) : err([notHere(file)]);
  const npz = await openNpz(file, open(file));
  if (!npz.ok) return npz;
  try {
    return await readSeries(wish, npz.value);
  } finally {
    await npz.value.close();
  }
}

/** As a text file, whose parser says the same. */
function fewSamples(file: string, { dataset, columns }: SeriesTable): Problem[] {
  const samples = columns[0]!.length;
  if (samples >= 2) return [];
  return [{ code: 'formats/too-few-rows', where: dataset === '' ? file : `${file}:${dataset}`, saw: samples === 1 ? '1 sample' : 'no samples', expected: 'at least two samples' }];
}

const notHere = (file: string): Problem => ({ code: 'formats/not-read-here', where: file, saw: 'an HDF5 file', expected: 'text, .npy or .npz for a first look in the browser', hint: 'Attach it and run the check: the server reads it.' });

async function* bounded(source: AsyncIterable<Uint8Array>): AsyncGenerator<Uint8Array> {
  let bytes = 0;
  for await (const chunk of source) {
    bytes += chunk.length;
    if (bytes > arrayFileBytes) throw new FileRefused(`more than ${arrayFileBytes / 2 ** 20} MiB`, `at most ${arrayFileBytes / 2 ** 20} MiB a file`, 'Leave out datasets that no claim uses, thin the record, or give one file a mode.');
    yield chunk;
  }
}

const reportedNotFinite = 5;

function numberTable(file: string, { dataset, columns, digits }: SeriesTable): ArrayTable {
  const rows = columns[0]!.length;
  const found = columns.map((values) => notFiniteRows(values));
  const first = found.flatMap(({ rows }, column) => rows.map((row) => ({ row, line: row, column, printed: String(columns[column]![row]) })));
  first.sort((a, b) => a.row - b.row || a.column - b.column);
  return {
    file, dataset, rows, columns,
    significantDigits: columns.map(() => digits ?? Infinity),
    notFinite: first.slice(0, reportedNotFinite),
    notFiniteCount: found.reduce((n, { count }) => n + count, 0),
    lineOfRow: (row) => row,
  };
}

function notFiniteRows(values: Float64Array): { readonly rows: readonly number[]; readonly count: number } {
  const rows: number[] = [];
  let count = 0;
  for (let i = 0; i < values.length; i++) {
    const x = values[i]!;
    if (x - x === 0) continue;
    count++;
    if (rows.length < reportedNotFinite) rows.push(i);
  }
  return { rows, count };
}
