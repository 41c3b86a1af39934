import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { DetectorRoute, MatchOutcome, Side } from '@/lib/engine/contract/route';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { bandOf, timeSide } from '../golden/signals';

/** A smooth coloured noise, so that nothing holds by the flatness of white noise alone. */
const band = bandOf((f) => 1e-46 * ((f / 100) ** -4 + 2 + (f / 300) ** 2), 30, 500);

interface Burst {
  readonly f0Hz: number;
  readonly widthS: number;
  readonly atS: number;
  readonly phaseRad: number;
  readonly amplitude: number;
}
const RATE_HZ = 2048;

/** A sine-Gaussian, quiet at both ends of its half second. */
const burst = ({ f0Hz, widthS, atS, phaseRad, amplitude }: Burst): Side =>
  timeSide(-0.25, 0.25, RATE_HZ, (t) => {
    const x = t - atS;
    const envelope = amplitude * 1e-21 * Math.exp((-x * x) / (2 * widthS * widthS));
    const phase = 2 * Math.PI * f0Hz * x + phaseRad;
    return { plus: envelope * Math.cos(phase), cross: envelope * Math.sin(phase) };
  });

const bursts = fc.record({
  f0Hz: fc.double({ min: 150, max: 300, noNaN: true }),
  widthS: fc.double({ min: 8e-3, max: 1.6e-2, noNaN: true }),
  atS: fc.double({ min: -0.05, max: 0.05, noNaN: true }),
  phaseRad: fc.double({ min: 0, max: 6, noNaN: true }),
  amplitude: fc.double({ min: 0.3, max: 3, noNaN: true }),
});

const matchOf = (route: DetectorRoute, a: Side, b: Side): MatchOutcome =>
  route.match({ a, b, band, response: 'plus', maximise: ['time', 'phase'], templateMassRange: [1, 1], rescale: (side) => side });

/** Few runs of a real computation each; the seed is fixed, so a failure can be met again. */
const runs = { numRuns: 12, seed: 20261 };
const CLOSE = 9;

describe.each([routeA, routeB])('a match by route $name', (route) => {
  it('of a signal with itself moved by less than a sample and turned in phase is 1, and says by how much', () => {
    fc.assert(fc.property(bursts, fc.double({ min: -9e-4, max: 9e-4, noNaN: true }), fc.double({ min: -3, max: 3, noNaN: true }), (a, dt, dphi) => {
      const found = matchOf(route, burst(a), burst({ ...a, atS: a.atS + dt, phaseRad: a.phaseRad + dphi }));
      expect(found.match).toBeCloseTo(1, CLOSE);
      expect(found.timeShiftS).toBeCloseTo(-dt, 7);
    }), runs);
  });

  it('does not change when the two signals change places', () => {
    fc.assert(fc.property(bursts, bursts, (a, b) => {
      expect(matchOf(route, burst(a), burst(b)).match).toBeCloseTo(matchOf(route, burst(b), burst(a)).match, CLOSE);
    }), runs);
  });

  it('does not change when both are louder, and its complement is the mismatch, between 0 and 1', () => {
    fc.assert(fc.property(bursts, bursts, fc.double({ min: 0.1, max: 50, noNaN: true }), (a, b, louder) => {
      const quiet = matchOf(route, burst(a), burst(b));
      const loud = matchOf(route, burst({ ...a, amplitude: a.amplitude * louder }), burst({ ...b, amplitude: b.amplitude / louder }));
      expect(loud.match).toBeCloseTo(quiet.match, CLOSE);
      expect(quiet.match + quiet.mismatch).toBeCloseTo(1, CLOSE);
      expect(quiet.mismatch).toBeGreaterThanOrEqual(0);
      expect(quiet.match).toBeGreaterThanOrEqual(0);
    }), runs);
  });

  it('of two identical signals leaves a mismatch below 1e-12', () => {
    fc.assert(fc.property(bursts, (a) => {
      expect(matchOf(route, burst(a), burst(a)).mismatch).toBeLessThan(1e-12);
    }), runs);
  });
});

describe.each([routeA, routeB])('loudness by route $name', (route) => {
  it('grows as the amplitude and does not hang on when the signal arrives', () => {
    fc.assert(fc.property(bursts, fc.double({ min: 0.1, max: 50, noNaN: true }), fc.double({ min: -0.02, max: 0.02, noNaN: true }), (a, louder, later) => {
      const { plusPlus, crossCross } = route.gram(burst(a), band);
      const other = route.gram(burst({ ...a, amplitude: a.amplitude * louder, atS: a.atS + later }), band);
      expect(other.plusPlus / (plusPlus * louder * louder)).toBeCloseTo(1, 7);
      expect(other.crossCross / (crossCross * louder * louder)).toBeCloseTo(1, 7);
    }), runs);
  });

  it('halves when the same source stands twice as far', () => {
    fc.assert(fc.property(bursts, (a) => {
      const near = burst(a);
      const far = { ...near, strainPerUnit: near.strainPerUnit / 2 };
      expect(route.gram(near, band).plusPlus / route.gram(far, band).plusPlus).toBeCloseTo(4, 12);
    }), runs);
  });
});
