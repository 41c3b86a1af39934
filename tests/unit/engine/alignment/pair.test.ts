import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { amplitudeDifference } from '@/lib/engine/quantities/amplitude-difference';
import { phaseDifference } from '@/lib/engine/quantities/phase-difference';
import { evenTimes, modeFrom, modeSet } from '../../../golden/energy-signals';
import { measureTonesOf, toneBy } from '../../../golden/tone-signals';

/** A chirp that swells and fades about t = 300: φ = 0.1 t + 4e-4 t², A = sech. */
const phase = (t: number): number => 0.1 * t + 4e-4 * t * t;
const size = (t: number): number => 0.3 / Math.cosh((t - 300) / 90);
type Shape = (t: number) => readonly [amplitude: number, phase: number];
const wave = (axis: Float64Array, shape: Shape, more: Partial<Waveform> = {}): Waveform => ({
  ...modeSet(axis, [
    modeFrom(axis, 2, 2, (t) => {
      const [a, p] = shape(t);
      return [a * Math.cos(p), -a * Math.sin(p)];
    }),
  ]),
  ...more,
});
const axis = evenTimes(0, 400, 0.5);
const plain: Shape = (t) => [size(t), phase(t)];
const a = wave(axis, plain);
/** b lags by 2.5 M, is ahead by 0.6 rad at the same time of its own, 2 % louder, and drifts. */
const drifting = (drift: (t: number) => number): Waveform => wave(evenTimes(-20, 420, 0.4), (t) => [1.02 * size(t - 2.5), phase(t - 2.5) + 0.6 + drift(t - 2.5)], { name: 'B' });
const still = drifting(() => 0);
const routes = ['A', 'B'] as const;
const window = [50, 200] as const;
const point = (quantity: typeof phaseDifference, b: Waveform, settings = {}) => measureTonesOf(quantity, { a, b }, settings).points[0]!;
const codes = (b: Waveform, settings = {}, of = a): string[] => measureTonesOf(phaseDifference, { a: of, b }, settings).findings.map(({ code, level }) => `${code} ${level}`);

describe('two records that differ by a shift, a turn and a factor', () => {
  it.each(routes)('have no phase between them and 2 %% of amplitude, by route %s', (route) => {
    expect(toneBy(route, phaseDifference, { a, b: still }, { window })).toAgreeWith(0, 1e-8);
    expect(toneBy(route, amplitudeDifference, { a, b: still }, { window })).toAgreeWith(0.02, 1e-8);
  });
  it('tell shift and turn: b must be moved by the first, the second lies in (−π, π]', () => {
    const { components } = point(phaseDifference, still, { window });
    expect(components!.timeShiftM).toAgreeWith(2.5, 1e-8);
    expect(components!.phaseShiftRad).toAgreeWith(0.6, 1e-8);
    expect(components!.atM).toAgreeWith(300, 1e-6);
  });
  it('are aligned without a declared window from 10 to 40 % of the way to the peak', () => {
    const { settings, assumed } = measureTonesOf(phaseDifference, { a, b: still });
    const [from, to] = settings.find(({ name }) => name === 'window')!.value as number[];
    expect(from).toAgreeWith(30, 1e-6);
    expect(to).toAgreeWith(120, 1e-6);
    expect(assumed).toEqual(['alignment', 'window', 'at']);
  });
});

