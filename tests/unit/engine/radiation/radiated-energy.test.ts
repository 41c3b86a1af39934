import { describe, expect, it } from 'vitest';
import { Cancelled } from '@/lib/engine/contract/quantity';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { radiatedEnergy } from '@/lib/engine/quantities/radiated-energy';
import { MSUN_PER_MPC, MSUN_S } from '@/lib/engine/units/constants';
import { evenTimes, gaussian, measureEnergyOf, modeFrom, modeSet } from '../../../golden/energy-signals';

const axis = evenTimes(-100, 80, 0.25);
const mode = (l: number, m: number, amplitude: number, omega = 0.35) => modeFrom(axis, l, m, gaussian(amplitude, 9, omega, 0));
const pair = [mode(2, 2, 0.12), mode(2, -2, 0.12, -0.35), mode(3, 3, 0.03, 0.5), mode(3, -3, 0.03, -0.5)];
const wave = modeSet(axis, pair, 'strain', { massRatio: 1, admEnergy: 0.99, remnantMass: 0.95 });
const value = (w: Waveform, settings = {}): number => measureEnergyOf(w, settings).points[0]?.value ?? Number.NaN;
const codes = (w: Waveform, settings = {}): string[] => measureEnergyOf(w, settings).findings.map(({ code, level }) => `${code} ${level}`);

describe('radiated energy, definition', () => {
  it('is the sum of its components', () => {
    const [point] = measureEnergyOf(wave).points;
    const { before, ...modes } = point!.components!;
    expect(Object.keys(modes).sort()).toEqual(['E:2,-2', 'E:2,2', 'E:3,-3', 'E:3,3']);
    expect(before).toBe(0);
    expect(Object.values(modes).reduce<number>((sum, e) => sum + e!, 0)).toAgreeWith(point!.value!, 1e-16);
  });

  it('is the same for a physical strain in seconds with its own mass and distance', () => {
    const [mass, distance] = [62, 410];
    const strain = (x: number): number => (x * mass * MSUN_PER_MPC) / distance;
    const physical: Waveform = {
      ...wave, unit: 's', amplitudeUnit: 'strain', ownTotalMassMsun: mass, ownDistanceMpc: distance,
      axis: axis.map((t) => t * mass * MSUN_S), uniformStep: 0.25 * mass * MSUN_S,
      content: { kind: 'modes', modes: pair.map((m) => ({ ...m, re: m.re.map(strain), im: m.im.map(strain) })) },
    };
    expect(value(physical) / value(wave)).toAgreeWith(1, 1e-12);
    expect(value(physical, { startM: -5 }) / value(wave, { startM: -5 })).toAgreeWith(1, 1e-11);
  });

  it('does not care whether the samples are even', () => {
    const warped = Float64Array.from({ length: 900 }, (_, i) => -100 + 0.2 * i + 2 * Math.sin(i / 20) - 2 * Math.sin(899 / 20) * (i / 899));
    const uneven = modeSet(warped, [modeFrom(warped, 2, 2, gaussian(0.12, 9, 0.35, 0))]);
    const [point] = measureEnergyOf(uneven).points;
    const even = value(modeSet(axis, [mode(2, 2, 0.12)]));
    expect(point!.routes.A! / even).toAgreeWith(1, 1e-8);
    expect(point!.routes.B! / even).toAgreeWith(1, 1e-8);
  });

  it('refers to M, the initial or the remnant mass', () => {
    expect(value(wave, { normaliseBy: 'adm' })).toAgreeWith(value(wave) / 0.99, 1e-16);
    expect(value(wave, { normaliseBy: 'remnant' })).toAgreeWith(value(wave) / 0.95, 1e-16);
  });

  it('contains modes with m = 0, and counts mirrored partners', () => {
    const memory = mode(2, 0, 0.05, 0.1);
    expect(value({ ...wave, content: { kind: 'modes', modes: [...pair, memory] } })).toBeGreaterThan(value(wave) * 1.001);
    const half = { ...modeSet(axis, [mode(2, 2, 0.12), mode(3, 3, 0.03, 0.5)]), negativeM: null };
    expect(value(half)).toAgreeWith(value(wave), { relative: 1e-12 });
    expect(value({ ...half, negativeM: 'none' })).toAgreeWith(value(wave) / 2, { relative: 1e-12 });
    expect(codes(half)).toEqual(['engine/negative-m-assumed needs-answer']);
    expect(codes({ ...half, negativeM: 'mirror' })).toEqual([]);
  });

  it('starts where the file says that its transient ends', () => {
    expect(value({ ...wave, junkEndM: -3 })).toBe(value(wave, { startM: -3 }));
    expect(measureEnergyOf({ ...wave, junkEndM: -3 }).assumed).not.toContain('startM');
    expect(measureEnergyOf(wave).assumed).toEqual(['modes', 'startM', 'includeEnergyBeforeStart', 'normaliseBy']);
  });
});

