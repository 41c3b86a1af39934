import { describe } from 'vitest';
import type { DetectorRoute } from '@/lib/engine/contract/route';
import { builtInCurve } from '@/lib/engine/noise/built-in-curves';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { C_M_PER_S, MPC_M, MSUN_S } from '@/lib/engine/units/constants';
import { goldenChecks, type GoldenCheck } from './golden-check';
import { bandOf, frequencySide, white } from './signals';

/** √(5/24) π^(−2/3) (GM_c/c³)^(5/6) c/D: the amplitude of f^(−7/6), optimally oriented. */
function amplitude(m1: number, m2: number, distanceMpc: number): number {
  const chirpMassS = ((m1 * m2) ** 0.6 / (m1 + m2) ** 0.2) * MSUN_S;
  return (Math.sqrt(5 / 24) * Math.PI ** (-2 / 3) * chirpMassS ** (5 / 6) * C_M_PER_S) / (distanceMpc * MPC_M);
}

const lastStableOrbitHz = (totalMsun: number): number => 1 / (6 ** 1.5 * Math.PI * totalMsun * MSUN_S);

/** Cutler & Flanagan 1994, PRD 49 2658, Eq. (2.1), from memory. */
const cutlerFlanagan = (f: number): number => 3e-48 * ((70 / f) ** 4 + 2 * (1 + (f / 70) ** 2));

function loudness(
  route: DetectorRoute,
  m1: number,
  m2: number,
  distanceMpc: number,
  psd: (f: number) => number,
  fLowHz: number,
  fHighHz: number,
): number {
  const a = amplitude(m1, m2, distanceMpc);
  const side = frequencySide(fLowHz / 1.5, fHighHz * 1.5, 4000, (f) => ({ plus: a * f ** (-7 / 6), plusIm: 0, cross: 0, crossIm: 0 }));
  return Math.sqrt(route.gram(side, bandOf(psd, fLowHz, fHighHz)).plusPlus);
}

describe('the stationary-phase amplitude', () => {
  goldenChecks([
    {
      id: 'B1',
      what: '|h̃| f^(7/6) of 1.4 + 1.4 M☉ at 1 Mpc',
      required: 'published',
      source: 'Cutler & Flanagan 1994; Allen et al. 2012, PRD 85 122006, Eq. (3.4), form read in public source text',
      value: 9.20575174e-20,
      relative: 1e-9,
      compute: () => amplitude(1.4, 1.4, 1),
    },
  ]);
});

const early = builtInCurve('A2');
const massChecks = (route: DetectorRoute): GoldenCheck[] =>
  (
    [
      [2.8, 3.9721928],
      [10, 11.432584],
      [20, 18.764507],
      [40, 25.01958],
      [80, 22.72705],
    ] as const
  ).map(([mass, value]) => ({
    id: 'B12',
    what: `loudness of equal masses of ${mass} M☉ in all at 1 Gpc, curve A2, 20 Hz to the last stable orbit`,
    required: 'independent derivation' as const,
    source: 'f^(−7/3) moment over curve A2 by adaptive quadrature in mpmath, a separate script',
    value,
    relative: 1e-6,
    // The curve is not known below 20 Hz, and the integral starts there: its closed form is read directly.
    compute: () => loudness(route, mass / 2, mass / 2, 1000, (f) => early?.psd(Math.max(f, 20)) ?? Number.NaN, 20, lastStableOrbitHz(mass)),
  }));

describe.each([routeA, routeB])('stationary-phase loudness, route $name', (route) => {
  goldenChecks([
    {
      id: 'B2',
      what: 'T3: 1.4 + 1.4 M☉ at 100 Mpc in white noise of 1e-46/Hz, 30–1000 Hz',
      required: 'published',
      source: 'closed form ρ² = 3A²(f₁^(−4/3) − f₂^(−4/3))/S (also T3)',
      value: 16.43761138,
      relative: 1e-7,
      compute: () => loudness(route, 1.4, 1.4, 100, white, 30, 1000),
    },
    {
      id: 'B3',
      what: '1.4 + 1.4 M☉ at 100 Mpc in the noise of Cutler & Flanagan, 10 Hz to the last stable orbit',
      required: 'from memory',
      source: 'PRD 49 2658, Eq. (2.1), from memory; moment by mpmath quadrature',
      value: 33.34622681,
      relative: 1e-6,
      compute: () => loudness(route, 1.4, 1.4, 100, cutlerFlanagan, 10, lastStableOrbitHz(2.8)),
    },
    ...massChecks(route),
  ]);
});
