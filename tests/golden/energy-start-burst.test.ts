import { describe, expect, it } from 'vitest';
import { bindingEnergy } from '@/lib/engine/radiation/energy-before';
import { withStartUpBurst } from '@/lib/engine/synthesis/effects';
import { allModes, synthesise } from '@/lib/engine/synthesis/synthesise';
import { measureEnergyOf, modeSet } from './energy-signals';

/** Equal masses without spin from MΩ = 0.02: the demonstration whose numbers the domain reference quotes (D5, Q12). */
const clean = synthesise({ massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.25, modes: allModes });
const noisy = withStartUpBurst(clean);
const binary = { massRatio: 1, chi1z: 0, chi2z: 0 };
const wave = modeSet(clean.t, clean.modes, 'strain', binary);
const bursting = modeSet(noisy.t, noisy.modes, 'strain', binary);
const valueOf = (...args: Parameters<typeof measureEnergyOf>): number => measureEnergyOf(...args).points[0]?.value ?? Number.NaN;

describe('start-up radiation (required: independent derivation; cubic splines through the samples of each mode, values and slopes on eight points a step, trapezoids, in numpy and scipy: 0.039906, with the burst 0.040425, the burst alone 5.188e-4 about t = 75 M, 98.33 % in (2,±2); before the start the binding energy at 1PN, 8.687e-3)', () => {
  it('is found where it was put, with its energy, and asks for an answer', () => {
    const { findings } = measureEnergyOf(bursting);
    const burst = findings.find(({ code }) => code === 'engine/startup-burst');
    expect(burst?.level).toBe('needs-answer');
    expect(burst?.text).toContain('energy 0.00052 M arrives at t = 75 ± 6.1 M');
    expect(burst?.text).toContain('1.3 %');
  });

  it('is only worth a look once the start is declared, and nothing once the integral starts after it', () => {
    const level = (startM: number): string | undefined =>
      measureEnergyOf(bursting, { startM }).findings.find(({ code }) => code === 'engine/startup-burst')?.level;
    expect(level(20)).toBe('worth-a-look');
    expect(level(150)).toBeUndefined();
  });

  it('is not seen in the clean record', () => {
    expect(measureEnergyOf(wave).findings.map(({ code }) => code)).not.toContain('engine/startup-burst');
  });

  it('D5: adds 1.3 % to the energy: 0.0404 instead of 0.0399', () => {
    expect(valueOf(wave)).toAgreeWith(0.03991, 5e-6);
    expect(valueOf(bursting)).toAgreeWith(0.0404, 5e-5);
  });

  it('D5: leaves 0.0399 when the first 150 M are replaced by the post-Newtonian flux of 1.2e-4', () => {
    const [point] = measureEnergyOf(bursting, { startM: 150, includeEnergyBeforeStart: 'removed' }).points;
    expect(point!.value).toAgreeWith(0.0399, 1e-5);
    expect(point!.components!.before).toAgreeWith(1.2e-4, 1e-6);
    expect(point!.routes.B! / point!.routes.A!).toAgreeWith(1, 1e-8);
  });

  it('adds the energy since infinite separation when asked: 0.0485', () => {
    const [point] = measureEnergyOf(wave, { includeEnergyBeforeStart: true }).points;
    expect(point!.value).toAgreeWith(0.0485, 1e-4);
    expect(point!.components!.before).toAgreeWith(bindingEnergy(0.25, 0.02 ** (2 / 3)), { relative: 2e-3 });
  });

  it('carries 98.4 % in (2,±2)', () => {
    const quadrupole = valueOf(wave, {
      modes: [
        [2, 2],
        [2, -2],
      ],
    });
    expect(quadrupole / valueOf(wave)).toAgreeWith(0.984, 1e-3);
  });
});
