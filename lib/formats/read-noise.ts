import type { Finding } from '@/lib/engine/contract/finding';
import type { NoiseDeclaration } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { ok, type Result } from '@/lib/kernel/result';
import type { OpenFile } from './open-file';
import { readTable } from './read-table';
import { notFiniteFindings } from './series-findings';

/** A noise table as its file gives it; the engine's noise room turns it into a curve. */
export interface NoiseColumns {
  readonly name: string;
  readonly f: Float64Array;
  readonly values: Float64Array;
  readonly meaning: 'asd' | 'psd' | 'characteristic';
  readonly sided: 'one' | 'two';
  /** File and line of a row, for messages. */
  readonly whereRow: (row: number) => string;
}

export interface ReadNoise {
  /** Null when a value of the file is not finite. */
  readonly noise: NoiseColumns | null;
  readonly findings: readonly Finding[];
}

/** One uploaded noise table of a sheet. Order and sign of its rows are judged by the noise room (V19). */
export async function readNoise(declaration: Extract<NoiseDeclaration, { kind: 'table' }>, openFile: OpenFile): Promise<Result<ReadNoise, Problem[]>> {
  const read = await readTable(declaration.file, declaration.columns, openFile);
  if (!read.ok) return read;
  const table = read.value;
  const findings = notFiniteFindings(table, declaration.columns, 'Hz');
  if (findings.length > 0) return ok({ noise: null, findings });
  const at = (kind: string) => declaration.columns.findIndex((column) => column.role.kind === kind);
  const column = declaration.columns[at('noise')]!;
  const meaning = column.role.kind === 'noise' ? column.role.meaning : 'asd';
  return ok({
    noise: {
      name: declaration.name,
      f: table.columns[at('axis')]!,
      values: table.columns[at('noise')]!,
      meaning,
      sided: declaration.sided,
      whereRow: (row) => `${declaration.file}:${table.lineOfRow(row)}`,
    },
    findings: [],
  });
}
