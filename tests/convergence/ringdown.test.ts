import { describe, expect, it } from 'vitest';
import { lineOnPanels } from '@/lib/engine/ringdown/line-on-panels';
import { lineOnSamples } from '@/lib/engine/ringdown/line-on-samples';
import type { Tone } from '@/lib/engine/tones/tone';
import { evenTimes, modeFrom } from '../golden/energy-signals';

/** A tone whose phase bends, so that neither line is exact: φ = ωt + ε sin(νt). */
const OMEGA = 0.5;
const NU = 0.9;
const bent = (step: number): Tone => {
  const axis = evenTimes(-30, 30, step);
  const { re, im } = modeFrom(axis, 2, 2, (t) => {
    const [size, angle] = [Math.exp(-0.05 * t + 0.2 * Math.cos(NU * t)), OMEGA * t + 0.3 * Math.sin(NU * t)];
    return [size * Math.cos(angle), -size * Math.sin(angle)];
  });
  return { axis, re, im, isEven: true, mode: [2, 2] };
};

/** Least-squares slope of sin(νt) over [−a, a]: 3/(2a³) ∫ t sin νt. */
const slopeOfSine = (a: number): number => (3 / (2 * a ** 3)) * 2 * (Math.sin(NU * a) / NU ** 2 - (a * Math.cos(NU * a)) / NU);

describe('a least-squares line over a window whose edges lie between samples', () => {
  const edge = 12.3;
  const omega = OMEGA + 0.3 * slopeOfSine(edge);
  const orders = (error: (step: number) => number): number[] => [0.8, 0.4].map((step) => Math.log2(error(step) / error(step / 2)));

  it('converges with order 8 in route A, and order 6 with the shorter end weights', () => {
    for (const p of orders((step) => Math.abs(lineOnSamples(bent(step), -edge, edge, 8).omega - omega))) expect(p).toBeGreaterThan(7);
    for (const p of orders((step) => Math.abs(lineOnSamples(bent(step), -edge, edge, 6).omega - omega))) expect(p).toBeGreaterThan(5);
  });
  it('converges at least as fast as the spline’s derivative in route B', () => {
    for (const p of orders((step) => Math.abs(lineOnPanels(bent(step), -edge, edge).omega - omega))) expect(p).toBeGreaterThan(6);
  });
  it('has one limit by both routes', () => {
    const [a, b] = [lineOnSamples(bent(0.1), -edge, edge), lineOnPanels(bent(0.1), -edge, edge)];
    expect(a.omega).toAgreeWith(omega, { relative: 1e-9 });
    expect(b.omega).toAgreeWith(omega, { relative: 1e-9 });
    expect(a.gamma).toAgreeWith(0.05, { relative: 1e-9 });
    expect(b.gamma).toAgreeWith(0.05, { relative: 1e-9 });
  });
});
