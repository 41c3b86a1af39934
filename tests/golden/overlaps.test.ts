import { describe } from 'vitest';
import type { Band, DetectorRoute, Side } from '@/lib/engine/contract/route';
import type { Response } from '@/lib/engine/contract/settings';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { goldenChecks } from './golden-check';
import { bandOf, frequencySide, timeSide, white } from './signals';

/** exp(−(t−t₀)²/2s²) e^{−i(2πf(t−t₀)+φ)} as plus − i·cross. */
const sineGaussian = (fHz: number, widthS: number, delayS = 0, phaseRad = 0): Side =>
  timeSide(-0.06, 0.06, 16384, (t) => {
    const envelope = 1e-21 * Math.exp(-(((t - delayS) / widthS) ** 2) / 2);
    const angle = 2 * Math.PI * fHz * (t - delayS) + phaseRad;
    return { plus: envelope * Math.cos(angle), cross: envelope * Math.sin(angle) };
  });

/** Transform of e^{−(γ+iω)t}, t ≥ 0, as plus and cross; what lies above 40 Hz changes the match by 3e-6. */
const dampedExponential = (gamma: number, omega: number): Side =>
  frequencySide(5e-5, 60, 4000, (f) => {
    const w = 2 * Math.PI * f;
    const re = gamma * gamma - w * w + omega * omega;
    const im = 2 * gamma * w;
    const size = re * re + im * im;
    const over = (a: number, b: number) => [(a * re + b * im) / size, (b * re - a * im) / size] as const;
    const [plus, plusIm] = over(gamma, w);
    const [cross, crossIm] = over(omega, 0);
    return { plus, plusIm, cross, crossIm };
  });

const audio = bandOf(white, 0.5, 8000);
const matchOf = (route: DetectorRoute, a: Side, b: Side, band: Band, response: Response): number =>
  route.match({ a, b, band, response, maximise: ['time', 'phase'], templateMassRange: [1, 1], rescale: (side) => side }).match;

describe.each([routeA, routeB])('overlaps with closed forms, route $name', (route) => {
  goldenChecks([
    {
      id: 'C1',
      what: 'overlap of Gaussian-envelope sinusoids of widths 2 and 3 ms, white noise',
      required: 'published',
      source: 'closed form √(2s₁s₂/(s₁²+s₂²))',
      value: 0.9607689228305225,
      relative: 1e-9,
      compute: () => route.overlap(sineGaussian(1000, 2e-3), sineGaussian(1000, 3e-3), audio, 'complex'),
    },
    {
      id: 'C2',
      what: 'match of sine-Gaussians of 200 and 220 Hz, s = 4 ms, white noise',
      required: 'published',
      source: 'closed form exp(−(πsΔf)²)',
      value: 0.9387881212869447,
      relative: 1e-9,
      compute: () => matchOf(route, sineGaussian(200, 4e-3), sineGaussian(220, 4e-3), audio, 'complex'),
    },
    {
      id: 'C3',
      what: 'overlap of a 200 Hz sine-Gaussian, s = 4 ms, with its copy 1 ms later',
      required: 'published',
      source: 'closed form exp(−(Δt/2s)²) cos 2πfΔt',
      value: 0.3042261299,
      relative: 1e-6,
      compute: () => route.overlap(sineGaussian(200, 4e-3), sineGaussian(200, 4e-3, 1e-3), audio, 'plus'),
    },
    {
      id: 'C3m',
      what: 'match of the same two',
      required: 'published',
      source: 'identity: a delayed copy matches exactly',
      value: 1,
      relative: 1e-9,
      compute: () => matchOf(route, sineGaussian(200, 4e-3), sineGaussian(200, 4e-3, 1e-3), audio, 'plus'),
    },
    {
      id: 'C4',
      what: 'overlap after a constant phase of 0.3 rad',
      required: 'published',
      source: 'closed form cos Δφ for quadrature signals',
      value: Math.cos(0.3),
      relative: 1e-12,
      compute: () => route.overlap(sineGaussian(1000, 2e-3), sineGaussian(1000, 2e-3, 0, 0.3), audio, 'complex'),
    },
    {
      id: 'T2',
      what: 'match of damped exponentials (γ, ω) = (1/12, 0.55) and (1/10, 0.50), white noise',
      required: 'published',
      source: 'closed form 2√(γ₁γ₂)/√((γ₁+γ₂)²+(ω₁−ω₂)²)',
      value: (2 * Math.sqrt(1 / 120)) / Math.hypot(1 / 12 + 1 / 10, 0.05),
      relative: 5e-6,
      compute: () => matchOf(route, dampedExponential(1 / 12, 0.55), dampedExponential(1 / 10, 0.5), bandOf(white, 1e-4, 40), 'complex'),
    },
  ]);
});
