import { describe, expect, it } from 'vitest';
import type { Mode, ModeSet, Waveform } from '@/lib/engine/contract/waveform';
import type { Guess } from '@/lib/engine/guesses/guess';
import { guessWaveform } from '@/lib/engine/guesses/guess-waveform';
import type { SyntheticWaveform } from '@/lib/engine/synthesis/synthesise';
import { MSUN_S } from '@/lib/engine/units/constants';
import { binaryOf, changed, inM } from '../findings/finding-specimen';

/** Modes of m > 0; those of both signs have tests of their own below. */
const oneSign = ({ t, modes }: Pick<SyntheticWaveform, 't' | 'modes'>) => ({ t, modes: modes.filter(({ m }) => m > 0) });
const house = (massRatio = 1) => oneSign(binaryOf({ massRatio, mOmega0: 0.022 }));
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

  it.each([[2, 'twice what is declared'], [0.5, 'half of what is declared'], [0.6308, 'the face-on angular factor 0.631 already in it']])('tell a factor of %d', (factor, proposed) => {
    expect(brief(contradictions(inM(scaled(factor), known())))).toEqual([`normalisation: ${proposed}`]);
  });

  it('are rougher without a mass ratio, and silent on all of it without (2,2)', () => {
    const found = guessWaveform(inM(house()));
    expect(found.map(({ about, agrees }) => `${about} ${agrees}`)).toEqual(['rotation true', 'time-unit true', 'variable true']);
    expect(found.at(-1)?.confidence).toBe(0.75);
    expect(brief(contradictions(inM(derived(house()))))).toEqual(['variable: news']);
    const { modes, t } = binaryOf({ mOmega0: 0.022 });
    expect(guessWaveform(inM({ t, modes: modes.filter(({ m }) => m < 0) }, known()))).toEqual([]);
  });

  it('ask of seconds without a mass whether they are M', () => {
    const bare = { ...known(), unit: 's', amplitudeUnit: 'strain' } as const;
    expect(brief(contradictions(inM(house(), bare)))).toEqual(['time-unit: M']);
    const physical = changed({ ...house(), t: house().t.map((x) => x * 60 * MSUN_S) }, 2, 2, (re, im) => [3e-21 * re, 3e-21 * im]);
    const found = guessWaveform(inM(physical, bare));
    expect(found.map(({ about, agrees }) => `${about} ${agrees}`)).toEqual(['rotation true', 'time-unit true']);
    expect(found[1]!.reason).toMatch(/total mass of [56]\d(\.\d)? solar/);
  });

  it('tell a strain that has the distance in it', () => {
    expect(brief(contradictions(inM(scaled(1e-20), known())))).toEqual(['normalisation: strain at a distance, not r h/M']);
  });

  it('are silent on an amplitude that nothing usual explains', () => {
    expect(brief(contradictions(inM(scaled(30), known())))).toEqual([]);
  });
});

describe('guesses from both signs of m', () => {
  const several = () => oneSign(binaryOf({ massRatio: 2, mOmega0: 0.022, modes: ['22', '33', '21'] }));
  const minusOf = (by: (mode: Mode) => Mode) => {
    const { t, modes } = several();
    return inM({ t, modes: [...modes, ...modes.map(by)] }, known(2));
  };
  const conjugate = (mode: Mode, sign: number): Mode => ({ ...mode, m: -mode.m, re: mode.re.map((x) => sign * x), im: mode.im.map((x) => -sign * x) });
  const mirror = (mode: Mode): Mode => conjugate(mode, mode.l % 2 === 0 ? 1 : -1);
  const ofMinus = (waveform: Waveform) => guessWaveform(waveform).filter(({ about }) => about === 'negative-m');

  it('agree with mirrors, and say nothing of a file that holds one sign', () => {
    expect(ofMinus(minusOf(mirror))).toMatchObject([{ agrees: true, value: 'given', convention: 'C24' }]);
    expect(ofMinus(inM(several()))).toEqual([]);
  });

  it('tell a mirror without (−1)^ℓ by the modes of odd ℓ', () => {
    const [found] = ofMinus(minusOf((mode) => conjugate(mode, 1)));
    expect(found).toMatchObject({ agrees: false, value: 'mirror', convention: 'C24' });
    expect(found?.reason).toContain('(3,−3)');
    expect(found?.reason).not.toContain('(2,−2)');
  });

  it('tell copies under the label −m', () => {
    expect(ofMinus(minusOf((mode) => ({ ...mode, m: -mode.m })))).toMatchObject([{ agrees: false, value: 'mirror', convention: 'C23' }]);
  });

  it('are silent where no one relation fits', () => {
    expect(ofMinus(minusOf((mode) => (mode.l === 3 ? { ...mode, m: -mode.m, re: mode.re.map((x) => 0.7 * x) } : mirror(mode))))).toEqual([]);
  });

  it('say of a reversed file with both signs that exchanged labels would look the same', () => {
    const whole = minusOf(mirror);
    const turned = { ...whole, content: { kind: 'modes' as const, modes: (whole.content as ModeSet).modes.map((mode) => ({ ...mode, im: mode.im.map((x) => -x) })) } };
    const [rotation] = contradictions(turned);
    expect(rotation).toMatchObject({ about: 'rotation', confidence: 0.8 });
    expect(rotation?.reason).toContain('C23');
  });
});
