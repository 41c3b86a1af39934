import { describe, expect, it } from 'vitest';
import { tabulatedCurve } from '@/lib/engine/noise/tabulated-curve';
import { binWeights } from '@/lib/engine/routes/a/bin-weights';
import { chebyshevRule } from '@/lib/engine/routes/a/chebyshev-rule';
import { ColumnReader } from '@/lib/engine/routes/a/column-reader';
import { ColumnRoughness } from '@/lib/engine/routes/a/column-roughness';
import { NoiseExtremes } from '@/lib/engine/routes/a/noise-extremes';
import { noiseMoments } from '@/lib/engine/routes/a/noise-moments';
import { noiseWeigher } from '@/lib/engine/routes/a/noise-weigher';
import { TableDistance } from '@/lib/engine/routes/a/table-distance';

/** A floor and three lines on a table whose rows lie closer than the lines are wide. */
function lined(rows: number): ReturnType<typeof noiseWeigher> {
  const f = Array.from({ length: rows }, (_, i) => 15 * (900 / 15) ** (i / (rows - 1)));
  const lineAt = (x: number): number => [36, 61, 180].reduce((sum, at) => sum + 200 / (1 + ((x - at) / (0.003 * at)) ** 2), 0);
  const made = tabulatedCurve({ name: 'lined', f, values: f.map((x) => (40 / x) ** 8 + 1 + (x / 260) ** 2 + lineAt(x)), meaning: 'psd', sided: 'one' });
  if (!made.ok) throw new Error('table');
  return noiseWeigher(made.value.curve, 0);
}

/** ∫ g/S by the midpoint rule between the rows, with so many points a row. */
function byMidpoints(weigher: ReturnType<typeof noiseWeigher>, from: number, to: number, g: (f: number) => number, points: number): number {
  const edges = [from, ...[...weigher.kinksHz].filter((f) => f > from && f < to), to];
  let sum = 0;
  for (let i = 1; i < edges.length; i++) {
    const h = (edges[i]! - edges[i - 1]!) / points;
    for (let p = 0; p < points; p++) {
      const f = edges[i - 1]! + (p + 0.5) * h;
      sum += h * g(f) * weigher.continuedAt(weigher.firstKinkAbove(f), -1, Math.log(f));
    }
  }
  return sum;
}

describe('moments of 1/S over a block of frequencies', () => {
  it.each([
    ['close rows and a line', 2500, 57, 64],
    ['rows wider than the block', 40, 102, 103],
  ] as const)('integrate polynomials below their order: %s', (_what, rows, from, to) => {
    const weigher = lined(rows);
    const weights = noiseMoments(weigher, from, to, 12);
    const nodes = chebyshevRule(12).points.map((x) => (from + to) / 2 + ((to - from) / 2) * x);
    const g = (f: number): number => 1 + ((f - from) / (to - from)) ** 11 - 3 * ((f - from) / (to - from)) ** 4;
    const [coarse, fine] = [400, 800].map((points) => byMidpoints(weigher, from, to, g, points)) as [number, number];
    // The midpoint rule is of second order: what is left after one step of extrapolation is of fourth.
    const exact = (4 * fine - coarse) / 3;
    expect(Math.abs(weights.reduce((sum, w, j) => sum + w * g(nodes[j]!), 0) / exact - 1)).toBeLessThan(1e-10);
  });

  it('miss a function by no more than the block’s whole weight times how far it is from a polynomial', () => {
    const weigher = lined(2500);
    const weights = noiseMoments(weigher, 57, 64, 12);
    const nodes = chebyshevRule(12).points.map((x) => 60.5 + 3.5 * x);
    const whole = weights.reduce((sum, w) => sum + w, 0);
    for (const turns of [0.5, 2, 8]) {
      const g = (f: number): number => Math.cos((turns * (f - 60.5)) / 3.5);
      const off = Math.abs(weights.reduce((sum, w, j) => sum + w * g(nodes[j]!), 0) - byMidpoints(weigher, 57, 64, g, 800));
      // Of e^{iτx} twelve nodes miss about 2 J₁₂(τ) at most: 4e-9 at two radians.
      const missed = turns < 8 ? 1e-8 : 2;
      expect(off).toBeLessThan(missed * whole);
    }
  });
});

/** A pair of chirps made alike, with a ripple of so many bins that begins above a bin. */
function columnsOf(ripple: number, from: number): { first: number; columns: readonly [Float64Array, Float64Array, Float64Array, Float64Array] } {
  const first = 8;
  const n = 4200;
  const at = (g: (k: number) => number): Float64Array => Float64Array.from({ length: n }, (_, j) => g(first + j));
  const fall = (k: number): number => (k / 600) ** (-7 / 3) * Math.exp(-((k / 2400) ** 4));
  const bb = at((k) => fall(k) * (1 + (k > from ? ripple * Math.cos(2.1 * k) : 0)));
  return { first, columns: [at((k) => 1e-4 * fall(k)), at((k) => 1e-3 * fall(k)), at((k) => 2e-3 * fall(k)), bb] };
}

