import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { recoil } from '@/lib/engine/quantities/recoil';
import { radiatedAngularMomentum } from '@/lib/engine/quantities/radiated-angular-momentum';
import { allModes, synthesise } from '@/lib/engine/synthesis/synthesise';
import { open } from '../unit/formats/array-waves';
import { measureOf, modeSet } from './energy-signals';
import { runFolder } from './run-folder';

const { t, modes } = synthesise({ massRatio: 2, chi1z: 0, chi2z: 0, mOmega0: 0.04, stepM: 0.5, modes: allModes });
const house: Waveform = modeSet(t, modes, 'strain', { massRatio: 2 });
const conjugated = (all: readonly Mode[]): Mode[] => all.map((mode) => ({ ...mode, im: mode.im.map((x) => -x) }));
const relabelled = (all: readonly Mode[]): Mode[] => all.map(({ l, m, re, im }) => ({ l, m: -m, re: re.map((x) => (-1) ** l * x), im: im.map((x) => (-1) ** l * x) }));
const positive = (all: readonly Mode[]): Mode[] => all.filter(({ m }) => m > 0);

/** What a file in another convention says, as text: columns of modes, read as its sheet declares it. */
async function read(all: readonly Mode[], declared: Record<string, unknown>): Promise<Waveform> {
  const columns = ['t', ...all.flatMap(({ l, m }) => [`re${l}${m}`, `im${l}${m}`])];
  const rows = Array.from(t, (time, i) => [time, ...all.flatMap(({ re, im }) => [re[i]!, im[i]!])].join(' '));
  const bytes = new TextEncoder().encode(`${rows.join('\n')}\n`);
  const { waveform, problems } = await open({ file: 'a.txt', columns, ...declared }, async function* one() { yield bytes; });
  if (!waveform) throw new Error(problems.join());
  return waveform;
}
const vector = (wave: Waveform): number[] => {
  const { vx, vy, vz } = measureOf(recoil, wave).points[0]!.components!;
  return [vx!, vy!, vz!];
};

describe('T13: a file in another convention, read as it declares itself, is the file in the house convention', () => {
  const cases: readonly (readonly [string, readonly Mode[], Record<string, unknown>])[] = [
    ['C22: plus + i·cross instead of plus − i·cross', conjugated(modes), { polarisation: 'plus-plus-i-cross', negativeM: 'given' }],
    ['C23 and C22: m relabelled with its (−1)^ℓ, and conjugated', relabelled(conjugated(modes)), { negativeM: 'given' }],
    ['C24: only m > 0, with the mirror declared', positive(modes), { negativeM: 'mirror' }],
  ];
  it.each(cases)('%s', async (_, all, declared) => {
    const wave = await read(all, declared);
    vector(wave).forEach((v, i) => expect(v).toAgreeWith(vector(house)[i]!, 1e-9 * 140));
    expect(measureOf(radiatedAngularMomentum, wave).points[0]!.value).toAgreeWith(measureOf(radiatedAngularMomentum, house).points[0]!.value!, { relative: 1e-12 });
  });
});

describe('T16: the same inputs', () => {
  it('give the same bytes, seeded draws included', async () => {
    const folder = join(process.cwd(), 'content', 'specimens', 'nearly-circular');
    const once = async (): Promise<string> => JSON.stringify([...(await runFolder(folder)).entries()]);
    const first = await once();
    expect(await once()).toBe(first);
    expect(first.length).toBeGreaterThan(readFileSync(join(folder, 'claim.json')).length);
  }, 120_000);
});
