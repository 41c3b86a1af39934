import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Band } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { measuredCurve, measuredRows } from './measured-curve';
import type { Reference } from './reference';
import type { Row } from './report';
import { quickest, timed, type Spent } from './stopwatch';
import { band, fHighHz, fLowHz, masses, samples, sweepBase } from './sweep';

/** The engine's run is a fraction as long: several of them meet the load that one of the script meets. */
const runsARound = 8;

type Ours = Spent & { readonly value: number[] };
type Theirs = Spent & { readonly matches: number[] };

const plusOf = ({ content }: Waveform): Float64Array => {
  if (content.kind !== 'modes' || !content.modes[0]) throw new Error('the pair has one mode each');
  return content.modes[0].re;
};

export function writePair(path: string, pair: readonly [Waveform, Waveform]): void {
  writeFileSync(path, Buffer.concat([pair[0].axis, plusOf(pair[0]), plusOf(pair[1])].map((x) => Buffer.from(x.buffer, x.byteOffset, x.byteLength))));
}

async function race(pair: readonly [Waveform, Waveform], edges: Band, rounds: number, ask: () => Promise<Theirs>): Promise<{ ours: Ours[]; theirs: Theirs[] }> {
  const [ours, theirs]: [Ours[], Theirs[]] = [[], []];
  for (let round = 0; round < rounds; round++) {
    theirs.push(await ask());
    for (let again = 0; again < runsARound; again++) ours.push(await timed(() => sweepBase(createRouteA(), pair, masses, edges)));
    console.log(`sweep, round ${round + 1}: script ${theirs[round]?.cpuSeconds.toFixed(2)} s, engine ${quickest(ours).cpuSeconds.toFixed(3)} s`);
  }
  return { ours, theirs };
}

const lowBy = (ours: Ours, theirs: Theirs): string => Math.max(...ours.value.map((x, i) => x - (theirs.matches[i] ?? Number.NaN))).toExponential(1);

/** The sweep of 200 masses with a smooth curve, cold and warm, and with a measured one. */
export async function benchSweep(pair: readonly [Waveform, Waveform], reference: Reference, folder: string): Promise<Row[]> {
  const path = join(folder, 'pair.bin');
  writePair(path, pair);
  const request = { do: 'sweep', path, n: samples, masses, fLowHz, fHighHz };
  const smooth = await race(pair, band(), 5, () => reference.ask<Theirs>(request));
  const { f, psd } = measuredRows();
  const edges = { noise: measuredCurve(), fLowHz, fHighHz };
  const measured = await race(pair, edges, 2, () => reference.ask<Theirs>({ ...request, noise: { f, psd } }));
  const [best, script] = [quickest(smooth.ours), quickest(smooth.theirs)];
  const [lined, linedScript] = [quickest(measured.ours), quickest(measured.theirs)];
  return [
    {
      what: `match of ${masses.length} masses (${masses[0]}–${masses.at(-1)} M☉, curve A2, ${fLowHz}–${fHighHz} Hz) of two records of 10⁶ uneven samples`,
      ours: best,
      theirs: script,
      target: '≥ 40',
      note: `script: spline once, N = 2¹⁷, no refinement of the peak (its matches are low by up to ${lowBy(best, script)})`,
    },
    { what: 'the same, first run of a fresh process', ours: smooth.ours[0] ?? best, theirs: smooth.theirs[0] ?? script, target: '', note: 'includes compilation' },
    {
      what: `the same under an invented measured curve: ${f.length} rows, eight lines`,
      ours: lined,
      theirs: linedScript,
      target: '≥ 20',
      note: `engine: fine bins, every kink of the table resolved; script: its bins as they stand (matches off by up to ${Math.max(...lined.value.map((x, i) => Math.abs(x - (linedScript.matches[i] ?? Number.NaN)))).toExponential(1)})`,
    },
  ];
}