describe('radiated energy, sweeps', () => {
  it('falls as the start moves on, and route B runs at every point up to ten', () => {
    const m = measureEnergyOf(wave, {}, { setting: 'startM', values: [-50, -10, 0, 10] });
    const values = m.points.map((p) => p.value!);
    expect([...values].sort((a, b) => b - a)).toEqual(values);
    expect(m.routeBPoints).toEqual([0, 1, 2, 3]);
    expect(m.settings.find(({ name }) => name === 'startM')?.standing).toBe('swept');
  });

  it('spreads route B over long sweeps, ends included', () => {
    const values = Array.from({ length: 40 }, (_, i) => -50 + i);
    const m = measureEnergyOf(wave, {}, { setting: 'startM', values });
    expect(m.routeBPoints.length).toBeLessThanOrEqual(11);
    expect(m.routeBPoints).toContain(0);
    expect(m.routeBPoints).toContain(39);
    m.points.forEach((p, i) => expect(p.routes.B === null).toBe(!m.routeBPoints.includes(i)));
  });

  it.each([true, 'removed'] as const)('reads the start of what is added (%s) from the (2,2) mode of the file, whatever modes are summed', (includeEnergyBeforeStart) => {
    const settings = { includeEnergyBeforeStart, startM: -20 };
    const [all, some] = [measureEnergyOf(wave, settings), measureEnergyOf(wave, { ...settings, modes: [[3, 3], [3, -3]] })].map(({ points }) => points[0]!);
    const { 'E:3,3': up, 'E:3,-3': down, before } = some!.components!;
    expect(before).toBe(all!.components!.before);
    expect(before!).toBeGreaterThan(0);
    expect(some!.value).toAgreeWith(up! + down! + before!, 1e-15);
    expect(some!.routes.B! / some!.routes.A!).toAgreeWith(1, 1e-6);
  });

  it('leaves out what lies above lMax', () => {
    const [two, three] = measureEnergyOf(wave, {}, { setting: 'lMax', values: [2, 3] }).points;
    expect(two!.value).toAgreeWith(value(wave, { modes: [[2, 2], [2, -2]] }), 1e-18);
    expect(three!.value).toAgreeWith(value(wave), 1e-18);
  });
});

