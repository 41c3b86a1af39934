import { describe, expect, it } from 'vitest';
import { discLuminosity } from '@/lib/engine/quantities/disc-luminosity';
import { bothRoutes, codesOf, luminosity, measureOfRoles } from '../../../golden/electromagnetic-signals';
import { evenTimes } from '../../../golden/energy-signals';

const axis = evenTimes(0, 1.6e6, 4000);
const flare = (t: number): number => 1e42 + 1.26e45 * ((t / 3e5) * Math.exp(1 - t / 3e5)) ** 2;
const disc = luminosity(axis, flare);
const settings = { totalMassMsun: 1e8 };

describe('the luminosity of a disc', () => {
  it('is its peak over Eddington’s, between samples too, by both routes', () => {
    const off = luminosity(axis.map((t) => t + 1234.5), flare);
    for (const a of [disc, off]) for (const value of bothRoutes(measureOfRoles(discLuminosity, { a }, settings))) expect(value).toAgreeWith(1.261e45 / 1.2571e46, { relative: 1e-9 });
  });
  it('knows what accretion gives, how long the gas could shine and how long it takes to move', () => {
    const [point] = measureOfRoles(discLuminosity, { a: disc }, { ...settings, radiativeEfficiency: 0.1, accretionRateMsunPerYear: 0.22, internalEnergyErg: 1e52, radiusM: 20 }).points;
    expect(point!.components!.peakErgPerS).toAgreeWith(1.261e45, { relative: 1e-9 });
    expect(point!.components!.accretionErgPerS).toAgreeWith((0.022 * 1.988409870698051e33 * 2.99792458e10 ** 2) / 31557600, { relative: 1e-6 });
    expect(point!.components!.coolingS).toAgreeWith(1e52 / 1.261e45, { relative: 1e-9 });
    expect(point!.components!.dynamicalS).toAgreeWith(20 ** 1.5 * 492.5490947641267, { relative: 1e-12 });
    const bare = measureOfRoles(discLuminosity, { a: disc }, { ...settings, radiativeEfficiency: 0.1 }).points[0]!.components!;
    expect([bare.accretionErgPerS, bare.coolingS, bare.dynamicalS]).toEqual([null, null, null]);
  });
  it('is marked where it breaks its own assumptions, and only there', () => {
    const codes = (more: object) => codesOf(measureOfRoles(discLuminosity, { a: disc }, { ...settings, ...more }));
    expect(codes({ internalEnergyErg: 1e52, radiusM: 20, radiativeEfficiency: 0.1, accretionRateMsunPerYear: 0.22 })).toEqual([]);
    expect(codes({ internalEnergyErg: 1e49, radiusM: 20 })).toEqual(['engine/cools-at-once worth-a-look']);
    expect(codes({ radiativeEfficiency: 0.1, accretionRateMsunPerYear: 1 })).toEqual(['engine/accretion-balance worth-a-look']);
    expect(codes({ totalMassMsun: 1e6 })).toEqual(['engine/above-eddington note']);
  });
  it('is a lower bound where the curve is brightest at an end, and has no number in the dark', () => {
    const decaying = measureOfRoles(discLuminosity, { a: luminosity(axis, (t) => 1e45 * Math.exp(-t / 1e5)) }, settings);
    expect(decaying.points[0]).toMatchObject({ value: 1e45 / 1.2571e46, remarks: ['lower bound only'] });
    expect(codesOf(decaying)).toEqual(['engine/peak-at-edge worth-a-look']);
    expect(codesOf(measureOfRoles(discLuminosity, { a: luminosity(axis, () => 0) }, settings))).toEqual(['engine/no-signal stops-lodging']);
  });
  it('of a flat curve is its last value', () => {
    const measured = measureOfRoles(discLuminosity, { a: luminosity(axis, () => 2e45) }, settings);
    for (const value of bothRoutes(measured)) expect(value).toAgreeWith(2e45 / 1.2571e46, { relative: 1e-14 });
    expect(codesOf(measured)).toEqual([]);
  });
  it('falls with the mass in a sweep, and draws the curve with Eddington’s line', () => {
    const swept = measureOfRoles(discLuminosity, { a: disc }, {}, { setting: 'totalMassMsun', values: [1e7, 1e9] }, true);
    expect(swept.points[0]!.value! / swept.points[1]!.value!).toAgreeWith(100, { relative: 1e-12 });
    const [light, line] = swept.figures[0]!.series;
    expect(Math.max(...light!.values.map((x) => x ?? 0))).toAgreeWith(1.261e45, { relative: 1e-3 });
    expect(line!.values.every((x) => x === line!.values[0])).toBe(true);
  });
});
