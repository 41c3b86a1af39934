import { describe, expect, it } from 'vitest';
import type { Variable, Waveform } from '@/lib/engine/contract/waveform';
import { goldenChecks, type GoldenCheck } from './golden-check';
import { energyBy, evenTimes, gaussian, measureEnergyOf, modeFrom, modeSet } from './energy-signals';

const routes = ['A', 'B'] as const;

/** E = A²√π s (ω² + 1/2s²)/16π of a Gaussian-envelope mode. */
const gaussianEnergy = (amplitude: number, width: number, omega: number): number =>
  (amplitude * amplitude * Math.sqrt(Math.PI) * width * (omega * omega + 1 / (2 * width * width))) / (16 * Math.PI);

const order: Readonly<Record<string, 0 | 1 | 2>> = { strain: 0, news: 1, psi4: 2 };

const twoBursts = (variable: Variable): Waveform => {
  const axis = evenTimes(-80, 80, 0.1);
  const mode = (l: number, m: number, amplitude: number) => modeFrom(axis, l, m, gaussian(amplitude, 9, 0.35, order[variable]!));
  return modeSet(axis, [mode(2, 2, 0.12), mode(3, 3, 0.03)], variable);
};

const dampedPair = (amplitude: number, omega: number, tau: number): Waveform => {
  const axis = evenTimes(0, 30 * tau, 0.25);
  const ring = (sign: number) => (t: number) => {
    const size = amplitude * Math.exp(-t / tau);
    return [size * Math.cos(omega * t), -sign * size * Math.sin(omega * t)] as const;
  };
  return modeSet(axis, [modeFrom(axis, 2, 2, ring(1)), modeFrom(axis, 2, -2, ring(-1))]);
};

const checksOf = (route: 'A' | 'B'): GoldenCheck[] => [
  {
    id: 'T1',
    what: `damped sinusoid in (2,±2), route ${route}`,
    required: 'published',
    source: 'closed form A²τ(ω² + τ⁻²)/16π',
    value: (0.09 * 12 * (0.55 ** 2 + 1 / 144)) / (16 * Math.PI),
    relative: 1e-9,
    compute: () => energyBy(route, dampedPair(0.3, 0.55, 12)),
  },
  {
    id: 'D3',
    what: `one damped sinusoid, A = 0.2, ω = 0.5267, τ = 12.3, in (2,±2): twice 0.001390011272, route ${route}`,
    required: 'published',
    source: 'closed form, independent recomputation in the reference list',
    value: 2 * 0.001390011272,
    relative: 1e-8,
    compute: () => energyBy(route, dampedPair(0.2, 0.5267, 12.3)),
  },
  {
    id: 'D2',
    what: `Gaussian burst, A = 0.1, s = 8, ω = 0.4, route ${route}`,
    required: 'published',
    source: 'closed form; flux formula of arXiv:0707.4654',
    value: 0.0004733903224,
    relative: 1e-8,
    compute: () => {
      const axis = evenTimes(-70, 70, 0.2);
      return energyBy(route, modeSet(axis, [modeFrom(axis, 2, 2, gaussian(0.1, 8, 0.4, 0))]));
    },
  },
  ...(['strain', 'news', 'psi4'] as const).map((variable): GoldenCheck => ({
    id: 'run 3',
    what: `bursts in (2,2) and (3,3) given as ${variable}, route ${route}`,
    required: 'published',
    source: 'closed form Σ A²√π s(ω² + 1/2s²)/16π',
    value: gaussianEnergy(0.12, 9, 0.35) + gaussianEnergy(0.03, 9, 0.35),
    // A floor of 0.05 cuts 3e-7 of what a burst of width 9 holds below it.
    relative: variable === 'psi4' ? 5e-7 : 1e-10,
    compute: () => energyBy(route, twoBursts(variable), { integrationFloor: 0.05 }),
  })),
];

describe.each(routes)('radiated energy against closed forms, route %s', (route) => {
  goldenChecks(checksOf(route));
});

describe('radiated energy', () => {
  it.each(['strain', 'news', 'psi4'] as const)(
    'is the same by both routes from %s, also when it starts inside the burst and the floor bites',
    (variable) => {
      for (const settings of [{}, { startM: -7.33 }, { integrationFloor: 0.3 }, { startM: 3, integrationFloor: 0.2 }]) {
        const [a, b] = routes.map((route) => energyBy(route, twoBursts(variable), settings));
        expect(b! / a!).toAgreeWith(1, 1e-9);
      }
    },
  );

  it('loses to too high a floor what lies below it', () => {
    const full = energyBy('A', twoBursts('psi4'), { integrationFloor: 0.05 });
    expect(energyBy('A', twoBursts('psi4'), { integrationFloor: 0.5 }) / full).toBeLessThan(0.8);
  });

  it('has an uncertainty that covers the distance between its routes and to the closed form', () => {
    const coarse = evenTimes(-80, 80, 1.4);
    const mode = modeFrom(coarse, 2, 2, gaussian(0.12, 9, 0.35, 0));
    const [point] = measureEnergyOf(modeSet(coarse, [mode])).points;
    const apart = Math.abs(point!.value! - gaussianEnergy(0.12, 9, 0.35));
    expect(apart).toBeGreaterThan(0);
    expect(point!.expandedUncertainty!).toBeGreaterThan(apart);
    expect(point!.expandedUncertainty!).toBeGreaterThan(Math.abs(point!.routes.A! - point!.routes.B!));
  });
});
