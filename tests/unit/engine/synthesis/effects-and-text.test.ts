import { describe, expect, it } from 'vitest';
import { defaultBurst, peakTime, smoothStep, withResolutionError, withStartUpBurst } from '@/lib/engine/synthesis/effects';
import { formatModesText, watermark } from '@/lib/engine/synthesis/modes-text';
import { synthesise } from '@/lib/engine/synthesis/synthesise';

const wave = synthesise({ massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.03, stepM: 0.5, modes: ['22'] });

describe('a start-up burst', () => {
  it('carries 5.2e-4 of the mass, as its closed form says', () => {
    const silent = {
      ...wave,
      modes: wave.modes.map((m) => ({ ...m, re: new Float64Array(m.re.length), im: new Float64Array(m.im.length) })),
    };
    const { modes } = withStartUpBurst(silent);
    let energy = 0;
    for (const { re, im } of modes)
      for (const x of [re, im]) for (let i = 1; i < 600; i++) energy += ((x[i + 1]! - x[i - 1]!) / 1) ** 2 * 0.5;
    const { amplitude: a, widthM: s, omega: w } = defaultBurst;
    const closedForm = 2 * a * a * Math.sqrt(Math.PI) * s * (w * w + 1 / (2 * s * s));
    expect(energy / closedForm).toBeCloseTo(1, 1);
    expect(closedForm / (16 * Math.PI)).toBeCloseTo(5.2e-4, 5);
  });
  it('mirrors in (2,−2) and leaves later times alone', () => {
    const { modes } = withStartUpBurst(wave);
    expect(modes[1]!.im[160]).toBe(-modes[0]!.im[160]!);
    expect(modes[0]!.re[150]).not.toBe(wave.modes[0]!.re[150]);
    expect(modes[0]!.re[1000]).toBe(wave.modes[0]!.re[1000]);
  });
});

describe('a resolution error', () => {
  it('turns the (2,2) phase by ε at the peak and by nothing at the start', () => {
    const peakM = peakTime(wave);
    const { modes } = withResolutionError(wave, { phaseRad: 0.3, amplitude: 0.01 }, peakM);
    const [a, b] = [wave.modes[0]!, modes[0]!];
    const i = Math.round(peakM / 0.5);
    const turned = Math.atan2(b.im[i]! * a.re[i]! - b.re[i]! * a.im[i]!, b.re[i]! * a.re[i]! + b.im[i]! * a.im[i]!);
    expect(turned).toBeCloseTo(-0.3, 12);
    expect(Math.hypot(b.re[i]!, b.im[i]!) / Math.hypot(a.re[i]!, a.im[i]!)).toBeCloseTo(1.01, 12);
    expect(b.re[0]! / a.re[0]!).toBeCloseTo(1.01, 12);
    expect([smoothStep(-1), smoothStep(0.5), smoothStep(2)]).toEqual([0, expect.closeTo(0.5, 15), 1]);
  });
});

describe('the text of a mode set', () => {
  const text = formatModesText({ title: 'Run 1', notes: ['q = 1'], t: wave.t, modes: wave.modes, significantDigits: 17 });
  const rows = text.trimEnd().split('\n');
  it('says in its header that the signal is stylised, and names its columns last', () => {
    const header = rows.filter((row) => row.startsWith('#'));
    expect(header).toContain(`# ${watermark}`);
    expect(header.at(-1)).toBe('# t re22 im22 re2-2 im2-2');
  });
  it('reads back bit for bit at seventeen digits', () => {
    const data = rows.filter((row) => !row.startsWith('#')).map((row) => row.split(' ').map(Number));
    expect(data).toHaveLength(wave.t.length);
    for (const i of [0, 1, 777, wave.t.length - 1])
      expect(data[i]).toEqual([wave.t[i]!, ...wave.modes.flatMap(({ re, im }) => [re[i]!, im[i]!])].map((x) => x + 0));
  });
});