describe('a known drift of phase', () => {
  /** Zero before 200, then (t − 200)³: the window does not see it. */
  const late = (t: number): number => (t > 200 ? 2e-7 * (t - 200) ** 3 : 0);
  const b = drifting(late);
  const settings = { window };
  it.each(routes)('is read at the peak, at a time, at the end and at a frequency, by route %s', (route) => {
    expect(toneBy(route, phaseDifference, { a, b }, settings)).toAgreeWith(late(300), 1e-6);
    expect(toneBy(route, phaseDifference, { a, b }, { ...settings, at: { timeM: 250.3 } })).toAgreeWith(late(250.3), 1e-6);
    expect(toneBy(route, phaseDifference, { a, b }, { ...settings, at: 'end' })).toAgreeWith(late(400), 1e-6);
    expect(toneBy(route, phaseDifference, { a, b }, { ...settings, at: { frequencyM: 0.1 + 8e-4 * 260 } })).toAgreeWith(late(260), 1e-6);
    expect(toneBy(route, phaseDifference, { a, b }, { ...settings, at: 'window' })).toAgreeWith(0, 1e-7);
    expect(toneBy(route, phaseDifference, { a, b }, { ...settings, at: 'maximum' })).toAgreeWith(late(300), 1e-6);
  });
  it.each(routes)('keeps its sign: b behind is negative, by route %s', (route) => {
    expect(toneBy(route, phaseDifference, { a, b: drifting((t) => -late(t)) }, settings)).toAgreeWith(-late(300), 1e-6);
  });
  it('is swept over times', () => {
    const { points, routeBPoints } = measureTonesOf(phaseDifference, { a, b }, settings, { setting: 'at', values: [210, 260, 340] });
    expect(points.map(({ at }) => at)).toEqual([{ at: 210 }, { at: 260 }, { at: 340 }]);
    points.forEach(({ value, routes: { B } }, i) => {
      expect(value).toAgreeWith(late([210, 260, 340][i]!), 1e-6);
      expect(B).toAgreeWith(value!, 1e-6);
    });
    expect(routeBPoints).toEqual([0, 1, 2]);
  });
  it('that turns over many cycles is followed and not folded', () => {
    const fast = drifting((t) => (t > 200 ? 2e-5 * (t - 200) ** 3 : 0));
    for (const route of routes) expect(toneBy(route, phaseDifference, { a, b: fast }, settings)).toAgreeWith(20, 1e-5);
  });
});

describe('other alignments', () => {
  const bent: Shape = (t) => [1.02 * size(t - 2.5), phase(t - 2.5) + 0.6 + 1e-6 * (t - 302.5) ** 2];
  const b = wave(evenTimes(-20, 420, 0.4), bent, { name: 'B' });
  it.each(routes)('at the peaks leave nothing there and the rest elsewhere, by route %s', (route) => {
    expect(toneBy(route, phaseDifference, { a, b }, { alignment: 'peak' })).toAgreeWith(0, 1e-9);
    expect(toneBy(route, phaseDifference, { a, b }, { alignment: 'peak', at: { timeM: 100 } })).toAgreeWith(0.04, 1e-5);
    expect(toneBy(route, phaseDifference, { a, b }, { alignment: 'peak', at: 'maximum' })).toAgreeWith(0.09, 1e-5);
  });
  it.each(routes)('at a frequency lay both where they reach it, by route %s', (route) => {
    const settings = { alignment: { frequencyM: 0.1 + 8e-4 * 250 }, at: { timeM: 320 } } as const;
    expect(toneBy(route, phaseDifference, { a, b: still }, settings)).toAgreeWith(0, 1e-7);
    expect(point(phaseDifference, still, settings).components!.timeShiftM).toAgreeWith(2.5, 1e-7);
  });
  it.each(routes)('none compares as the files stand, by route %s', (route) => {
    const turned = wave(axis, (t) => [size(t), phase(t) + 0.3 + 2e-4 * t]);
    const settings = { alignment: 'none', at: { timeM: 150 } } as const;
    expect(toneBy(route, phaseDifference, { a, b: turned }, settings)).toAgreeWith(0.33, 1e-9);
    expect(point(phaseDifference, turned, settings).components).toMatchObject({ timeShiftM: 0, phaseShiftRad: 0, atM: 150 });
  });
  it('are not looked for where the frequency stands still: the smallest shift, and a finding', () => {
    const steady: Shape = (t) => [size(t), 0.2 * t];
    const [p, q] = [wave(axis, steady), wave(axis, (t) => [size(t), 0.2 * t + 0.4])];
    const measured = measureTonesOf(phaseDifference, { a: p, b: q }, { window });
    expect(measured.findings.map(({ code, level }) => `${code} ${level}`)).toEqual(['engine/alignment-degenerate worth-a-look']);
    expect(measured.points[0]!.components).toMatchObject({ timeShiftM: 0 });
    for (const route of routes) expect(measured.points[0]!.routes[route]).toAgreeWith(0, 1e-9);
  });
});

