import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { cycles } from '@/lib/engine/quantities/cycles';
import { eccentricity } from '@/lib/engine/quantities/eccentricity';
import { synthesise } from '@/lib/engine/synthesis/synthesise';
import { evenTimes, measureOf, modeFrom, modeSet, numberBy } from '../../../golden/energy-signals';

const routes = ['A', 'B'] as const;

/** Phase ωt + εt² + s·sin(νt + p) under a hump whose top is at t = 800. */
interface Swing {
  readonly size?: number;
  readonly sense?: 1 | -1;
}
const [OMEGA, RISE, NU] = [0.06, 2e-5, 0.025];
const phaseAt = (t: number, size: number): number => OMEGA * t + RISE * t * t + size * Math.sin(NU * t + 0.4);
const spiral = ({ size = 0, sense = 1 }: Swing = {}, step = 1): Waveform => {
  const axis = evenTimes(0, 1000, step);
  return modeSet(axis, [
    modeFrom(axis, 2, 2, (t) => {
      const [a, p] = [0.1 / Math.cosh((t - 800) / 300), sense * phaseAt(t, size)];
      return [a * Math.cos(p), -a * Math.sin(p)];
    }),
  ]);
};
const turns = (from: number, to: number, size = 0): number => (phaseAt(to, size) - phaseAt(from, size)) / (2 * Math.PI);

describe('a count of cycles', () => {
  it('is that of the closed form between edges off the samples, for either sense', () => {
    for (const route of routes)
      for (const sense of [1, -1] as const) expect(numberBy(cycles, route, spiral({ size: 0.3, sense }), { window: [100.3, 700.7] })).toAgreeWith(turns(100.3, 700.7, 0.3), 1e-9);
  });
  it('runs from the start to the peak when no window is declared', () => {
    const { points, assumed, settings } = measureOf(cycles, spiral());
    expect(points[0]!.value).toAgreeWith(turns(0, 800), 1e-5);
    expect(points[0]!.routes.B).toAgreeWith(turns(0, 800), 1e-5);
    expect(assumed).toEqual(['window']);
    expect(settings.find(({ name }) => name === 'window')!.value).toEqual([0, expect.closeTo(800, 3)]);
    expect(measureOf(cycles, { ...spiral(), junkEndM: 150 }).points[0]!.value).toAgreeWith(turns(150, 800), 1e-5);
    expect(measureOf(cycles, spiral(), { startM: 200 }).points[0]!.value).toAgreeWith(turns(200, 800), 1e-5);
  });
  it('ends with a record that has no peak inside', () => {
    const axis = evenTimes(0, 400, 1);
    const rising = modeSet(axis, [modeFrom(axis, 2, 2, (t) => [0.1 * Math.exp(t / 400) * Math.cos(0.1 * t), -0.1 * Math.exp(t / 400) * Math.sin(0.1 * t)])]);
    expect(numberBy(cycles, 'A', rising)).toAgreeWith((0.1 * 400) / (2 * Math.PI), 1e-8);
  });
  it('follows (2,2) though another mode is louder, and the loudest where there is no (2,2)', () => {
    const axis = evenTimes(0, 300, 0.5);
    const tone = (l: number, m: number, omega: number, size: number) => modeFrom(axis, l, m, (t) => [size * Math.cos(omega * t), -size * Math.sin(omega * t)]);
    const window = [10, 200] as const;
    expect(numberBy(cycles, 'A', modeSet(axis, [tone(2, 2, 0.2, 0.1), tone(3, 3, 0.3, 0.5)]), { window })).toAgreeWith((0.2 * 190) / (2 * Math.PI), 1e-9);
    expect(numberBy(cycles, 'A', modeSet(axis, [tone(2, 1, 0.1, 0.1), tone(3, 3, 0.3, 0.5)]), { window })).toAgreeWith((0.3 * 190) / (2 * Math.PI), 1e-9);
  });
  it.each([cycles, eccentricity])('$id follows the first mode that is listed, and leaves out what lies above lMax', (quantity) => {
    const axis = evenTimes(0, 300, 0.5);
    const tone = (l: number, m: number, omega: number, size: number) => modeFrom(axis, l, m, (t) => [size * Math.cos(omega * t), -size * Math.sin(omega * t)]);
    const wave = modeSet(axis, [tone(2, 1, 0.1, 0.1), tone(3, 3, 0.3, 0.5), tone(4, 4, 0.4, 0.7)]);
    const read = (settings: object) => {
      const { points, findings } = measureOf(quantity, wave, { window: [10, 200], ...settings });
      const [point] = points;
      return point!.value === null ? findings[0]!.code : quantity === cycles ? (point!.value * 2 * Math.PI) / 190 : 2 * point!.components!.referenceFrequency!;
    };
    expect(read({ modes: [[3, 3], [2, 1]] })).toAgreeWith(0.3, 1e-9);
    expect(read({})).toAgreeWith(0.4, 1e-9);
    expect(read({ modes: 'all', lMax: 3 })).toAgreeWith(0.3, 1e-9);
    expect(read({ lMax: 2 })).toAgreeWith(0.1, 1e-9);
    expect(read({ modes: [[2, 2]] })).toBe('engine/modes-missing');
    expect(read({ modes: [[3, 3]], lMax: 2 })).toBe('engine/modes-missing');
    expect(quantity.sweepable).toEqual(['startM', 'lMax', 'integrationFloor']);
    expect(measureOf(quantity, wave, { window: [10, 200] }, { setting: 'lMax', values: [2, 3] }).points).toHaveLength(2);
    expect(measureOf(quantity, wave, { window: [10, 200] }).assumed).toEqual(['modes']);
    expect(measureOf(quantity, { ...modeSet(axis, [tone(3, 3, 0.3, 0.5)]), negativeM: null }, { window: [10, 200], modes: [[3, -3]] }).assumed).toEqual(['negativeM']);
  });
  it('reads plus and cross along a line of sight, and refuses one alone', () => {
    const axis = evenTimes(0, 300, 0.5);
    const [plus, cross] = [axis.map((t) => Math.cos(0.2 * t)), axis.map((t) => Math.sin(0.2 * t))];
    const along = { ...spiral(), axis, uniformStep: 0.5, content: { kind: 'line-of-sight', plus, cross } } as Waveform;
    expect(numberBy(cycles, 'A', along, { window: [10, 200] })).toAgreeWith((0.2 * 190) / (2 * Math.PI), 1e-9);
    expect(measureOf(cycles, { ...along, content: { kind: 'line-of-sight', plus, cross: null } } as Waveform).findings[0]!.code).toBe('engine/no-signal');
  });
  it('stops for a window outside the record, with the numbers', () => {
    const { points, findings } = measureOf(cycles, spiral(), { window: [900, 1100] });
    expect(points[0]!.value).toBeNull();
    expect(findings[0]).toMatchObject({ code: 'engine/no-signal', level: 'stops-lodging', text: expect.stringMatching(/900 to 1100 M.*from 0 to 1000 M/) });
  });
  it('counts a simulated inspiral the same from ψ4 and strain', () => {
    const { t, modes } = synthesise({ massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.04, stepM: 0.5, modes: ['22'] });
    const wave = modeSet(t, modes);
    expect(measureOf(cycles, wave).points[0]!.expandedUncertainty).toBeLessThan(0.02);
  });
});

