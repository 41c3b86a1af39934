import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import type { Guess } from '@/lib/engine/guesses/guess';
import { guessWaveform } from '@/lib/engine/guesses/guess-waveform';
import { MSUN_S } from '@/lib/engine/units/constants';
import { binaryOf, changed, inM } from '../findings/finding-specimen';

const house = (massRatio = 1) => binaryOf({ massRatio, mOmega0: 0.022 });
const known = (massRatio = 1) => ({ binary: { massRatio } });
const contradictions = (waveform: Waveform): Guess[] => guessWaveform(waveform).filter(({ agrees }) => !agrees);
const scaled = (by: number) => changed(house(), 2, 2, (re, im) => [by * re, by * im]);
const brief = (guesses: readonly Guess[]) => guesses.map(({ about, proposed }) => `${about}: ${proposed}`);

/** d/dt of (2,2) by central differences. */
function derived(parts: ReturnType<typeof house>): ReturnType<typeof house> {
  const slope = (x: Float64Array): Float64Array => x.map((_, i) => (x[Math.min(i + 1, x.length - 1)]! - x[Math.max(i - 1, 0)]!) / (parts.t[Math.min(i + 1, x.length - 1)]! - parts.t[Math.max(i - 1, 0)]!));
  return { ...parts, modes: parts.modes.map((mode) => ({ ...mode, re: slope(mode.re), im: slope(mode.im) })) };
}

describe('guesses from the samples of a waveform', () => {
  it.each([1, 2, 4])('agree with the house form at mass ratio %d', (massRatio) => {
    const found = guessWaveform(inM(house(massRatio), known(massRatio)));
    expect(found.map(({ about }) => about)).toEqual(['rotation', 'time-unit', 'variable']);
    expect(found.every(({ agrees }) => agrees)).toBe(true);
  });

  it('tell the other sense of rotation', () => {
    const [found, ...rest] = contradictions(inM(changed(house(), 2, 2, (re, im) => [re, -im]), known()));
    expect(rest).toEqual([]);
    expect(found).toMatchObject({ about: 'rotation', convention: 'C22', confidence: 0.95 });
  });

  it('tell seconds that are declared as M, with the mass that they imply', () => {
    const parts = house();
    const inSeconds = inM({ ...parts, t: parts.t.map((x) => x * 60 * MSUN_S) }, known());
    const found = contradictions(inSeconds);
    expect(brief(found)).toEqual(['time-unit: s']);
    const mass = Number(/mass of ([\d.]+) solar/.exec(found[0]!.reason)?.[1]);
    expect(mass).toBeGreaterThan(45);
    expect(mass).toBeLessThan(75);
  });

  it('tell M that is declared as seconds', () => {
    expect(brief(contradictions(inM(house(), { ...known(), unit: 's', ownTotalMassMsun: 60 })))).toEqual(['time-unit: M']);
  });

  it('tell the derivative from the strain, both ways', () => {
    const [news, psi4] = [derived(house()), derived(derived(house()))];
    expect(brief(contradictions(inM(news, known())))).toEqual(['variable: news']);
    expect(brief(contradictions(inM(psi4, known())))).toEqual(['variable: psi4']);
    expect(contradictions(inM(news, { ...known(), variable: 'news' }))).toEqual([]);
    expect(contradictions(inM(psi4, { ...known(), variable: 'psi4' }))).toEqual([]);
    expect(brief(contradictions(inM(house(), { ...known(), variable: 'psi4' })))).toEqual(['variable: strain']);
  });

  it.each([[2, 'twice the declared'], [0.5, 'half the declared'], [0.6308, 'the face-on angular factor 0.631 already in it']])('tell a factor of %d', (factor, proposed) => {
    expect(brief(contradictions(inM(scaled(factor), known())))).toEqual([`normalisation: ${proposed}`]);
  });

  it('are silent on amplitude and time without a mass ratio, and on all of it without (2,2)', () => {
    expect(guessWaveform(inM(house())).map(({ about }) => about)).toEqual(['rotation']);
    const { modes, t } = house();
    expect(guessWaveform(inM({ t, modes: modes.filter(({ m }) => m < 0) }, known()))).toEqual([]);
  });

  it('are silent on an amplitude that nothing usual explains', () => {
    expect(brief(contradictions(inM(scaled(30), known())))).toEqual([]);
  });
});
