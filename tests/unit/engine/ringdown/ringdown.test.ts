import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { ringdownDamping } from '@/lib/engine/quantities/ringdown-damping';
import { ringdownFrequency } from '@/lib/engine/quantities/ringdown-frequency';
import { evenTimes, gaussian, modeFrom, modeSet } from '../../../golden/energy-signals';
import { measureTonesOf, swellAndRing, toneBy } from '../../../golden/tone-signals';

const OMEGA = 0.55;
const GAMMA = 0.085;
const axis = evenTimes(-300, 120, 0.5);
const shape = swellAndRing(0.3, OMEGA, GAMMA, 4);
const ring = modeSet(axis, [modeFrom(axis, 2, 2, shape)], 'strain', { remnantMass: 0.95, remnantSpin: 0.7 });
const both = [ringdownFrequency, ringdownDamping];
const codes = (a: Waveform, settings = {}): string[] => measureTonesOf(ringdownDamping, { a }, settings).findings.map(({ code, level }) => `${code} ${level}`);

/** Least-squares slope of √(t² + w²) over [a, b] in closed form: 12/(b−a)³ ∫ (t − c) √(t² + w²) dt. */
function slopeOfHyperbola(a: number, b: number, w: number): number {
  const third = (t: number): number => (t * t + w * w) ** 1.5 / 3;
  const second = (t: number): number => (t * Math.hypot(t, w) + w * w * Math.asinh(t / w)) / 2;
  const c = (a + b) / 2;
  return (12 / (b - a) ** 3) * (third(b) - third(a) - c * (second(b) - second(a)));
}

describe('a ringdown, in closed form', () => {
  it.each(['A', 'B'] as const)('is the frequency of a damped tone by route %s', (route) => {
    expect(toneBy(route, ringdownFrequency, { a: ring })).toAgreeWith(OMEGA, { relative: 1e-9 });
  });
  it.each(['A', 'B'] as const)('is the least-squares slope of ln|H| by route %s', (route) => {
    expect(toneBy(route, ringdownDamping, { a: ring })).toAgreeWith(GAMMA * slopeOfHyperbola(25, 60, 4), { relative: 1e-8 });
  });
  it.each(['A', 'B'] as const)('takes edges that lie between samples as they stand, by route %s', (route) => {
    const settings = { window: [20.13, 47.71] as const };
    expect(toneBy(route, ringdownDamping, { a: ring }, settings)).toAgreeWith(GAMMA * slopeOfHyperbola(20.13, 47.71, 4), { relative: 1e-8 });
  });
  it('refers to the remnant on demand, and says what the remnant should give', () => {
    const [point] = measureTonesOf(ringdownFrequency, { a: ring }, { normaliseBy: 'remnant' }).points;
    expect(point!.value).toAgreeWith(0.95 * OMEGA, { relative: 1e-9 });
    expect(point!.components!.predicted).toAgreeWith(0.5326, 1e-12);
    expect(measureTonesOf(ringdownDamping, { a: ring }).points[0]!.components!.predicted).toAgreeWith(0.08079 / 0.95, 1e-12);
  });
  it('states the damping time in M whatever it refers to', () => {
    const [m, remnant] = (['M', 'remnant'] as const).map((normaliseBy) => measureTonesOf(ringdownDamping, { a: ring }, { normaliseBy }).points[0]!);
    expect(m!.components!.tauM).toAgreeWith(1 / m!.value!, { relative: 1e-14 });
    expect(remnant!.components!.tauM).toBe(m!.components!.tauM);
  });
});

