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

describe('the swing about a smooth frequency', () => {
  const finest = eccentricityOf(smoothedOnPanels(swinging(0.1), stretch));
  it('has one limit by both routes', () => {
    expect(eccentricityOf(smoothedOnSamples(swinging(0.1), stretch))).toAgreeWith(finest, { relative: 1e-10 });
    expect(finest).toAgreeWith((SIZE * NU) / (2 * OMEGA), { relative: 0.1 });
  });
  it('is approached with at least sixth order by either', () => {
    const order = (error: (step: number) => number): number => Math.log2(error(0.8) / error(0.4));
    expect(order((step) => Math.abs(eccentricityOf(smoothedOnSamples(swinging(step), stretch)) - finest))).toBeGreaterThan(6);
    expect(order((step) => Math.abs(eccentricityOf(smoothedOnPanels(swinging(step), stretch)) - finest))).toBeGreaterThan(6);
  });
});
