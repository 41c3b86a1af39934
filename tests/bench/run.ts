/**
 * The benchmark: the engine against a reference script on this machine, alternating, so that both meet
 * the same load. Ratios are what counts; seconds of a shared machine are not. It is no timed test.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { cpus, tmpdir } from 'node:os';
import { join } from 'node:path';
import { taperWeightAt } from '@/lib/engine/conditioning/taper-window';
import type { BestTemplate } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { ENGINE_VERSION } from '@/lib/engine/version';
import { bankSide, fittingFactor, makeBank, massFactors, signalMassMsun, type Bank } from './bank';
import { benchArrays } from './arrays';
import { errorBarCost } from './error-bar';
import { parseTable, writeTable } from './parse';
import { openReference, type Reference } from './reference';
import { writeReport, type Row } from './report';
import { quickest, timed, type Spent } from './stopwatch';
import { fHighHz, fLowHz, makePair, masses, samples, sweepBase } from './sweep';

const rounds = 5;
/** The engine's run is a tenth as long: several of them meet the load that one of the script meets. */
const runsARound = 4;
const bankRounds = 3;
const parsedRows = 500_000;

const plusOf = ({ content }: Waveform): Float64Array => {
  if (content.kind !== 'modes' || !content.modes[0]) throw new Error('the pair has one mode each');
  return content.modes[0].re;
};

async function benchSweep(pair: readonly [Waveform, Waveform], reference: Reference, folder: string): Promise<Row[]> {
  const path = join(folder, 'pair.bin');
  writeFileSync(path, Buffer.concat([pair[0].axis, plusOf(pair[0]), plusOf(pair[1])].map((x) => Buffer.from(x.buffer))));
  const request = { do: 'sweep', path, n: samples, masses, fLowHz, fHighHz };
  const [ours, theirs]: [(Spent & { value: number[] })[], (Spent & { matches: number[] })[]] = [[], []];
  for (let round = 0; round < rounds; round++) {
    theirs.push(await reference.ask<Spent & { matches: number[] }>(request));
    for (let again = 0; again < runsARound; again++) ours.push(await timed(() => sweepBase(createRouteA(), pair)));
    console.log(`sweep, round ${round + 1}: script ${theirs[round]?.seconds.toFixed(2)} s, engine ${ours.at(-1)?.seconds.toFixed(2)} s`);
  }
  const [best, script] = [quickest(ours), quickest(theirs)];
  const low = Math.max(...best.value.map((x, i) => x - (script.matches[i] ?? Number.NaN)));
  return [
    {
      what: `match of 200 masses (${masses[0]}–${masses.at(-1)} M☉, curve A2, ${fLowHz}–${fHighHz} Hz) of two records of 10⁶ uneven samples`,
      ours: best,
      theirs: script,
      target: '≥ 10',
      note: `script: spline once, N = 2¹⁷, no refinement of the peak (its matches are low by up to ${low.toExponential(1)})`,
    },
    {
      what: 'the same, first run of a fresh process',
      ours: ours[0] ?? best,
      theirs: theirs[0] ?? script,
      target: '',
      note: 'includes compilation',
    },
  ];
}

/** Every record of the bank, the signal first: times from 0 and the tapered plus strain face-on, one after the other. */
function writeBank(path: string, { signal, templates }: Bank): number[] {
  const parts = [signal, ...templates].flatMap((given) => {
    const { taper, waveform } = bankSide(given);
    const plus = plusOf(waveform).map((x, i) => x * taperWeightAt(taper, waveform.axis[i]!));
    return [waveform.axis, plus];
  });
  writeFileSync(path, Buffer.concat(parts.map((x) => Buffer.from(x.buffer, x.byteOffset, x.byteLength))));
  return [signal, ...templates].map(({ axis }) => axis.length);
}

async function benchBank(reference: Reference, folder: string): Promise<Row> {
  const bank = makeBank();
  const path = join(folder, 'bank.bin');
  const lengths = writeBank(path, bank);
  const request = { do: 'bank', path, lengths, mass: signalMassMsun, factors: massFactors, fLowHz, fHighHz };
  const [ours, theirs]: [(Spent & { value: BestTemplate })[], (Spent & { best: number; index: number })[]] = [[], []];
  for (let round = 0; round < bankRounds; round++) {
    theirs.push(await reference.ask<Spent & { best: number; index: number }>(request));
    for (let again = 0; again < runsARound; again++) ours.push(await timed(() => fittingFactor(createRouteA(), bank)));
    console.log(`bank, round ${round + 1}: script ${theirs[round]?.cpuSeconds.toFixed(2)} s, engine ${ours.at(-1)?.cpuSeconds.toFixed(2)} s`);
  }
  const [best, script] = [quickest(ours), quickest(theirs)];
  const { index, outcome } = best.value;
  return {
    what: `fitting factor over ${bank.templates.length} templates × ${massFactors.length} masses (curve A2, ${fLowHz}–${fHighHz} Hz, records of 1 200 to 3 000 M)`,
    ours: best,
    theirs: script,
    target: '≥ 30',
    note: `engine: ${outcome.match.toFixed(6)} with template ${index}, mass refined; script: ${script.best.toFixed(6)} with template ${script.index}, grid only`,
  };
}

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
try {
  const versions = await reference.ask<Record<string, string>>({ do: 'versions' });
  const pair = makePair();
  const rows = await benchSweep(pair, reference, folder);
  const errorBar = await benchErrorBar(pair);
  rows.push(await benchBank(reference, folder));
  const arrays = await benchArrays(reference, folder);
  rows.push(await benchParse(reference, folder), ...arrays.rows);
  const commit = execFileSync('git', ['rev-parse', '--short', 'HEAD'], { encoding: 'utf8' }).trim();
  const machine = `${cpus().length} × ${cpus()[0]?.model ?? 'unknown processor'}, Node ${process.versions.node}, engine ${ENGINE_VERSION} (${commit}), Python ${versions.python}, numpy ${versions.numpy}, scipy ${versions.scipy}`;
  writeReport({ rows, skipped: arrays.skipped, errorBar, machine, date: new Date().toISOString().slice(0, 10) });
} finally {
  reference.close();
  rmSync(folder, { recursive: true, force: true });
}
