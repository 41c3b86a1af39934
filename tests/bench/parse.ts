import { createReadStream, writeFileSync } from 'node:fs';
import { TableParser } from '@/lib/formats/text/table-parser';
import { chirp, pair, unevenTimes } from './waveforms';

/** A table as simulations write it: time and two columns of seventeen digits. */
export function writeTable(path: string, rows: number): void {
  const t = unevenTimes(rows);
  const { re, im } = chirp(t, pair[0]);
  const lines = Array.from(t, (x, i) => `${x.toExponential(16)} ${re[i]!.toExponential(16)} ${im[i]!.toExponential(16)}`);
  writeFileSync(path, `# t re22 im22\n${lines.join('\n')}\n`);
}

export interface Parsed {
  readonly seconds: number;
  readonly sum: number;
}

export async function parseTable(path: string): Promise<Parsed> {
  const started = performance.now();
  const parser = new TableParser(path, ['t', 're22', 'im22']);
  for await (const chunk of createReadStream(path, { highWaterMark: 2 ** 20 })) if (!parser.push(chunk as Buffer)) break;
  const table = parser.finish();
  if (!table.ok) throw new Error(JSON.stringify(table.error));
  const seconds = (performance.now() - started) / 1000;
  const sum = table.value.columns.reduce(
    (total, column) => total + (column?.subarray(0, table.value.rows).reduce((a, b) => a + b, 0) ?? 0),
    0,
  );
  return { seconds, sum };
}
