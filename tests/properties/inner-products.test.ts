import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Band, MatchOutcome, Side } from '@/lib/engine/contract/route';
import type { MaximiseOver } from '@/lib/engine/contract/settings';
import { createRouteA } from '@/lib/engine/routes/a/route-a';
import { columns, curve } from '../support/detector-claims';

/** Bursts whose closed form can be moved by any time and turned by any phase; the record is long enough to stay quiet at its ends. */
interface Burst {
  readonly fHz: number;
  readonly widthS: number;
  readonly atS: number;
  readonly phaseRad: number;
  readonly chirp: number;
  readonly size: number;
}
const axis = Float64Array.from({ length: 8192 }, (_, i) => -1 + i / 4096);

function record(name: string, { fHz, widthS, atS, phaseRad, chirp, size }: Burst): Side {
  const strain = (t: number, quarter: number) => {
    const s = t - atS;
    return size * Math.exp(-((s / widthS) ** 2) / 2) * Math.cos(2 * Math.PI * (fHz * s + chirp * s * s) + phaseRad - quarter);
  };
  const waveform = columns(
    name,
    axis,
    axis.map((t) => strain(t, 0)),
    axis.map((t) => strain(t, Math.PI / 2)),
  );
  return { waveform, taper: { start: null, end: null }, secondsPerUnit: 1, strainPerUnit: 1, inclinationRad: 0, azimuthRad: 0 };
}

const burst = (atS: fc.Arbitrary<number> = fc.constant(0)): fc.Arbitrary<Burst> =>
  fc.record({
    fHz: fc.double({ min: 60, max: 350, noNaN: true }),
    widthS: fc.double({ min: 0.008, max: 0.03, noNaN: true }),
    atS,
    phaseRad: fc.double({ min: -3, max: 3, noNaN: true }),
    chirp: fc.double({ min: -400, max: 400, noNaN: true }),
    size: fc.constant(1e-21),
  });

const route = createRouteA();
const band: Band = { noise: curve('G2'), fLowHz: 20, fHighHz: 1500 };
const outcome = (a: Side, b: Side, maximise: readonly MaximiseOver[] = ['time', 'phase']): MatchOutcome =>
  route.match({ a, b, band, response: 'plus', maximise, templateMassRange: [1, 1], rescale: (side) => side });
const match = (a: Side, b: Side, maximise?: readonly MaximiseOver[]): number => outcome(a, b, maximise).match;
const few = { numRuns: 12, seed: 20 };

describe('a match', () => {
  it('does not change when b is moved by any part of a sample or turned by any phase (T10), and tells the move', () => {
    fc.assert(
      fc.property(
        burst(),
        burst(),
        fc.double({ min: -0.2, max: 0.2, noNaN: true }),
        fc.double({ min: -3, max: 3, noNaN: true }),
        (p, q, byS, byRad) => {
          const [a, b] = [record('A', p), record('B', q)];
          const moved = record('B', { ...q, atS: byS, phaseRad: q.phaseRad + byRad });
          expect(match(a, moved)).toAgreeWith(match(a, b), 1e-10);
          const copy = outcome(record('A', q), moved);
          expect(copy.match).toAgreeWith(1, 1e-12);
          expect(copy.timeShiftS).toAgreeWith(-byS, 1e-9);
          expect(Math.cos(copy.phaseShiftRad + byRad)).toAgreeWith(1, 1e-9);
        },
      ),
      few,
    );
  });

  it('is the same with a and b exchanged, and their shift changes sign', () => {
    fc.assert(
      fc.property(burst(), burst(fc.constant(0.0371)), (p, q) => {
        const [a, b] = [record('A', p), record('B', q)];
        const [one, other] = [outcome(a, b), outcome(b, a)];
        expect(other.match).toAgreeWith(one.match, 1e-12);
        expect(other.timeShiftS).toAgreeWith(-one.timeShiftS, 1e-8);
      }),
      few,
    );
  });

  it('and the mismatch stay in 0 … 1, add up to 1, and lie above any overlap', () => {
    fc.assert(
      fc.property(burst(), burst(), (p, q) => {
        const [a, b] = [record('A', p), record('B', q)];
        const { match: m, mismatch: mm } = outcome(a, b);
        expect(m + mm).toAgreeWith(1, 1e-12);
        expect(mm).toBeGreaterThanOrEqual(0);
        const overlap = route.overlap(a, b, band, 'plus');
        expect(Math.abs(overlap)).toBeLessThanOrEqual(m + 1e-12);
        for (const maximise of ['time', 'phase'] as const) expect(match(a, b, [maximise])).toBeLessThanOrEqual(m + 1e-12);
      }),
      few,
    );
  });

  it('of two identical signals misses 1 by less than 1e-12 (T11)', () => {
    fc.assert(
      fc.property(burst(), (p) => {
        expect(outcome(record('A', p), record('B', p)).mismatch).toBeLessThan(1e-12);
      }),
      few,
    );
  });

  it('does not see a common factor on one waveform or on the noise', () => {
    fc.assert(
      fc.property(burst(), burst(), fc.double({ min: 1e-3, max: 1e3, noNaN: true }), (p, q, factor) => {
        const [a, b] = [record('A', p), record('B', q)];
        const louder = record('B', { ...q, size: q.size * factor });
        expect(match(a, louder)).toAgreeWith(match(a, b), 1e-12);
      }),
      few,
    );
  });
});

describe('a loudness', () => {
  it('grows with the strain, whatever its time and phase, and adds up over bands (T12)', () => {
    fc.assert(
      fc.property(
        burst(fc.double({ min: -0.2, max: 0.2, noNaN: true })),
        fc.double({ min: 0.1, max: 10, noNaN: true }),
        fc.double({ min: 50, max: 900, noNaN: true }),
        (p, factor, cut) => {
          const rho = (side: Side, more: Partial<Band> = {}) => Math.sqrt(route.gram(side, { ...band, ...more }).plusPlus);
          const a = record('A', p);
          const whole = rho(a);
          expect(rho(record('A', { ...p, size: p.size * factor, atS: p.atS + 0.01234, phaseRad: p.phaseRad }))).toAgreeWith(
            whole * factor,
            { relative: 1e-9 },
          );
          const parts = Math.hypot(rho(a, { fHighHz: cut }), rho(a, { fLowHz: cut }));
          expect(parts).toAgreeWith(whole, { relative: 1e-9 });
        },
      ),
      few,
    );
  });
});
