import { describe, expect, it } from 'vitest';
import { decoysOf } from '@/lib/explain/search/chance';
import { scaledClaim } from '@/lib/explain/search/scaled-claim';
import { lnDensity, lawAt, drawn } from '@/lib/explain/search/unexplained';
import { claimOf } from '@/tests/support/explain-flips';

const near = { tolerance: 1e-4, expandedUncertainty: 1e-6 };
const snr = claimOf('C1', [{ claimed: 25, value: 36.3 }]);
const match = claimOf('C1', [{ claimed: 0.9753, value: 0.9185, ...near }], { law: 'distance-from-one', scale: 'absolute' });
const ends = (claim: typeof snr): number[] => [0, 1].map((draw) => drawn(lawAt(claim, claim.points[0]!), draw)).sort((p, q) => p - q);

describe('what a number could be if nothing explains it', () => {
  it('lies within a factor 3 of the recomputed one', () => {
    expect(ends(snr)).toEqual([expect.closeTo(12.1, 10), expect.closeTo(108.9, 10)]);
  });

  it('a match’s distance from one lies within a factor 10, and no match is below zero', () => {
    expect(ends(match)).toEqual([expect.closeTo(0.185, 10), expect.closeTo(0.99185, 10)]);
    const apart = claimOf('C1', [{ claimed: 0.5, value: 0.4, ...near }], { law: 'distance-from-one', scale: 'absolute' });
    expect(ends(apart)).toEqual([expect.closeTo(0, 10), expect.closeTo(0.94, 10)]);
  });

  it('reaches as far as the claim where the claim lies beyond', () => {
    const scaled = claimOf('C1', [{ claimed: 3630, value: 36.3 }]);
    expect(ends(scaled)).toEqual([expect.closeTo(0.363, 10), expect.closeTo(3630, 6)]);
    const perCent = claimOf('C1', [{ claimed: 91.85, value: 0.9185, ...near }], { law: 'distance-from-one', scale: 'absolute' });
    expect(ends(perCent)[1]).toBeCloseTo(91.85, 6);
  });

  it('has a density that adds up to one', () => {
    for (const claim of [snr, { ...snr, scale: 'absolute' as const }, match]) {
      const [from, to] = ends(claim) as [number, number];
      const steps = 200_000;
      let sum = 0;
      for (let i = 0; i < steps; i++) {
        const claimed = from + ((to - from) * (i + 0.5)) / steps;
        const perUnit = claim.scale === 'ln' ? 1 / claimed : 1;
        sum += (Math.exp(lnDensity(claim, { ...claim.points[0]!, claimed })) * perUnit * (to - from)) / steps;
      }
      expect(sum).toBeCloseTo(1, 3);
    }
  });

  it('is finite at zero, at one and across the sign', () => {
    for (const [claimed, value] of [[0, 5], [5, 0], [-3, 5], [1, 0.99], [1.2, 1]] as const)
      for (const law of ['size', 'distance-from-one'] as const) {
        const claim = claimOf('C1', [{ claimed, value, ...near }], { law, scale: 'absolute' });
        expect(Number.isFinite(lnDensity(claim, claim.points[0]!))).toBe(true);
        expect(ends(claim).every(Number.isFinite)).toBe(true);
      }
  });
});

describe('decoys', () => {
  const scaled = scaledClaim(claimOf('C1', [{ claimed: 25, value: 36.3 }, { claimed: 30, value: 50 }]));
  const decoys = decoysOf(scaled, 5, 20_000);

  it('spread evenly in the logarithm over the law, each point by itself', () => {
    const of = (k: number): number[] => Array.from({ length: decoys.count }, (_, d) => decoys.values[2 * d + decoys.points.indexOf(k)]!);
    const mean = (xs: readonly number[]): number => xs.reduce((sum, x) => sum + x, 0) / xs.length;
    const [p, q] = [of(0), of(1)];
    expect(mean(p)).toBeCloseTo(Math.log(36.3), 1);
    expect(mean(p.map((x) => (x - Math.log(36.3)) ** 2))).toBeCloseTo(Math.log(3) ** 2 / 3, 1);
    expect(mean(p.map((x, d) => (x - Math.log(36.3)) * (q[d]! - Math.log(50))))).toBeCloseTo(0, 1);
  });

  it('are the same for the same seed and others for another', () => {
    expect(decoysOf(scaled, 5, 100).values).toEqual(decoysOf(scaled, 5, 100).values);
    expect(decoysOf(scaled, 6, 100).values).not.toEqual(decoysOf(scaled, 5, 100).values);
  });
});
