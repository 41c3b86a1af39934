import { join } from 'node:path';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { growthFigure } from './growth-figure';
import type { Reference } from './reference';
import { quickest, timed, type Spent } from './stopwatch';
import { fHighHz, fLowHz, makePair, masses, samples, sweepBase } from './sweep';
import { writePair } from './sweep-rows';

/** Cost at one size, in processor seconds. */
export interface GrowthPoint {
  readonly size: number;
  readonly engine: number;
  readonly script: number;
}

export interface Growth {
  readonly what: string;
  readonly axis: string;
  readonly figure: string;
  readonly points: readonly GrowthPoint[];
}

const runs = 6;
const sampleCounts = [16, 17, 18, 19, 20].map((power) => 2 ** power);
const massCounts = [10, 30, 100, 300, 1000];

/** Between the same ends, whatever the number. */
const massesBetween = (n: number): number[] => {
  const [low, high] = [masses[0] ?? 40, masses.at(-1) ?? 239];
  return Array.from({ length: n }, (_, i) => low + ((high - low) * i) / (n - 1));
};

async function costOf(size: number, pair: readonly [Waveform, Waveform], n: number, at: readonly number[], reference: Reference, path: string): Promise<GrowthPoint> {
  writePair(path, pair);
  const script = await reference.ask<Spent>({ do: 'sweep', path, n, masses: at, fLowHz, fHighHz });
  const ours: Spent[] = [];
  for (let i = 0; i < runs; i++) ours.push(await timed(() => sweepBase(createRouteA(), pair, at)));
  const found = { size, engine: quickest(ours).cpuSeconds, script: script.cpuSeconds };
  console.log(`growth, ${n} samples × ${at.length} masses: script ${found.script.toFixed(2)} s, engine ${found.engine.toFixed(3)} s`);
  return found;
}

/** How the sweep's cost grows with samples and with masses; writes one figure each. */
export async function benchGrowth(pair: readonly [Waveform, Waveform], reference: Reference, folder: string): Promise<readonly Growth[]> {
  const path = join(folder, 'growth.bin');
  const bySamples: GrowthPoint[] = [];
  for (const n of sampleCounts) bySamples.push(await costOf(n, makePair(n), n, masses, reference, path));
  const byMasses: GrowthPoint[] = [];
  for (const n of massCounts) byMasses.push(await costOf(n, pair, samples, massesBetween(n), reference, path));
  const found = [
    { what: `samples a record, ${masses.length} masses`, axis: 'samples of a record', figure: 'bench-growth-samples.svg', points: bySamples },
    { what: 'masses, records of 10⁶ samples', axis: 'masses of a sweep', figure: 'bench-growth-masses.svg', points: byMasses },
  ];
  for (const growth of found) growthFigure(growth);
  return found;
}

const rowOf = ({ size, engine, script }: GrowthPoint): string => `| ${size} | ${script.toFixed(2)} | ${engine.toFixed(3)} | ${(script / engine).toFixed(1)} × |`;

export const growthText = (growths: readonly Growth[]): string =>
  growths
    .map(
      ({ what, axis, figure, points }) => `How the cost of a sweep grows with ${what} (curve A2; one run of the script, the quickest of ${runs} of the engine):

| ${axis} | script, processor s | engine, processor s | ratio |
| --- | --- | --- | --- |
${points.map(rowOf).join('\n')}

![Processor seconds of script and engine by ${axis}, both axes logarithmic](${figure})`,
    )
    .join('\n\n');
