import { describe, expect, it } from 'vitest';
import type { Guess } from '@/lib/engine/guesses/guess';
import { guessNoise } from '@/lib/engine/guesses/guess-noise';
import type { NoiseColumn, NoiseMeaning } from '@/lib/engine/guesses/noise';
import { builtInCurves } from '@/lib/engine/noise/built-in-curves';

const even = (low: number, high: number, n = 300): Float64Array => Float64Array.from({ length: n }, (_, i) => low * (high / low) ** (i / (n - 1)));
const writeAs = (s: number, f: number, meaning: NoiseMeaning): number => (meaning === 'psd' ? s : meaning === 'asd' ? Math.sqrt(s) : Math.sqrt(f * s));

interface Specimen {
  readonly curve?: string;
  readonly holds?: NoiseMeaning;
  readonly declared?: NoiseMeaning;
  readonly sided?: 'one' | 'two';
  /** On the power density. */
  readonly times?: (fHz: number) => number;
  readonly stretch?: number;
  readonly writing?: readonly string[];
}

/** A built-in curve printed with one thing different. */
function printed({ curve = 'G2', holds = 'asd', declared = holds, sided = 'one', times = () => 1, stretch = 1, writing = ['S', 'noise.txt'] }: Specimen): NoiseColumn {
  const known = builtInCurves.find(({ id }) => id === curve)!;
  const f = even(known.fLowHz, known.fHighHz);
  return { name: 'S', f: f.map((x) => x * stretch), values: f.map((x) => writeAs(known.psd(x) * times(x), x, holds)), meaning: declared, sided, writing };
}

const against = (guesses: readonly Guess[]): string[] => guesses.filter(({ agrees }) => !agrees).map(({ about, proposed }) => `${about}: ${proposed}`);
const all = (guesses: readonly Guess[]): string[] => guesses.map(({ about, proposed }) => `${about}: ${proposed}`);

describe('guesses from a noise column beside the built-in curves', () => {
  it.each(builtInCurves.map(({ id }) => id))('agree with a faithful print of %s', (curve) => {
    for (const holds of ['asd', 'psd', 'characteristic'] as const) {
      const found = guessNoise(printed({ curve, holds }));
      expect(all(found)).toEqual([`noise-column: ${holds}`, 'sided: one']);
      expect(found.every(({ agrees }) => agrees)).toBe(true);
    }
  });

  it.each([['asd', 'psd'], ['psd', 'asd'], ['characteristic', 'asd'], ['asd', 'characteristic']] as const)('tell %s that is declared as %s', (holds, declared) => {
    const found = guessNoise(printed({ holds, declared }));
    expect(against(found)).toEqual([`noise-column: ${holds}`]);
    expect(found[0]).toMatchObject({ convention: 'C01', confidence: 0.95, value: holds });
    expect(found[0]!.reason).toMatch(/G2 .*×1 in each of the octaves from 10, 40, 160, 640 and 2560 Hz/);
  });

  it('tell half and twice the power, and what of it a sheet can say', () => {
    expect(against(guessNoise(printed({ times: () => 0.5 })))).toEqual(['sided: two']);
    expect(against(guessNoise(printed({ times: () => 0.5, sided: 'two' })))).toEqual([]);
    expect(against(guessNoise(printed({ sided: 'two' })))).toEqual(['sided: one']);
    const [twice] = guessNoise(printed({ times: () => 2 })).filter(({ agrees }) => !agrees);
    expect(twice).toMatchObject({ about: 'sided', value: null, convention: 'C02' });
  });

  it('tell an angular frequency', () => {
    expect(against(guessNoise(printed({ stretch: 2 * Math.PI })))).toEqual(['curve-frequency: ω = 2πf']);
    expect(against(guessNoise(printed({ stretch: 2 * Math.PI, times: () => 1 / (2 * Math.PI) })))).toEqual(['curve-frequency: ω = 2πf']);
  });

  it('are less sure of another fit of the same detector, and surer of one that is named', () => {
    const wavy = (fHz: number): number => 1 + 0.05 * Math.sin(3 * Math.log(fHz));
    expect(guessNoise(printed({ times: wavy, declared: 'psd' }))[0]).toMatchObject({ value: 'asd', confidence: 0.75 });
    expect(guessNoise(printed({ times: wavy, declared: 'psd', writing: ['S', '# curve G2'] }))[0]).toMatchObject({ value: 'asd', confidence: 0.85 });
  });

  it('tell a slipped digit from another version by where the two part', () => {
    const slipped = (fHz: number): number => 1 + (2.4 * (30 / fHz) ** 6) / (1 + (30 / fHz) ** 6);
    const exact = (fHz: number): number => (fHz > 200 ? 1 : slipped(fHz));
    const named = guessNoise(printed({ times: exact, writing: ['S', '# second-generation design (G2)'] }));
    expect(against(named)).toEqual(['curve-version: G2 with a digit slipped']);
    expect(named.at(-1)?.reason).toContain('by octaves');
    const version = guessNoise(printed({ times: (fHz) => 3 * (1 + 0.4 * Math.log(fHz / 10)), writing: ['S', '# curve G2'] }));
    expect(against(version)).toEqual(['curve-version: another version of G2']);
    expect(version.at(-1)?.convention).toBe('C40');
  });
});

describe('guesses from size and slope, where no built-in curve fits', () => {
  /** No published curve, but a detector's: falls, then rises like f. */
  const bucket = (fHz: number): number => 1e-46 * ((60 / fHz) ** 6 + 3 + (fHz / 300) ** 2);
  const unlike = (holds: NoiseMeaning, declared: NoiseMeaning, scale = 1): NoiseColumn => {
    const f = even(12, 4000);
    return { name: 'S', f, values: f.map((x) => writeAs(scale * bucket(x), x, holds)), meaning: declared, sided: 'one', writing: ['S'] };
  };

  it.each([['asd', 'psd'], ['psd', 'asd'], ['characteristic', 'psd'], ['psd', 'characteristic']] as const)('tell %s that is declared as %s', (holds, declared) => {
    const found = guessNoise(unlike(holds, declared));
    expect(against(found)).toEqual([`noise-column: ${holds}`]);
    expect(found[0]!.reason).toMatch(/median\) and they rise as f\^/);
    expect(found[0]!.confidence).toBeLessThan(0.95);
  });

  it('agree where it is declared so, and are silent on sizes of no detector', () => {
    for (const holds of ['asd', 'psd', 'characteristic'] as const) expect(against(guessNoise(unlike(holds, holds)))).toEqual([]);
    expect(guessNoise(unlike('asd', 'psd', 1e46))).toEqual([]);
  });

  it('are silent on three points', () => {
    expect(guessNoise({ name: 'S', f: Float64Array.of(10, 100, 8192), values: Float64Array.of(3e-23, 3e-23, 3e-23), meaning: 'psd', sided: 'one', writing: ['S'] })).toEqual([]);
  });
});