describe('what leaves an aligned difference alone', () => {
  const late = (t: number): number => (t > 200 ? 2e-7 * (t - 200) ** 3 : 0);
  const b = drifting(late);
  it('is the zero of b’s time, a constant phase of either and a common factor', () => {
    const value = point(phaseDifference, b, { window }).value!;
    const loud = point(amplitudeDifference, b, { window }).value!;
    const elsewhere = wave(evenTimes(480, 920, 0.4), (t) => [0.051 * size(t - 502.5) * 20, phase(t - 502.5) + 2.9 + late(t - 502.5)], { name: 'B' });
    for (const route of routes) {
      expect(toneBy(route, phaseDifference, { a, b: elsewhere }, { window })).toAgreeWith(value, 1e-6);
      expect(toneBy(route, amplitudeDifference, { a, b: elsewhere }, { window })).toAgreeWith(loud, 1e-6);
    }
  });
  it('is which of the two kinds of columns holds it', () => {
    const sight = (w: Waveform): Waveform => {
      const { content } = w;
      if (content.kind !== 'modes') throw new Error('modes expected');
      const { re, im } = content.modes[0]!;
      return { ...w, content: { kind: 'line-of-sight', plus: re, cross: im.map((x) => -x) } };
    };
    const measured = measureTonesOf(phaseDifference, { a: sight(a), b: sight(b) }, { window });
    expect(measured.points[0]!.value).toAgreeWith(point(phaseDifference, b, { window }).value!, 1e-12);
    expect(measured.settings.map(({ name }) => name)).not.toContain('modes');
  });
});

describe('what a pair rests on, and what stops it', () => {
  it('lists the window as chosen, beside U and never in it', () => {
    const text = { significantDigits: 8 };
    const { budget, points } = measureTonesOf(phaseDifference, { a: { ...a, ...text }, b: { ...drifting((t) => 1e-6 * t * t), ...text } }, { window });
    const line = (id: string) => budget.find((entry) => entry.id === id)!;
    expect(budget.map(({ id }) => id)).toEqual(['E01', 'rounding', 'E05', 'E06', 'E15']);
    expect(line('E15').group).toBe('coverage');
    expect(line('rounding').u).toBeGreaterThan(0);
    expect(points[0]!.expandedUncertainty).toAgreeWith(2 * Math.hypot(line('E01').u!, line('rounding').u!), { relative: 1e-12 });
    expect(Math.abs(points[0]!.routes.A! - points[0]!.routes.B!)).toBeLessThan(1e-7);
  });
  it('draws what is left in phase and amplitude, with the window over which the records were laid over each other', () => {
    const [figure] = measureTonesOf(phaseDifference, { a, b: still }, { window }, null, true).figures;
    expect(figure!.series.map(({ label, unit }) => [label, unit])).toEqual([['Phase difference', 'rad'], ['Alignment window', 'rad'], ['Relative amplitude difference', '']]);
    const shown = figure!.x.values.filter((_, i) => figure!.series[1]!.values[i] === 0);
    expect([shown[0]! >= window[0], shown.at(-1)! <= window[1], shown.length > 10]).toEqual([true, true, true]);
    const [unaligned] = measureTonesOf(phaseDifference, { a, b: still }, { alignment: 'none' }, null, true).figures;
    expect(unaligned!.series).toHaveLength(2);
    expect(figure!.series[2]!.values.filter((v) => v !== null).every((v) => Math.abs(v - 0.02) < 1e-5)).toBe(true);
  });
  it('has no number for a mode that one file lacks, a window or a time outside the records, or one polarisation', () => {
    expect(codes(still, { modes: [[3, 3]] })).toEqual(['engine/modes-missing stops-lodging']);
    expect(codes(still, { window: [300, 900] })).toEqual(['engine/no-signal stops-lodging']);
    expect(codes(still, { window, at: { timeM: 500 } })).toEqual(['engine/no-signal stops-lodging']);
    expect(codes(still, { alignment: { frequencyM: 9 } })).toEqual(['engine/no-signal stops-lodging']);
    const real: Waveform = { ...a, content: { kind: 'line-of-sight', plus: axis, cross: null } };
    expect(codes(real, {}, real)).toEqual(['engine/no-signal stops-lodging']);
    expect(codes(real)).toEqual(['engine/no-signal stops-lodging']);
  });
  it('asks for samples', () => {
    const coarse = wave(evenTimes(0, 400, 2), plain, { name: 'B' });
    expect(codes(coarse, { window })).toEqual(['engine/sampling worth-a-look']);
  });
});
