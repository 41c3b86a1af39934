import { describe, expect, it } from 'vitest';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import { emFrequency } from '@/lib/engine/quantities/em-frequency';
import { ringdownFrequency } from '@/lib/engine/quantities/ringdown-frequency';
import { bothRoutes, codesOf, measureOfRoles, ringing, ringTimes } from '../../../golden/electromagnetic-signals';
import { evenTimes, gaussian, modeFrom, modeSet } from '../../../golden/energy-signals';

const MASS = 1e8;
const HZ = 1 / (2 * Math.PI * MASS * 4.925490947641267e-6);

/** A mode whose frequency rises as 0.2 + 0.002 t through its peak at t = 30. */
const chirpTimes = evenTimes(-80, 160, 0.4);
const chirp = modeSet(chirpTimes, [
  modeFrom(chirpTimes, 2, 2, (t) => {
    const [size, phase] = [0.3 / Math.cosh((t - 30) / 25), 0.2 * t + 1e-3 * t * t];
    return [size * Math.cos(phase), -size * Math.sin(phase)];
  }),
]);
const read = (settings: DeclaredSettings) => measureOfRoles(emFrequency, { a: chirp }, { totalMassMsun: MASS, ...settings });

describe('an electromagnetic frequency', () => {
  it('is read at the peak, and at a time between samples, by both routes', () => {
    for (const value of bothRoutes(read({ at: 'peak' }))) expect(value).toAgreeWith(HZ * 0.26, { relative: 1e-6 });
    for (const value of bothRoutes(read({ at: { timeM: -12.345 } }))) expect(value).toAgreeWith(HZ * (0.2 - 0.002 * 12.345), { relative: 1e-6 });
  });
  it('is that of the ringdown otherwise, with the ringdown’s window and U', () => {
    const a = modeSet(ringTimes, [ringing()], 'strain', { remnantMass: 0.95, remnantSpin: 0.7 });
    const [own, other] = [measureOfRoles(emFrequency, { a }, { totalMassMsun: MASS }), measureOfRoles(ringdownFrequency, { a })];
    expect(own.points[0]!.value).toAgreeWith(HZ * other.points[0]!.value!, { relative: 1e-12 });
    expect(own.points[0]!.expandedUncertainty).toAgreeWith(HZ * other.points[0]!.expandedUncertainty!, { relative: 1e-9 });
    expect(own.points[0]!.components!.checkPredictedHz).toAgreeWith((HZ * 0.5326) / 0.95, { relative: 1e-9 });
    expect(own.settings.find(({ name }) => name === 'at')).toMatchObject({ value: { ringdown: true }, standing: 'assumed' });
    expect(own.assumed).toEqual(['at', 'window']);
    const narrow = { window: [10, 40] as const };
    expect(measureOfRoles(emFrequency, { a }, { totalMassMsun: MASS, ...narrow }).points[0]!.value).toAgreeWith(HZ * measureOfRoles(ringdownFrequency, { a }, narrow).points[0]!.value!, { relative: 1e-12 });
  });
  it('falls with the mass, and says below which mass it would pass the plasma', () => {
    const a = modeSet(ringTimes, [ringing()]);
    const measured = measureOfRoles(emFrequency, { a }, { plasmaDensityCm3: 100 }, { setting: 'totalMassMsun', values: [0.1, 1e8] });
    expect(measured.points[0]!.value! / measured.points[1]!.value!).toAgreeWith(1e9, { relative: 1e-12 });
    const [light, heavy] = measured.points.map(({ components }) => components!);
    expect(light!.cutoffHz).toAgreeWith(89800, { relative: 1e-12 });
    expect(light!.massLimitMsun).toAgreeWith(heavy!.massLimitMsun!, { relative: 1e-12 });
    expect(light!.ratio).toAgreeWith(light!.massLimitMsun! / 0.1, { relative: 1e-9 });
  });
  it('notes that what lies below the cut-off does not arrive, and nothing above it', () => {
    const codes = (totalMassMsun: number) => codesOf(measureOfRoles(emFrequency, { a: modeSet(ringTimes, [ringing()]) }, { totalMassMsun }));
    expect(codes(MASS)).toEqual(['engine/below-cutoff note']);
    expect(codes(5)).toEqual([]);
  });
  it('of ψ₄ is that of the strain it integrates to', () => {
    const times = evenTimes(-400, 160, 0.25);
    const by = (variable: 'strain' | 'psi4', order: 0 | 2) => modeSet(times, [modeFrom(times, 2, 2, gaussian(0.3, 14, 0.5, order))], variable);
    const settings = { totalMassMsun: MASS, at: { timeM: 5.1 }, integrationFloor: 0.1 } as const;
    for (const value of bothRoutes(measureOfRoles(emFrequency, { a: by('psi4', 2) }, settings))) expect(value).toAgreeWith(HZ * 0.5, { relative: 1e-6 });
    expect(measureOfRoles(emFrequency, { a: by('psi4', 2) }, settings).budget.map(({ id }) => id)).toEqual(['E01', 'E02', 'rounding', 'E05', 'E06']);
  });
  it('covers the difference of its routes at coarse steps, and counts printed digits', () => {
    const coarse = evenTimes(-80, 160, 1.6);
    const a = modeSet(coarse, [modeFrom(coarse, 2, 2, (t) => [Math.cos(0.3 * t) / Math.cosh((t - 30) / 25), -Math.sin(0.3 * t) / Math.cosh((t - 30) / 25)])]);
    const plain = measureOfRoles(emFrequency, { a }, { totalMassMsun: MASS, at: 'peak' });
    const printed = measureOfRoles(emFrequency, { a: { ...a, significantDigits: 4 } }, { totalMassMsun: MASS, at: 'peak' });
    expect(printed.points[0]!.expandedUncertainty).toBeGreaterThan(plain.points[0]!.expandedUncertainty! + 1e-4 * HZ);
    const [A, B] = bothRoutes(printed);
    expect(Math.abs(A! - B!)).toBeLessThan(printed.points[0]!.expandedUncertainty!);
  });
  it('has no number at a time outside the record', () => {
    expect(codesOf(read({ at: { timeM: 500 } }))).toEqual(['engine/no-signal stops-lodging']);
  });
  it('draws its track with the value and the cut-off', () => {
    const [figure] = measureOfRoles(emFrequency, { a: chirp }, { totalMassMsun: MASS, at: 'peak' }, null, true).figures;
    const [track, value, cutoff] = figure!.series;
    const peak = figure!.x.values.findIndex((t) => t >= 0);
    expect(track!.values[peak]).toAgreeWith(value!.values[0]!, { relative: 1e-2 });
    expect(cutoff!.values[0]).toAgreeWith(8980 * Math.sqrt(0.03), { relative: 1e-12 });
  });
});