describe('a ringdown, what it rests on', () => {
  it('counts the window from the peak of (2,2), whichever mode is fitted', () => {
    const late = modeFrom(axis, 3, 3, (t) => swellAndRing(0.1, 0.85, 0.09, 4)(t - 6));
    const wave = modeSet(axis, [modeFrom(axis, 2, 2, shape), late]);
    expect(toneBy('A', ringdownDamping, { a: wave }, { modes: [[3, 3]] })).toAgreeWith(0.09 * slopeOfHyperbola(19, 54, 4), { relative: 1e-8 });
    expect(toneBy('B', ringdownDamping, { a: wave }, { modes: [[3, 3]] })).toAgreeWith(0.09 * slopeOfHyperbola(19, 54, 4), { relative: 1e-8 });
  });
  it('gives a mode with m < 0 the same positive frequency', () => {
    const mirror = modeFrom(axis, 2, -2, (t) => [shape(t)[0], -shape(t)[1]]);
    const wave = modeSet(axis, [modeFrom(axis, 2, 2, shape), mirror]);
    for (const route of ['A', 'B'] as const) expect(toneBy(route, ringdownFrequency, { a: wave }, { modes: [[2, -2]] })).toAgreeWith(OMEGA, { relative: 1e-9 });
  });
  it('is swept over lMax, which leaves out modes above it', () => {
    const late = modeFrom(axis, 3, 3, swellAndRing(0.1, 0.85, 0.09, 4));
    const wave = modeSet(axis, [modeFrom(axis, 2, 2, shape), late]);
    for (const quantity of both) {
      expect(quantity.sweepable).toContain('lMax');
      const { points, settings, assumed } = measureTonesOf(quantity, { a: wave }, { modes: [[2, 2], [3, 3]] }, { setting: 'lMax', values: [2, 3] });
      expect(points[0]!.value).toBe(points[1]!.value);
      expect(settings).toContainEqual(expect.objectContaining({ name: 'lMax', standing: 'swept' }));
      expect(assumed).not.toContain('lMax');
    }
    expect(codes(wave, { modes: [[3, 3]], lMax: 2 })).toEqual(['engine/modes-missing stops-lodging']);
    expect(toneBy('A', ringdownFrequency, { a: wave }, { modes: [[3, 3]], lMax: 3 })).toAgreeWith(0.85, { relative: 1e-9 });
  });
  it('lists the mirror rule only where the mode that is fitted was made up by it', () => {
    const open = { ...ring, negativeM: null };
    expect(measureTonesOf(ringdownFrequency, { a: open }, { modes: [[2, -2]] }).assumed).toContain('negativeM');
    expect(measureTonesOf(ringdownFrequency, { a: open }).assumed).not.toContain('negativeM');
  });
  it('lists the defaults that could matter', () => {
    expect(measureTonesOf(ringdownFrequency, { a: ring }).assumed).toEqual(['window', 'normaliseBy']);
    expect(measureTonesOf(ringdownFrequency, { a: { ...ring, binary: {} } }, { window: [25, 60] }).assumed).toEqual([]);
    expect(measureTonesOf(ringdownFrequency, { a: ring }).settings.map(({ name, value }) => [name, value])).toEqual([['modes', [[2, 2]]], ['window', [25, 60]], ['normaliseBy', 'M']]);
  });
  it('lists the choice of window beside U, and never in it', () => {
    const { budget, points } = measureTonesOf(ringdownDamping, { a: { ...ring, significantDigits: 8 } });
    const line = (id: string) => budget.find((entry) => entry.id === id);
    expect(line('E15')).toMatchObject({ group: 'coverage' });
    expect(line('E15')!.u).toBeGreaterThan(1e-5);
    expect(points[0]!.expandedUncertainty).toBeLessThan(line('E15')!.u!);
    expect(points[0]!.expandedUncertainty).toAgreeWith(2 * Math.hypot(line('E01')!.u!, line('rounding')!.u!), { relative: 1e-12 });
    expect([line('E05')!.u, line('E06')!.u]).toEqual([null, null]);
  });
  it('draws amplitude, fitted decay and what is left of the phase', () => {
    const [figure] = measureTonesOf(ringdownDamping, { a: ring }, {}, null, true).figures;
    const residual = figure!.series[2]!.values.filter((v) => v !== null);
    expect(figure!.series.map(({ values }) => values.length)).toEqual([1, 1, 1].map(() => figure!.x.values.length));
    expect(residual.length).toBeGreaterThan(50);
    expect(Math.max(...residual.map(Math.abs))).toBeLessThan(1e-6);
  });
});

