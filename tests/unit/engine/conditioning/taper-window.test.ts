import { describe, expect, it } from 'vitest';
import { completeModes } from '@/lib/engine/conditioning/complete-modes';
import { selectModes } from '@/lib/engine/conditioning/select-modes';
import { measureTaper, taperWeightAt } from '@/lib/engine/conditioning/taper-window';
import { columns, inMasses } from '../../../support/detector-claims';

const axis = Float64Array.from({ length: 4001 }, (_, i) => -200 + i / 10);
/** e^{−iωt} with an envelope: one cycle every 2π/ω. */
const mode = (l: number, m: number, omega: number, size: (t: number) => number) => ({
  l,
  m,
  re: axis.map((t) => size(t) * Math.cos(omega * t)),
  im: axis.map((t) => -size(t) * Math.sin(omega * t)),
});
const steady = () => 1;
const omega = (2 * Math.PI) / 25;
const wave = (...modes: ReturnType<typeof mode>[]) => inMasses('A', axis, modes);
const taperOf = (w: ReturnType<typeof wave>, taper: 'auto' | 'none' | number = 'auto') => measureTaper(w, w, taper);

describe('the taper', () => {
  it('covers two cycles at an open start and one at an open end', () => {
    const { window, tooShort } = taperOf(wave(mode(2, 2, omega, steady)));
    expect(window.start).toEqual({ from: -200, to: expect.closeTo(-150, 9) as number });
    expect(window.end).toEqual({ from: expect.closeTo(175, 9) as number, to: 200 });
    expect(tooShort).toBe(false);
  });

  it('multiplies the ramps by a number, and leaves them out for "none"', () => {
    const w = wave(mode(2, 2, omega, steady));
    expect(taperOf(w, 0.5).window.start!.to).toAgreeWith(-175, 1e-9);
    expect(taperOf(w, 2).window.end!.from).toAgreeWith(150, 1e-9);
    expect(taperOf(w, 'none').window).toEqual({ start: null, end: null });
  });

  it('leaves quiet ends alone: below a thousandth of the peak', () => {
    const quiet = (level: number) => wave(mode(2, 2, omega, (t) => (t < -199.95 ? level : 1)));
    expect(taperOf(quiet(0.9e-3)).window.start).toBeNull();
    expect(taperOf(quiet(1.1e-3)).window.start).not.toBeNull();
  });

  it('is opened by any mode in use, and counts the cycles of the strongest with m > 0', () => {
    const burst = mode(2, 2, omega, (t) => Math.exp(-((t / 20) ** 2)));
    const weak = mode(3, 3, 1.5 * omega, () => 0.01);
    const { window } = taperOf(wave(burst, weak));
    expect(window.start!.to).toAgreeWith(-150, 1e-9);
    const loud = mode(3, -3, 3 * omega, () => 5);
    expect(taperOf(wave(burst, weak, loud)).window.start!.to).toAgreeWith(-150, 1e-9);
  });

  it('counts zero crossings of a lone real column: four and two', () => {
    const plus = axis.map((t) => Math.sin(omega * t + 1));
    const { window } = taperOf(columns('P', axis, plus, null) as ReturnType<typeof wave>);
    const crossing = (k: number) => (k * Math.PI - 1) / omega;
    const after = Array.from({ length: 60 }, (_, k) => crossing(k - 30)).filter((t) => t > -200 && t < 200);
    expect(window.start!.to).toAgreeWith(after[3]!, 1e-3);
    expect(window.end!.from).toAgreeWith(after.at(-2)!, 1e-3);
  });

  it('reads the frequency where the start ramp ends', () => {
    expect(taperOf(wave(mode(2, 2, omega, steady))).frequencyAtRampEnd).toAgreeWith(1 / 25, 1e-9);
    expect(taperOf(wave(mode(2, 2, omega, (t) => Math.exp(-((t / 20) ** 2))))).frequencyAtRampEnd).toBeNull();
  });

  it('says when the record is shorter than its ramp', () => {
    expect(taperOf(wave(mode(2, 2, omega / 40, steady))).tooShort).toBe(true);
  });

  it('rises as a squared sine, is 1 between, 0 outside', () => {
    const window = { start: { from: 0, to: 4 }, end: { from: 8, to: 10 } };
    expect([-1, 0, 2, 4, 6, 9, 10, 11].map((t) => taperWeightAt(window, t))).toEqual([
      0,
      0,
      expect.closeTo(0.5, 12),
      1,
      1,
      expect.closeTo(0.5, 12),
      0,
      0,
    ]);
  });
});

describe('modes with m < 0', () => {
  const two = (l: number) => wave(mode(l, 2, omega, steady));

  it('are mirrored with (−1)^l H* when the file has none and the sheet is silent', () => {
    for (const l of [2, 3]) {
      const { waveform, mirrorAssumed } = completeModes({ ...two(l), negativeM: null });
      const partner = waveform.content.kind === 'modes' ? waveform.content.modes[1]! : null;
      const source = two(l).content;
      const given = source.kind === 'modes' ? source.modes[0]! : null;
      const sign = l === 2 ? 1 : -1;
      expect(mirrorAssumed).toBe(true);
      expect([partner!.l, partner!.m]).toEqual([l, -2]);
      expect(partner!.re[17]).toBe(sign * given!.re[17]!);
      expect(partner!.im[17]).toBe(-sign * given!.im[17]!);
    }
  });

  it('are taken as given when there are any, dropped on "none", and never doubled', () => {
    const both = wave(
      mode(2, 2, omega, steady),
      mode(2, -2, omega, () => 0.5),
      mode(3, 3, omega, steady),
    );
    const count = (negativeM: 'mirror' | 'given' | 'none' | null) => {
      const { content } = completeModes({ ...both, negativeM }).waveform;
      return content.kind === 'modes' ? content.modes.map(({ l, m }) => `${l},${m}`) : [];
    };
    expect(count(null)).toEqual(['2,2', '2,-2', '3,3']);
    expect(count('mirror')).toEqual(['2,2', '2,-2', '3,3', '3,-3']);
    expect(count('none')).toEqual(['2,2', '3,3']);
  });

  it('choose by list or by ℓ; "all" leaves out m = 0 for detectors', () => {
    const set = wave(mode(2, 2, omega, steady), mode(2, 0, omega, steady), mode(3, 3, omega, steady));
    const names = (modes: 'all' | [number, number][], lMax: number | null, withZeroM = false) => {
      const { content } = selectModes(set, { modes, lMax, withZeroM }).waveform;
      return content.kind === 'modes' ? content.modes.map(({ l, m }) => `${l},${m}`) : [];
    };
    expect(names('all', null)).toEqual(['2,2', '3,3']);
    expect(names('all', null, true)).toEqual(['2,2', '2,0', '3,3']);
    expect(names('all', 2)).toEqual(['2,2']);
    expect(
      names(
        [
          [2, 0],
          [4, 4],
        ],
        null,
      ),
    ).toEqual(['2,0']);
    expect(selectModes(set, { modes: [[4, 4]], lMax: null, withZeroM: false }).missing).toEqual([[4, 4]]);
  });
});
