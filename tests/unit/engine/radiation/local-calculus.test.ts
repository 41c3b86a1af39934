import { describe, expect, it } from 'vitest';
import { derivativesAtSamples, quadratureWeights } from '@/lib/engine/radiation/local-calculus';
import { bindingEnergy, energyBefore } from '@/lib/engine/radiation/energy-before';
import { startFrequency } from '@/lib/engine/radiation/start-frequency';
import { defaultFloor, floorOfMode } from '@/lib/engine/radiation/integration-floor';
import type { RadiationRecord } from '@/lib/engine/radiation/radiation-record';

const uneven = Float64Array.from({ length: 60 }, (_, i) => i / 10 + 0.02 * Math.sin(i));

describe('local differences and sums', () => {
  it('differentiate polynomials up to their order exactly, ends included', () => {
    const p = (x: number): number => 1 + x - 0.3 * x ** 3 + 0.01 * x ** 8;
    const { slopes } = derivativesAtSamples(uneven, [uneven.map(p)], 13);
    uneven.forEach((x, i) => expect(slopes[0]![i]).toAgreeWith(1 - 0.9 * x * x + 0.08 * x ** 7, { relative: 1e-7, absolute: 1e-7 }));
  });

  it('gain order twelve inside when the step is halved', () => {
    const errorAt = (n: number): number => {
      const axis = Float64Array.from({ length: n + 1 }, (_, i) => (12 * i) / n);
      const { slopes } = derivativesAtSamples(axis, [axis.map((x) => Math.sin(3 * x))], 13);
      return Math.abs(slopes[0]![n / 2]! - 3 * Math.cos(18));
    };
    expect(Math.log2(errorAt(40) / errorAt(80))).toBeGreaterThan(11);
  });

  it.each([4, 6, 8] as const)('integrate with order %i from any start, also inside an interval', (order) => {
    const start = 1.2345;
    const weights = quadratureWeights(uneven, start, order);
    const last = uneven[59]!;
    for (let degree = 0; degree < order; degree++) {
      const sum = weights.reduce((total, w, i) => total + w * uneven[i]! ** degree, 0);
      expect(sum).toAgreeWith((last ** (degree + 1) - start ** (degree + 1)) / (degree + 1), { relative: 1e-11 });
    }
  });

  it('give nothing after the record', () => {
    expect(quadratureWeights(uneven, 100, 8).every((w) => w === 0)).toBe(true);
  });
});

/** φ(t) = ω t + ½ω̇ t² in (2,2). */
const chirp = (omega: number, rate: number): RadiationRecord => {
  const axis = Float64Array.from({ length: 4001 }, (_, i) => i / 2);
  const phase = (t: number): number => omega * t + (rate * t * t) / 2;
  return { axis, step: 0.5, variable: 'psi4', modes: [{ l: 2, m: 2, re: axis.map((t) => Math.cos(phase(t))), im: axis.map((t) => -Math.sin(phase(t))) }] };
};

describe('the starting frequency', () => {
  it.each(['A', 'B'] as const)('is the slope of the parabola at the start, route %s', (route) => {
    expect(startFrequency(chirp(0.04, 1e-5), 0, route)).toAgreeWith(0.04, 1e-12);
    expect(startFrequency(chirp(0.04, 1e-5), 300, route)).toAgreeWith(0.043, 1e-12);
  });

  it('halved over two cycles is the default floor, which grows with |m|', () => {
    expect(defaultFloor(chirp(0.04, 0), 0)).toAgreeWith(0.02, 1e-12);
    expect([0, 1, 2, 4].map((m) => floorOfMode(0.02, m))).toEqual([0.01, 0.01, 0.02, 0.04]);
  });
});

describe('energy before the start', () => {
  const binary = { massRatio: 1, chi1z: 0, chi2z: 0 };
  it('is zero when nothing is added or nothing was removed', () => {
    expect(energyBefore(chirp(0.04, 1e-5), 0, false, binary, 'A')).toBe(0);
    expect(energyBefore(chirp(0.04, 1e-5), 0, 'removed', binary, 'A')).toBe(0);
  });

  it('is the same by steps and by quadrature, and grows with what is removed', () => {
    const record = chirp(0.04, 4e-6);
    const [a, b] = (['A', 'B'] as const).map((route) => energyBefore(record, 150, 'removed', binary, route)!);
    expect(a! / b!).toAgreeWith(1, 1e-9);
    expect(energyBefore(record, 300, 'removed', binary, 'A')!).toBeGreaterThan(1.9 * a!);
    expect(a!).toBeLessThan(energyBefore(record, 150, true, binary, 'A')!);
  });

  it('is the leading half η x when x is small', () => {
    expect(bindingEnergy(0.25, 1e-6) / 0.125e-6).toAgreeWith(1, 1e-5);
  });

  it('is not known without a (2,2) mode', () => {
    expect(energyBefore({ ...chirp(0.04, 0), modes: [] }, 0, true, binary, 'A')).toBeNull();
  });
});
