import { describe, expect, it } from 'vitest';
import { eccentricityOf, smoothedOnPanels, smoothedOnSamples } from '@/lib/engine/orbit/smooth-frequency';
import { advanceOnPanels, advanceOnSamples } from '@/lib/engine/orbit/phase-advance';
import type { Tone } from '@/lib/engine/tones/tone';
import { evenTimes, modeFrom } from '../golden/energy-signals';

/** A tone whose frequency swings: φ = ωt + s sin(νt), amplitude breathing. */
const [OMEGA, SIZE, NU] = [0.5, 0.3, 0.6];
const phase = (t: number): number => OMEGA * t + SIZE * Math.sin(NU * t);
const swinging = (step: number): Tone => {
  const axis = evenTimes(-60, 60, step);
  const { re, im } = modeFrom(axis, 2, 2, (t) => {
    const size = Math.exp(0.1 * Math.cos(NU * t));
    return [size * Math.cos(phase(t)), -size * Math.sin(phase(t))];
  });
  return { axis, re, im, isEven: true, mode: [2, 2] };
};
const stretch = { from: -40.3, to: 39.1 };
const orders = (error: (step: number) => number): number[] => [1, 0.5].map((step) => Math.log2(error(step) / error(step / 2)));

describe('the phase between edges that lie between samples', () => {
  const exact = phase(stretch.to) - phase(stretch.from);
  it('converges with order 8 by interpolation, and with order 6 by the shorter one', () => {
    for (const p of orders((step) => Math.abs(advanceOnSamples(swinging(step), stretch, 8) - exact))) expect(p).toBeGreaterThan(6.5);
    for (const p of orders((step) => Math.abs(advanceOnSamples(swinging(step), stretch, 6) - exact))) expect(p).toBeGreaterThan(4.5);
  });
  it('converges at least as fast as the splines by integration', () => {
    for (const p of orders((step) => Math.abs(advanceOnPanels(swinging(step), stretch) - exact))) expect(p).toBeGreaterThan(6);
  });
});

/** Simpson's rule of a smooth function over [−1, 1]; its error here is 10⁻¹² of the integral. */
function integral(f: (x: number) => number): number {
  const PARTS = 20_000;
  let sum = 0;
  for (let i = 0; i <= PARTS; i++) sum += (i === 0 || i === PARTS ? 1 : i % 2 === 1 ? 4 : 2) * f((2 * i) / PARTS - 1);
  return (2 * sum) / PARTS / 3;
}

/** c with Σ cₖ ∫xʲ⁺ᵏ = bⱼ over [−1, 1]: normal equations by elimination, in exact moments. */
function powersFor(b: readonly number[]): number[] {
  const rows = b.map((right, j) => [...b.map((_, k) => ((j + k) % 2 === 0 ? 2 / (j + k + 1) : 0)), right]);
  rows.forEach((pivot, j) => {
    for (const row of rows) {
      if (row === pivot) continue;
      const by = row[j]! / pivot[j]!;
      pivot.forEach((x, k) => (row[k]! -= by * x));
    }
  });
  return rows.map((row, j) => row.at(-1)! / row[j]!);
}

/** The definition on ω = dφ/dt in closed form: polynomial of fifth degree by least squares, then √2·rms[(ω − fit)/2fit]. */
function swingByDefinition(): number {
  const [middle, half] = [(stretch.from + stretch.to) / 2, (stretch.to - stretch.from) / 2];
  const omega = (x: number): number => OMEGA + SIZE * NU * Math.cos(NU * (middle + half * x));
  const c = powersFor([0, 1, 2, 3, 4, 5].map((k) => integral((x) => omega(x) * x ** k)));
  const fit = (x: number): number => c.reduceRight((sum, coefficient) => sum * x + coefficient, 0);
  return Math.sqrt(integral((x) => ((omega(x) - fit(x)) / (2 * fit(x))) ** 2));
}

describe('the swing about a smooth frequency', () => {
  const exact = swingByDefinition();
  it('is by both routes what the closed form of the frequency gives', () => {
    expect(eccentricityOf(smoothedOnSamples(swinging(0.1), stretch))).toAgreeWith(exact, { relative: 1e-10 });
    expect(eccentricityOf(smoothedOnPanels(swinging(0.1), stretch))).toAgreeWith(exact, { relative: 1e-10 });
    expect(exact).toAgreeWith((SIZE * NU) / (2 * OMEGA), { relative: 0.1 });
  });
  it('is approached with at least sixth order by either', () => {
    const order = (error: (step: number) => number): number => Math.log2(error(0.8) / error(0.4));
    expect(order((step) => Math.abs(eccentricityOf(smoothedOnSamples(swinging(step), stretch)) - exact))).toBeGreaterThan(6);
    expect(order((step) => Math.abs(eccentricityOf(smoothedOnPanels(swinging(step), stretch)) - exact))).toBeGreaterThan(6);
  });
});
