/**
 * The benchmark: the engine against a reference script on this machine, alternating, so that both meet
 * the same load. Ratios are what counts; seconds of a shared machine are not. It is no timed test.
 * `--bank` measures the row on banks alone and writes nothing.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { benchBank, benchBankErrorBar, benchBankGrowth } from './bank-rows';
import { benchArrays } from './arrays';
import { errorBarCost } from './error-bar';
import { benchFluxes } from './fluxes';
import { benchGrowth, growthText } from './growth';
import { parseTable, writeTable } from './parse';
import { openReference, type Reference } from './reference';
import { printRow, writeReport, type Row } from './report';
import { searchCost } from './search-cost';
import { quickest, timed, type Spent } from './stopwatch';
import { makePair } from './sweep';
import { benchSweep } from './sweep-rows';

const rounds = 5;
const parsedRows = 500_000;

async function benchErrorBar(pair: readonly [Waveform, Waveform]): Promise<string> {
  const costs = [];
  for (let round = 0; round < 3; round++) costs.push(await errorBarCost(pair));
  const ratio = Math.min(...costs.map(({ base, bar }) => bar.cpuSeconds / base.cpuSeconds));
  const last = costs.at(-1);
  return `The error bar (six knobs turned at ${last?.points} of the 200 masses) costs **${ratio.toFixed(1)} ×** the base sweep (target ≤ 5); the largest U is ${last?.largest.toExponential(1)}.`;
}

async function benchParse(reference: Reference, folder: string): Promise<Row> {
  const path = join(folder, 'table.txt');
  writeTable(path, parsedRows);
  const [ours, theirs]: [Spent[], Spent[]] = [[], []];
  for (let round = 0; round < rounds; round++) {
    theirs.push(await reference.ask<Spent>({ do: 'parse', path }));
    ours.push(await timed(() => parseTable(path)));
  }
  return {
    what: `reading a text table of ${parsedRows} rows × 3 numbers of 17 digits`,
    ours: quickest(ours),
    theirs: quickest(theirs),
    target: '≥ 1',
    note: 'script: numpy.loadtxt',
  };
}

const folder = mkdtempSync(join(tmpdir(), 'counterfoil-bench-'));
const reference = openReference();
const only = process.argv.slice(2).includes('--bank');
try {
  if (only) printRow(await benchBank(reference, folder));
  else await benchAll();
} finally {
  reference.close();
  rmSync(folder, { recursive: true, force: true });
}

/** Every row, and the page of them. */
async function benchAll(): Promise<void> {
  const versions = await reference.ask<Record<string, string>>({ do: 'versions' });
  const pair = makePair();
  const rows = await benchSweep(pair, reference, folder);
  const errorBar = await benchErrorBar(pair);
  const growth = growthText(await benchGrowth(pair, reference, folder));
  rows.push(await benchBank(reference, folder));
  const bank = [await benchBankErrorBar(), await benchBankGrowth(reference, folder)] as const;
  rows.push(await benchFluxes(folder));
  // A script of its own: one that has just worked on large arrays keeps their memory and reads four times quicker than it ever does at work.
  const reader = openReference();
  const arrays = await benchArrays(reader, folder).finally(() => reader.close());
  rows.push(await benchParse(reference, folder), ...arrays.rows);
  const commit = execFileSync('git', ['rev-parse', '--short', 'HEAD'], { encoding: 'utf8' }).trim();
  const machine = `${cpus().length} × ${cpus()[0]?.model ?? 'unknown processor'}, Node ${process.versions.node}, engine ${ENGINE_VERSION} (${commit}), Python ${versions.python}, numpy ${versions.numpy}, scipy ${versions.scipy}`;
  writeReport({ rows, skipped: arrays.skipped, errorBar: `${errorBar}\n\n${bank[0]}\n\n${await searchCost()}`, growth: `${growth}\n\n${bank[1]}`, machine, date: new Date().toISOString().slice(0, 10) });
}
