import { describe, expect, it } from 'vitest';
import { edgeRule } from '@/lib/engine/series/edge-weights';
import { windowWeights } from '@/lib/engine/series/window-weights';
import { interpolatePair } from '@/lib/engine/series/local-interpolation';
import { interpolateThroughPolar, isFinelySampled, polarOf } from '@/lib/engine/series/polar';

/** Σ from the first sample inside on, plus the rule's weights: the integral from the edge at −delta up to a far smooth end. */
function integralFromEdge(order: number, offset: number, delta: number, g: (y: number) => number, far: number): number {
  const weights = new Float64Array(order);
  edgeRule(order, offset).weightsAt(delta, weights);
  let sum = 0;
  for (let y = 0; y <= far; y++) sum += g(y);
  weights.forEach((w, j) => (sum += w * g(offset + j)));
  return sum;
}

describe('fractional end weights', () => {
  it.each([
    [8, -4, 0.37],
    [8, 0, 0.92],
    [6, -3, 0],
    [8, -4, 0.999],
    [4, -1, 0.5],
  ])('of order %d from sample %d integrate a bell from an edge %d of a step before the first sample', (order, offset, delta) => {
    // A wide bell: what a rule of that order leaves is far below the bound.
    const width = 60;
    const g = (y: number) => Math.exp(-((y / width) ** 2));
    const erf = (x: number) => {
      let sum = 0;
      const n = 20000;
      for (let i = 0; i < n; i++) sum += Math.exp(-((((i + 0.5) / n) * x) ** 2)) * (x / n);
      return sum;
    };
    const exact = width * (Math.sqrt(Math.PI) / 2 + erf(delta / width));
    expect(integralFromEdge(order, offset, delta, g, 600)).toAgreeWith(exact, order === 4 ? 1e-6 : 1e-8);
  });

  it('are the trapezoid for order one at a sample', () => {
    const weights = new Float64Array(1);
    edgeRule(1, 0).weightsAt(0, weights);
    expect(weights[0]).toBe(-0.5);
  });
});

describe('weights of a tapered record', () => {
  const window = { start: { from: 0, to: 13.7 }, end: { from: 80.3, to: 100.4 } };
  const ramp = (x: number) => Math.sin((Math.PI / 2) * x) ** 2;
  const taper = (t: number) => (t < 13.7 ? ramp(t / 13.7) : t > 80.3 ? ramp((100.4 - t) / 20.1) : 1);
  const g = (t: number) => Math.cos(0.11 * t + 0.3);
  /** Midpoints between the kinks, fine enough for 1e-11. */
  const exact = [
    [0, 13.7],
    [13.7, 80.3],
    [80.3, 100.4],
  ].reduce((sum, [from, to]) => {
    const n = 400000;
    const h = (to! - from!) / n;
    for (let i = 0; i < n; i++) sum += h * taper(from! + (i + 0.5) * h) * g(from! + (i + 0.5) * h);
    return sum;
  }, 0);

  it('know the kinks between samples and the end past the last one', () => {
    const grid = { t0: 0, dt: 1, n: 101 };
    const weights = windowWeights(grid, 100.4, window, 8);
    const sum = weights.reduce((total, w, k) => total + w * g(k), 0);
    expect(sum).toAgreeWith(exact, 3e-7);
    const plain = Array.from({ length: 101 }, (_, k) => taper(k) * g(k)).reduce((total, x) => total + x, 0);
    expect(Math.abs(plain - exact)).toBeGreaterThan(1e-5);
  });
});

describe('local interpolation', () => {
  const uneven = Float64Array.from({ length: 400 }, (_, i) => i + 0.3 * Math.sin(i));
  const grid = { t0: 20.05, dt: 0.73, n: 450 };

  it('follows a wave of 25 samples a cycle on uneven steps to 5e-8', () => {
    const wave = (t: number) => [Math.cos((2 * Math.PI * t) / 25), Math.sin((2 * Math.PI * t) / 25)] as const;
    const [re, im] = interpolatePair(
      { axis: uneven, first: uneven.map((t) => wave(t)[0]), second: uneven.map((t) => wave(t)[1]) },
      grid,
      8,
    );
    for (let k = 0; k < grid.n; k += 13) {
      const [c, s] = wave(grid.t0 + k * grid.dt);
      expect(re[k]).toAgreeWith(c, 5e-8);
      expect(im[k]).toAgreeWith(s, 5e-8);
    }
  });

  it('goes through amplitude and phase for four samples a cycle, and back to re and im where the amplitude dies', () => {
    const z = (t: number) => {
      const a = Math.tanh((t - 200) / 30);
      return [a * Math.cos(1.5 * t + 1e-4 * t * t), a * Math.sin(1.5 * t + 1e-4 * t * t)] as const;
    };
    const series = { re: uneven.map((t) => z(t)[0]), im: uneven.map((t) => z(t)[1]) };
    expect(isFinelySampled(series)).toBe(false);
    const { re } = interpolateThroughPolar(uneven, series, polarOf(series), grid, 8);
    const error = (k: number) => Math.abs(re[k]! - z(grid.t0 + k * grid.dt)[0]);
    const away = Array.from({ length: grid.n }, (_, k) => k).filter((k) => Math.abs(grid.t0 + k * grid.dt - 200) > 40);
    expect(Math.max(...away.map(error))).toBeLessThan(1e-7);
    expect(Math.max(...Array.from({ length: grid.n }, (_, k) => error(k)))).toBeLessThan(0.02);
  });
});
