import type { Finding } from '@/lib/engine/contract/finding';
import type { Column, NoiseDeclaration } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { ok, type Result } from '@/lib/kernel/result';
import type { OpenFile } from './open-file';
import { identityFindings } from './hidden-identity';
import { readTable } from './read-table';
import { notFiniteFindings } from './series-findings';
import { whereRow } from './row-place';
import { readArrays } from './arrays/read-arrays';
import type { ReadHdf5 } from './hdf5/hdf5-ask';
import type { NumberTable } from './text/table';

/** A noise table as its file gives it; the engine's noise room turns it into a curve. */
export interface NoiseColumns {
  readonly name: string;
  readonly f: Float64Array;
  readonly values: Float64Array;
  readonly meaning: 'asd' | 'psd' | 'characteristic';
  readonly sided: 'one' | 'two';
  /** File and line of a row, for messages. */
  readonly whereRow: (row: number) => string;
  /** What is written on it: its name, its file's and the comments there. */
  readonly writing: readonly string[];
}

export interface ReadNoise {
  /** Null when a value of the file is not finite. */
  readonly noise: NoiseColumns | null;
  readonly findings: readonly Finding[];
}

/** One uploaded noise table of a sheet. Order and sign of its rows are judged by the noise room (V19). */
export async function readNoise(declaration: Extract<NoiseDeclaration, { kind: 'table' }>, openFile: OpenFile, readHdf5: ReadHdf5 | null = null): Promise<Result<ReadNoise, Problem[]>> {
  const read = await readCurveTable(declaration, openFile, readHdf5);
  if (!read.ok) return read;
  const { table, columns } = read.value;
  const findings = notFiniteFindings(table, columns, 'Hz');
  if (findings.length > 0) return ok({ noise: null, findings });
  const at = (kind: string) => columns.findIndex((column) => column.role.kind === kind);
  const column = columns[at('noise')]!;
  const meaning = column.role.kind === 'noise' ? column.role.meaning : 'asd';
  return ok({
    noise: {
      name: declaration.name,
      f: table.columns[at('axis')]!,
      values: table.columns[at('noise')]!,
      meaning,
      sided: declaration.sided,
      whereRow: (row) => whereRow(table, row),
      writing: [declaration.name, declaration.file, ...(table.comments ?? []).map(({ text }) => text)],
    },
    findings: identityFindings(declaration.file, table.comments ?? []),
  });
}

async function readCurveTable({ file, arrays: layout, columns }: Extract<NoiseDeclaration, { kind: 'table' }>, openFile: OpenFile, readHdf5: ReadHdf5 | null): Promise<Result<{ readonly table: NumberTable; readonly columns: readonly Column[] }, Problem[]>> {
  if (layout) {
    const arrays = await readArrays(file, { layout, declared: columns, leastL: 0 }, openFile, readHdf5);
    return arrays.ok ? ok({ table: arrays.value.tables[0]!.table, columns: arrays.value.columns }) : arrays;
  }
  const read = await readTable(file, columns, openFile);
  return read.ok ? ok({ table: read.value, columns }) : read;
}
