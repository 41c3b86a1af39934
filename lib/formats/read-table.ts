import type { Column } from '@/lib/engine/contract/layout';
import type { Problem } from '@/lib/kernel/problem';
import { err, type Result } from '@/lib/kernel/result';
import { unpacked } from './gunzip';
import { unreadable, type OpenFile } from './open-file';
import type { NumberTable } from './text/table';
import { TableParser, tableLimits, type TableLimits } from './text/table-parser';

/** One text table, streamed; gzip is unpacked on the way and counted against the same limit. */
export async function readTable(file: string, columns: readonly Column[], openFile: OpenFile, limits: TableLimits = tableLimits): Promise<Result<NumberTable, Problem[]>> {
  const parser = new TableParser(file, columns.map((column) => column.name), limits);
  try {
    for await (const chunk of unpacked(openFile(file))) if (!parser.push(chunk)) break;
  } catch (thrown) {
    return err([unreadable(file, thrown)]);
  }
  return parser.finish();
}