describe('how rough a pair is', () => {
  it('shows a ripple of one part in 10⁹ where it is, and nothing beside it', () => {
    const roughness = new ColumnRoughness(new ColumnReader(columnsOf(1e-9, 2000), 4000));
    expect(roughness.around(0, 1200)).toBeLessThan(1e-12);
    expect(roughness.around(0, 2400)).toBeGreaterThan(1e-12);
  });

  it('sees what ten points miss between bins where a block holds only a few', () => {
    const rough = new ColumnRoughness(new ColumnReader(columnsOf(1e-6, 0), 4000));
    const smooth = new ColumnRoughness(new ColumnReader(columnsOf(0, 0), 4000));
    expect(rough.around(2, 200)).toBeGreaterThan(1e-7);
    expect(smooth.around(2, 200)).toBeLessThan(1e-9);
  });
});

describe('the bound between two masses under a table with lines', () => {
  const weigher = lined(2500);
  const columns = columnsOf(0, 0);
  const last = 4000;
  const distances = new TableDistance(new ColumnReader(columns, last), weigher, 20, 800, [1, 1]);
  const [, er, ei, bb] = columns.columns;

  /** The product at a mass over ‖a‖‖b‖ at any lag, from bins, and the norms. */
  function productAt(dfHz: number): { norm: number; at: (lag: number) => readonly [number, number] } {
    const { first, values } = binWeights(weigher, { dfHz, fLowHz: 20, fHighHz: Math.min(800, last * dfHz), firstBin: 8, lastBin: last, curveLowHz: 15, curveHighHz: 900, order: 8 });
    const [dd] = columns.columns;
    let [na, nb] = [0, 0];
    values.forEach((v, j) => {
      const i = first + j - columns.first;
      na += v * (dd[i]! + 2 * er[i]! + bb[i]!);
      nb += v * bb[i]!;
    });
    const norm = Math.sqrt(na * nb);
    const at = (lag: number): readonly [number, number] => {
      let [re, im] = [0, 0];
      values.forEach((v, j) => {
        const i = first + j - columns.first;
        const [c, s] = [Math.cos(2 * Math.PI * (first + j) * lag), Math.sin(2 * Math.PI * (first + j) * lag)];
        re += v * ((er[i]! + bb[i]!) * c - ei[i]! * s);
        im += v * ((er[i]! + bb[i]!) * s + ei[i]! * c);
      });
      return [re / norm, im / norm];
    };
    return { norm, at };
  }

  it('is never passed, and is not idle', () => {
    const [low, high] = [productAt(0.1), productAt(0.1 / Math.SQRT2)];
    for (const share of [0, 0.3, 0.7, 1]) {
      const dfHz = 0.1 / Math.SQRT2 ** share;
      const own = productAt(dfHz);
      const bound = distances.bound(distances.mark(dfHz, own.norm), distances.mark(0.1, low.norm), distances.mark(0.1 / Math.SQRT2, high.norm), share);
      let most = 0;
      for (let lag = 0; lag < 0.01; lag += 0.0001) {
        const [z, p, q] = [own.at(lag), low.at(lag), high.at(lag)];
        most = Math.max(most, Math.hypot(z[0] - (1 - share) * p[0] - share * q[0], z[1] - (1 - share) * p[1] - share * q[1]));
      }
      expect(most).toBeLessThan(bound + 1e-12);
      expect(bound).toBeLessThan(0.6);
      if (share > 0 && share < 1) expect(most).toBeGreaterThan(bound / 20);
    }
  });

  it('takes the extremes of every row in a cell, and zero outside the band', () => {
    const { most, least, logLow } = new NoiseExtremes(weigher, 20, 800);
    expect([most[0], least[0], least[1], most.at(-1), least.at(-1)]).toEqual([0, 0, 0, 0, 0]);
    for (const f of [...weigher.kinksHz].filter((x) => x > 21 && x < 790)) {
      const i = Math.floor((Math.log(f) - logLow) / 0.002) + 1;
      const v = weigher.continuedAt(weigher.firstKinkAbove(f), -1, Math.log(f));
      expect(v).toBeLessThanOrEqual(most[i]! * (1 + 1e-12));
      expect(v).toBeGreaterThanOrEqual(least[i]! * (1 - 1e-12));
    }
  });
});