/** Required: independent derivation — a numpy script (cubic splines on a dense grid, trapezoid, Chebyshev fit) over the same closed form. */
describe('an eccentricity', () => {
  it.each([
    [950, 0.002969501774898862],
    [700, 0.0030898641985803005],
  ])('of a swinging chirp from 50 to %d M is %d by both routes, less than the swing itself by what the polynomial takes of it', (to, expected) => {
    for (const route of routes) expect(numberBy(eccentricity, route, spiral({ size: 0.02 }), { window: [50, to] })).toAgreeWith(expected, { relative: 1e-6 });
    expect(expected / rmsOfSwing(0.02, 50, to)).toBeLessThan(1);
  });
  it('is nothing for a frequency that is itself a polynomial', () => {
    for (const route of routes) expect(numberBy(eccentricity, route, spiral(), { window: [50.5, 600.2] })).toAgreeWith(0, 1e-9);
  });
  it('gives the orbit’s frequency at the beginning of the window, for either sense', () => {
    for (const sense of [1, -1] as const) {
      const { points } = measureOf(eccentricity, spiral({ size: 0.02, sense }), { window: [100.5, 900] });
      expect(points[0]!.components!.referenceFrequency).toAgreeWith((OMEGA + 2 * RISE * 100.5 + 0.02 * NU * Math.cos(NU * 100.5 + 0.4)) / 2, 1e-9);
    }
  });
  it('leaves out 200 M at either end when no window is declared', () => {
    const { settings, assumed } = measureOf(eccentricity, spiral({ size: 0.02 }));
    expect(settings.find(({ name }) => name === 'window')!.value).toEqual([200, expect.closeTo(600, 2)]);
    expect(assumed).toEqual(['window']);
  });
  it('stops for a record too short for that, and for a window in which the mode stands still', () => {
    expect(measureOf(eccentricity, spiral(), { startM: 500 }).findings[0]!.code).toBe('engine/no-signal');
    const axis = evenTimes(0, 300, 0.5);
    const still = modeSet(axis, [modeFrom(axis, 2, 2, () => [0.1, 0])]);
    expect(measureOf(eccentricity, still, { window: [10, 200] }).points[0]!.value).toBeNull();
  });
  it('asks for a longer window where it holds fewer than three orbits', () => {
    expect(measureOf(eccentricity, spiral({ size: 0.02 }), { window: [50, 300] }).findings).toMatchObject([{ code: 'engine/few-orbits', level: 'worth-a-look' }]);
    expect(measureOf(eccentricity, spiral({ size: 0.02 }), { window: [50, 950] }).findings).toEqual([]);
  });
  it('counts the noise of few printed digits into its uncertainty', () => {
    const printed = { ...spiral({ size: 0.02 }), significantDigits: 4 };
    const exact = measureOf(eccentricity, spiral({ size: 0.02 }), { window: [50, 950] }).points[0]!;
    expect(measureOf(eccentricity, printed, { window: [50, 950] }).points[0]!.expandedUncertainty).toBeGreaterThan(10 * exact.expandedUncertainty!);
  });
  it('tolerates a fifth, or 10⁻⁴ of a circle', () => {
    expect(eccentricity.naturalTolerance(0.005)).toAgreeWith(0.001, 1e-12);
    expect(eccentricity.naturalTolerance(1e-5)).toBe(1e-4);
  });
});

/** √2·rms of size·ν cos(νt + p)/(2ω̄) over the window, ω̄ = ω + 2εt. */
function rmsOfSwing(size: number, from: number, to: number): number {
  const n = 20000;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const t = from + ((i + 0.5) * (to - from)) / n;
    sum += ((size * NU * Math.cos(NU * t + 0.4)) / (2 * (OMEGA + 2 * RISE * t))) ** 2;
  }
  return Math.sqrt((2 * sum) / n);
}
