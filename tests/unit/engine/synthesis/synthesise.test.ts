import { describe, expect, it } from 'vitest';
import { binaryOf } from '@/lib/engine/synthesis/binary';
import { integrateInspiral, orbitalDecay } from '@/lib/engine/synthesis/inspiral';
import { husaRadiatedEnergy, husaSpin } from '@/lib/engine/remnant/husa-2016';
import { synthesise, type SyntheticWaveform } from '@/lib/engine/synthesis/synthesise';
import type { Mode } from '@/lib/engine/contract/waveform';

const equalMass = { massRatio: 1, chi1z: 0, chi2z: 0, mOmega0: 0.02, stepM: 0.25 };
const mode = (wave: { modes: readonly Mode[] }, l: number, m: number): Mode => wave.modes.find((x) => x.l === l && x.m === m)!;

/** Σ ∫|Ḣ|² dt / 16π by sixth-order differences: shares nothing with the engine's routes. */
function radiatedEnergy({ t, modes }: Pick<SyntheticWaveform, 't' | 'modes'>): number {
  const h = t[1]! - t[0]!;
  let sum = 0;
  for (const { re, im } of modes)
    for (const x of [re, im])
      for (let i = 3; i < t.length - 3; i++) {
        const d = 45 * (x[i + 1]! - x[i - 1]!) - 9 * (x[i + 2]! - x[i - 2]!) + (x[i + 3]! - x[i - 3]!);
        sum += (d / (60 * h)) ** 2 * h;
      }
  return sum / (16 * Math.PI);
}

/** Binding energy already radiated at the first sample (domain reference, Q12), from memory there. */
function energyBefore(eta: number, mOmega0: number): number {
  const x = Math.cbrt(mOmega0) ** 2;
  return ((eta * x) / 2) * (1 - ((9 + eta) / 12) * x - ((81 - 57 * eta + eta * eta) / 24) * x * x);
}

