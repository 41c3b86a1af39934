import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Spent } from './stopwatch';

export interface Row {
  readonly what: string;
  readonly ours: Spent;
  readonly theirs: Spent;
  readonly target: string;
  readonly note: string;
}

export interface Report {
  readonly rows: readonly Row[];
  readonly skipped: readonly string[];
  readonly errorBar: string;
  readonly growth: string;
  readonly machine: string;
  readonly date: string;
}

const ratio = (a: number, b: number): string => `${(a / b).toFixed(1)} ×`;

const tableRow = ({ what, ours, theirs, target, note }: Row): string =>
  `| ${what} | ${theirs.cpuSeconds.toFixed(2)} | ${ours.cpuSeconds.toFixed(2)} | ${ratio(theirs.cpuSeconds, ours.cpuSeconds)} | ${ratio(theirs.seconds, ours.seconds)} | ${target} | ${note} |`;

/** One row alone, for who works on it; the page stays as it was. */
export const printRow = (row: Row): void => console.log(tableRow(row));

export function writeReport({ rows, skipped, errorBar, growth, machine, date }: Report): void {
  const text = `# Speed

Written by \`npm run bench\` on ${date}. ${machine}.

Engine and reference script run in turn on the same machine; of each, the run with the least processor time is printed. Ratios are script over
engine: by processor time of the whole process, and by the clock, which other programs on the machine disturb.

| what | script, processor s | engine, processor s | ratio | ratio by the clock | target | note |
| --- | --- | --- | --- | --- | --- | --- |
${rows.map(tableRow).join('\n')}

${[errorBar, ...skipped, growth].join('\n\n')}

Both sides start from samples in memory and hold nothing prepared. The script is \`tests/bench/reference.py\`: one cubic spline a waveform, then for
every mass a resampling at 4096 Hz, two transforms, a weighted product and an inverse transform. The engine transforms each waveform once and
lets the mass stretch the frequencies (see the pages of methods); its numbers carry exact band edges and a refined peak.
`;
  writeFileSync(join(process.cwd(), 'content', 'bench.md'), text);
  console.log(text);
}