describe('a ringdown of ψ₄ and of news', () => {
  const smooth = evenTimes(-400, 160, 0.25);
  const by = (variable: 'strain' | 'news' | 'psi4', order: 0 | 1 | 2): Waveform => modeSet(smooth, [modeFrom(smooth, 2, 2, gaussian(0.3, 14, 0.5, order))], variable);
  it.each([['news', 1], ['psi4', 2]] as const)('is that of the strain, from %s by both routes', (variable, order) => {
    const settings = { window: [8, 30] as const, integrationFloor: 0.1 };
    for (const quantity of both)
      for (const route of ['A', 'B'] as const) {
        const value = toneBy(route, quantity, { a: by('strain', 0) }, settings);
        expect(toneBy(route, quantity, { a: by(variable, order) }, settings)).toAgreeWith(value, { relative: 1e-5 });
      }
  });
  it('lists the floor as chosen, and reads it from the start when nobody declares it', () => {
    const { settings, assumed, budget } = measureTonesOf(ringdownFrequency, { a: by('psi4', 2) }, { window: [8, 30] });
    expect(settings.map(({ name }) => name)).toEqual(['modes', 'window', 'normaliseBy', 'startM', 'integrationFloor']);
    expect(assumed).toEqual(['startM', 'integrationFloor']);
    expect(budget.map(({ id }) => id)).toEqual(['E01', 'E02', 'rounding', 'E05', 'E06', 'E08', 'E15']);
  });
});

describe('a ringdown, what stops it or is said beside it', () => {
  it('has no number without the mode, without a peak, or with a window outside the record', () => {
    expect(codes(ring, { modes: [[3, 3]] })).toEqual(['engine/modes-missing stops-lodging']);
    const rising = evenTimes(-300, -10, 0.5);
    expect(codes(modeSet(rising, [modeFrom(rising, 2, 2, shape)]))).toEqual(['engine/no-signal stops-lodging']);
    expect(codes(ring, { window: [100, 200] })).toEqual(['engine/no-signal stops-lodging']);
    expect(codes({ ...ring, binary: {} }, { normaliseBy: 'remnant' })).toEqual(['engine/normaliser-missing stops-lodging']);
  });
  it('has no decay rate before the peak', () => {
    expect(codes(ring, { window: [-80, -40] })).toContain('engine/no-signal stops-lodging');
  });
  it('ends the fit where the record ends, and says so', () => {
    const short = evenTimes(-300, 50, 0.5);
    const cut = modeSet(short, [modeFrom(short, 2, 2, shape)]);
    expect(codes(cut)).toEqual(['engine/short-ringdown worth-a-look']);
    expect(toneBy('A', ringdownDamping, { a: cut })).toAgreeWith(GAMMA * slopeOfHyperbola(25, 50, 4), { relative: 1e-8 });
    expect(toneBy('B', ringdownDamping, { a: cut })).toAgreeWith(GAMMA * slopeOfHyperbola(25, 50, 4), { relative: 1e-6 });
    expect(codes(ring)).toEqual([]);
  });
  it('notes where the decay stalls, and asks about a mode that was mirrored', () => {
    const floored = modeFrom(axis, 2, 2, (t) => [shape(t)[0] + 0.004, shape(t)[1]]);
    expect(codes(modeSet(axis, [floored]))).toContain('engine/noise-floor note');
    expect(codes({ ...ring, negativeM: null }, { modes: [[2, -2]] })).toEqual(['engine/negative-m-assumed needs-answer']);
    expect(codes({ ...ring, negativeM: 'mirror' }, { modes: [[2, -2]] })).toEqual([]);
  });
  it('asks for samples: fewer than twelve a period are worth a look, fewer than four stop', () => {
    const at = (step: number): Waveform => {
      const coarse = evenTimes(-300, 120, step);
      return modeSet(coarse, [modeFrom(coarse, 2, 2, shape)]);
    };
    expect(codes(at(1.5))).toEqual(['engine/sampling worth-a-look']);
    expect(codes(at(3))).toEqual(['engine/sampling stops-lodging']);
  });
});

describe('a ringdown, what leaves it alone', () => {
  it.each(both)('$id does not change with the zero of time, a constant phase, a factor or uneven samples', (quantity) => {
    const value = toneBy('A', quantity, { a: ring });
    const later = axis.map((t) => t + 1234.5);
    const moved = modeSet(later, [modeFrom(later, 2, 2, (t) => swellAndRing(7e-3, OMEGA, GAMMA, 4, 1.1)(t - 1234.5))]);
    const warped = Float64Array.from({ length: 1400 }, (_, i) => -300 + 0.3 * i + 2 * Math.sin(i / 25));
    const uneven = modeSet(warped, [modeFrom(warped, 2, 2, shape)]);
    for (const route of ['A', 'B'] as const) {
      expect(toneBy(route, quantity, { a: moved })).toAgreeWith(value, { relative: 1e-8 });
      expect(toneBy(route, quantity, { a: uneven })).toAgreeWith(value, { relative: 1e-8 });
    }
  });
});