describe('a synthesised waveform', () => {
  it('radiates what appendix B states, energy before the record included', () => {
    for (const [massRatio, chi, expected] of [
      [1, 0, 0.0485],
      [1, 0.6, 0.0706],
      [1, -0.6, 0.0385],
      [2, 0, 0.0386],
    ] as const) {
      const wave = synthesise({ ...equalMass, massRatio, chi1z: chi, chi2z: chi });
      const eta = massRatio / (1 + massRatio) ** 2;
      expect(radiatedEnergy(wave) + energyBefore(eta, 0.02)).toBeCloseTo(expected, 3.5);
    }
  });
  it('radiates 0.0399 of its mass from an orbital frequency of 0.02 on, 98.4 % of it in (2,±2)', () => {
    const wave = synthesise(equalMass);
    const all = radiatedEnergy(wave);
    expect(all).toBeCloseTo(0.03991, 4);
    expect(
      Math.abs(radiatedEnergy({ t: wave.t, modes: wave.modes.filter((x) => x.l === 2 && Math.abs(x.m) === 2) }) / all - 0.984),
    ).toBeLessThan(0.001);
  });
  it('rotates as the house convention says: H22 ∝ e^{−iφ} with φ increasing', () => {
    const { re, im } = mode(synthesise(equalMass), 2, 2);
    for (let i = 1; i < re.length; i++) expect(re[i - 1]! * im[i]! - im[i - 1]! * re[i]!).toBeLessThan(0);
  });
  it('has a frequency that never falls and joins the inspiral without a step', () => {
    const wave = synthesise(equalMass);
    const { re, im } = mode(wave, 2, 2);
    let before = 0;
    let largestStep = 0;
    for (let i = 1; i < re.length; i++) {
      const omega = Math.atan2(-(re[i - 1]! * im[i]! - im[i - 1]! * re[i]!), re[i - 1]! * re[i]! + im[i - 1]! * im[i]!) / 0.25;
      expect(omega - before).toBeGreaterThan(-1e-9);
      if (i > 1) largestStep = Math.max(largestStep, omega - before);
      before = omega;
    }
    expect(largestStep).toBeLessThan(0.0035);
    expect(before).toBeCloseTo(0.5289 / 0.9516, 2);
  });
  it('rises to η(1.45 + 0.49η) without a jump in amplitude', () => {
    const { re, im } = mode(synthesise(equalMass), 2, 2);
    const size = Array.from(re, (x, i) => Math.hypot(x, im[i]!));
    expect(Math.max(...size)).toBeCloseTo(0.25 * (1.45 + 0.49 / 4), 4);
    for (let i = 1; i < size.length; i++) expect(Math.abs(size[i]! - size[i - 1]!)).toBeLessThan(0.006);
  });
  it('mirrors every mode as (−1)^ℓ H*', () => {
    const wave = synthesise({ ...equalMass, massRatio: 2 });
    for (const { l, m, re, im } of wave.modes.filter((x) => x.m > 0)) {
      const mirror = mode(wave, l, -m);
      const sign = l % 2 === 0 ? 1 : -1;
      for (let i = 0; i < re.length; i += 97) expect([mirror.re[i]!, mirror.im[i]!]).toEqual([sign * re[i]!, -sign * im[i]!]);
    }
  });
  it('has no odd-m power when masses and spins are equal', () => {
    const wave = synthesise(equalMass);
    for (const [l, m] of [
      [2, 1],
      [3, 3],
    ] as const)
      expect(mode(wave, l, m).re.every((x) => x === 0)).toBe(true);
  });
  it('is finite when a mode changes sign between inspiral and peak', () => {
    const wave = synthesise({ ...equalMass, massRatio: 1.2, chi1z: 0.9, chi2z: 0.1 });
    for (const { re, im } of wave.modes) expect(re.every(Number.isFinite) && im.every(Number.isFinite)).toBe(true);
  });
  it('is the same to the last bit when made twice', () => {
    expect(synthesise({ ...equalMass, stepM: 1 })).toEqual(synthesise({ ...equalMass, stepM: 1 }));
  });
  it('refuses parameters outside the model', () => {
    for (const bad of [{ massRatio: 0.5 }, { chi1z: 1.2 }, { mOmega0: 0.1 }, { stepM: 0 }, { mOmega0: Number.NaN }])
      expect(() => synthesise({ ...equalMass, ...bad })).toThrow(RangeError);
  });
});

describe('the inspiral', () => {
  it('decays as (64/5) η x⁵ when the orbit is wide', () => {
    expect(orbitalDecay(binaryOf(equalMass))(1e-5) / ((64 / 5) * 0.25 * 1e-25)).toBeCloseTo(1, 4);
  });
  it('is integrated to fourth order in the step', () => {
    const decay = orbitalDecay(binaryOf(equalMass));
    const at = (step: number) => integrateInspiral(decay, 0.1, 0.2, step);
    const value = (step: number) => at(step)[Math.round(360 / step)]!;
    const [a, b, c] = [value(30), value(15), value(7.5)];
    expect(Math.log2((a - b) / (b - c))).toBeCloseTo(4, 0);
  });
});

describe('the remnant', () => {
  it('has the mass and spin of the check table in appendix A', () => {
    const table = [
      [1, 0, 0, 0.95161, 0.68642],
      [1, 0.6, 0.6, 0.92656, 0.85816],
      [1, -0.6, -0.6, 0.96367, 0.49423],
      [1, 0.6, -0.6, 0.95161, 0.68642],
      [2, 0, 0, 0.96124, 0.62354],
      [3, 0.5, 0.2, 0.95961, 0.76113],
      [4, 0, 0, 0.97791, 0.47149],
    ] as const;
    for (const [massRatio, chi1z, chi2z, mass, spin] of table) {
      const binary = binaryOf({ massRatio, chi1z, chi2z });
      expect(1 - husaRadiatedEnergy(binary)).toBeCloseTo(mass, 4.7);
      expect(husaSpin(binary)).toBeCloseTo(spin, 4.7);
    }
  });
});
