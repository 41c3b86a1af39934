import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { discLuminosity } from '@/lib/engine/quantities/disc-luminosity';
import { emEnergy } from '@/lib/engine/quantities/em-energy';
import { emMirroring } from '@/lib/engine/quantities/em-mirroring';
import { fieldExponent } from '@/lib/engine/quantities/field-exponent';
import { bothRoutes, luminosity, measureOfRoles, phi2Set } from '../golden/electromagnetic-signals';
import { evenTimes, gaussian, modeFrom, modeSet } from '../golden/energy-signals';

const SOME = { numRuns: 10, seed: 7 };
const axis = evenTimes(-90, 90, 0.5);
const burst = (by: number, phase: number, size: number) => (t: number): readonly [number, number] => {
  const [re, im] = gaussian(size, 10, 0.4, 0)(t - by);
  return [re * Math.cos(phase) - im * Math.sin(phase), re * Math.sin(phase) + im * Math.cos(phase)];
};
const light = (by = 0, phase = 0, size = 1e-7, more: Partial<Waveform> = {}): Waveform => phi2Set(axis, [modeFrom(axis, 2, 2, burst(by, phase, size)), modeFrom(axis, 2, 1, burst(by, 0, size / 3))], { ownTotalMassMsun: 1e8, binary: { fieldGauss: 1e4 }, ...more });
const real = (min: number, max: number) => fc.double({ min, max, noNaN: true });

describe('an electromagnetic energy', () => {
  const [known] = bothRoutes(measureOfRoles(emEnergy, { a: light() }));
  it('does not depend on the zero of time or on a phase of one mode, and goes with the square of the amplitude', () => {
    fc.assert(
      fc.property(real(-20, 20), real(-3, 3), real(-4, 4), (by, phase, power) => {
        const size = 1e-7 * 10 ** power;
        for (const value of bothRoutes(measureOfRoles(emEnergy, { a: light(by, phase, size) }))) expect(value).toAgreeWith(known! * 100 ** power, { relative: 1e-9 });
      }),
      SOME,
    );
  });
  it('goes to any field and mass with B²M², there and back', () => {
    fc.assert(
      fc.property(real(1, 14), real(0, 9), (field, mass) => {
        const [fieldGauss, totalMassMsun] = [10 ** field, 10 ** mass];
        const there = measureOfRoles(emEnergy, { a: light() }, { fieldGauss, totalMassMsun }).points[0]!.value!;
        expect(there).toAgreeWith(known! * ((fieldGauss * totalMassMsun) / 1e12) ** 2, { relative: 1e-12 });
      }),
      SOME,
    );
  });
});

describe('what is fitted, compared or read at a peak', () => {
  it('finds any exponent from any fields, by both routes', () => {
    fc.assert(
      fc.property(real(-3, 3), fc.uniqueArray(fc.integer({ min: 1, max: 12 }), { minLength: 2, maxLength: 5 }), (k, powers) => {
        const series = powers.map((p) => light(0, 0, 1e-7 * 10 ** ((k * p) / 2), { name: `P${p}`, binary: { fieldGauss: 10 ** p } }));
        for (const value of bothRoutes(measureOfRoles(fieldExponent, { series }))) expect(value).toAgreeWith(k, 1e-9);
      }),
      SOME,
    );
  });
  it('mirrors itself whatever the delay, the phase and the factor', () => {
    const gw = { ...modeSet(axis, [modeFrom(axis, 2, 2, burst(0, 0, 0.08))], 'psi4'), name: 'G' };
    fc.assert(
      fc.property(real(-15, 15), real(-3, 3), real(-6, 2), (by, phase, power) => {
        const measured = measureOfRoles(emMirroring, { em: light(by, phase, 0.08 * 10 ** power), gw }, { window: [-15, 15] });
        for (const value of bothRoutes(measured)) expect(value).toAgreeWith(0, 1e-6);
        expect(measured.points[0]!.components!.meanRatio).toAgreeWith(10 ** power, { relative: 1e-6 });
      }),
      SOME,
    );
  });
  it('is as bright wherever the peak falls between samples', () => {
    const times = evenTimes(0, 1e6, 5000);
    fc.assert(
      fc.property(real(3e5, 7e5), real(38, 48), (peak, power) => {
        const a = luminosity(times, (t) => 10 ** power / (1 + ((t - peak) / 8e4) ** 2));
        for (const value of bothRoutes(measureOfRoles(discLuminosity, { a }, { totalMassMsun: 1e8 }))) expect(value).toAgreeWith(10 ** power / 1.2571e46, { relative: 1e-5 });
      }),
      SOME,
    );
  });
});