describe('radiated energy, refusals and questions', () => {
  it('needs a mass ratio before it adds what came before the start', () => {
    const bare = { ...wave, binary: {} };
    const inputs = (a: Waveform) => ({ of: { a }, noise: null });
    expect(radiatedEnergy.required(inputs(bare), { includeEnergyBeforeStart: true }, null)).toEqual(['massRatio']);
    expect(radiatedEnergy.required(inputs(wave), { includeEnergyBeforeStart: true }, null)).toEqual([]);
    expect(radiatedEnergy.required(inputs(bare), { includeEnergyBeforeStart: 'removed', massRatio: 2 }, null)).toEqual([]);
    expect(radiatedEnergy.required(inputs(bare), {}, null)).toEqual([]);
  });

  it.each([
    ['a start outside the record', wave, { startM: 500 }],
    ['a start before the record', wave, { startM: -500 }],
    ['modes that are not there', wave, { modes: [[4, 4]] as const }],
    ['an initial mass that nobody stated', { ...wave, binary: {} }, { normaliseBy: 'adm' as const }],
    ['one line of sight', { ...wave, content: { kind: 'line-of-sight' as const, plus: axis, cross: null } }, {}],
    ['physical strain without a mass', { ...wave, unit: 's' as const, amplitudeUnit: 'strain' as const }, {}],
    ['silence', modeSet(axis, [mode(2, 2, 0)]), {}],
  ])('stops at %s, and says why', (_, w, settings) => {
    const m = measureEnergyOf(w as Waveform, settings);
    expect(m.points.every((p) => p.value === null)).toBe(true);
    expect(m.findings.length).toBeGreaterThan(0);
    for (const finding of m.findings) {
      expect(finding.level).toBe('stops-lodging');
      expect(finding.text).not.toContain('NaN');
      expect(finding.fix).toBeTruthy();
    }
  });

  it('asks about coarse sampling, and stops below four samples a period', () => {
    const coarse = (step: number): Waveform => {
      const t = evenTimes(-81, 81, step);
      return modeSet(t, [modeFrom(t, 2, 2, gaussian(0.1, 9, 0.35, 0)), modeFrom(t, 2, -2, gaussian(0.1, 9, -0.35, 0)), modeFrom(t, 3, 3, gaussian(0.001, 9, 0.35, 0))]);
    };
    expect(codes(coarse(1))).toEqual([]);
    expect(codes(coarse(2))).toEqual(['engine/sampling worth-a-look']);
    const stopped = measureEnergyOf(coarse(5));
    expect(stopped.points[0]!.value).toBeNull();
  });

  it('says that modes are missing', () => {
    expect(codes(modeSet(axis, [mode(2, 2, 0.1), mode(3, 3, 0.01)]))).toEqual(['engine/modes-missing worth-a-look']);
    expect(codes(modeSet(axis, [mode(2, 2, 0.1), mode(2, -2, 0.1, -0.35)]))).toEqual(['engine/modes-missing worth-a-look']);
    expect(codes(modeSet(axis, [mode(2, 2, 0.1), mode(2, -2, 0.1, -0.35)]), { lMax: 2 })).toEqual([]);
    expect(codes(wave, { modes: [[2, 2], [5, 5]] })).toEqual(['engine/modes-missing worth-a-look']);
  });

  it('can be cancelled', () => {
    const request = { claimId: 'E', inputs: { of: { a: wave }, noise: null }, settings: {}, over: null, claimed: [null], withFigures: false };
    expect(() => radiatedEnergy.measure(request, { onProgress: () => undefined, cancelled: () => true })).toThrow(Cancelled);
  });
});

describe('radiated energy, budget and figures', () => {
  it('makes U of the computation alone and marks as unknown what one file cannot show', () => {
    const { budget, points } = measureEnergyOf({ ...wave, significantDigits: 6 });
    const own = budget.filter(({ group }) => group === 'computation').map(({ u }) => u!);
    expect(2 * Math.hypot(...own)).toAgreeWith(points[0]!.expandedUncertainty!, { relative: 1e-12 });
    const unknown = budget.filter(({ u }) => u === null).map(({ id }) => id);
    expect(unknown).toEqual(['E05', 'E06']);
    expect(budget.map(({ id }) => id)).toEqual(['E01', 'E02', 'rounding', 'E05', 'E06', 'E07', 'E09']);
  });

  it('lists the floor for ψ4 alone', () => {
    const psi = modeSet(axis, [modeFrom(axis, 2, 2, gaussian(0.1, 9, 0.35, 2)), modeFrom(axis, 3, 3, gaussian(0.01, 9, 0.5, 2))], 'psi4');
    const { budget, assumed } = measureEnergyOf(psi);
    expect(budget.map(({ id }) => id)).toContain('E08');
    expect(assumed).toContain('integrationFloor');
  });

  it('covers what rounding the file to four digits does', () => {
    const round = (x: number): number => Number(x.toPrecision(4));
    const rounded = modeSet(axis, pair.map((m) => ({ ...m, re: m.re.map(round), im: m.im.map(round) })));
    const [point] = measureEnergyOf({ ...rounded, significantDigits: 4 }).points;
    const off = Math.abs(point!.value! - value(wave));
    expect(off).toBeGreaterThan(0);
    expect(point!.expandedUncertainty!).toBeGreaterThan(off);
    expect(point!.expandedUncertainty!).toBeLessThan(2e-3 * point!.value!);
  });

  it('draws flux and running energy only when asked, and ends at the energy', () => {
    expect(measureEnergyOf(wave).figures).toEqual([]);
    const [figure] = measureEnergyOf(wave, {}, null, true).figures;
    expect(figure!.kind).toBe('flux');
    expect(figure!.x.values.length).toBeLessThanOrEqual(1201);
    expect(figure!.series[1]!.values.at(-1)).toAgreeWith(value(wave), { relative: 1e-3 });
  });

  it('gives the same bytes twice', () => {
    expect(JSON.stringify(measureEnergyOf(wave, {}, null, true))).toBe(JSON.stringify(measureEnergyOf(wave, {}, null, true)));
  });
});
