import { describe, expect, it } from 'vitest';
import { areaByBasis } from '@/lib/engine/fraction/area-by-basis';
import { areaBySegments } from '@/lib/engine/fraction/area-by-segments';
import type { FractionProblem, SpinMeasure } from '@/lib/engine/fraction/fraction-found';
import { seededRandom } from '../../../support/seeded-random';

const spins = [-0.9, -0.62, -0.3, -0.11, 0.2, 0.35, 0.7, 0.9];
const equal: SpinMeasure = { kind: 'plane', m1: 0.5, m2: 0.5, volume: false };
const problem = (match: (s: number) => number, more: Partial<FractionProblem> = {}): FractionProblem => ({
  spins,
  matches: spins.map(match),
  rhos: spins.map(() => 1),
  threshold: 0.965,
  measure: equal,
  ...more,
});
const ways = [
  ['segments', areaBySegments],
  ['basis functions', areaByBasis],
] as const;

/** A cubic is its own not-a-knot spline, so that areas under these curves are known in closed form. */
describe.each(ways)('the area by %s', (_, area) => {
  const hill = (s: number): number => 1 - 0.14 * s * s;

  it('is that of the strip between the edges, in a triangle and along the diagonal', () => {
    const edge = Math.sqrt(0.035 / 0.14);
    const outside = (1 - edge / 0.9) ** 2;
    const plane = area(problem(hill));
    expect(plane.fraction).toAgreeWith(1 - outside, 1e-12);
    expect(plane.regions).toHaveLength(1);
    plane.regions[0]!.forEach((at, i) => expect(at).toAgreeWith([-edge, edge][i]!, 1e-12));
    expect(area(problem(hill, { measure: { ...equal, kind: 'diagonal' } })).fraction).toAgreeWith(edge / 0.9, 1e-12);
  });

  it('takes a trapezium for unequal masses', () => {
    const [m1, m2] = [0.75, 0.25];
    // Between ±0.45 the density is flat at 1/(1.8·m₁); the flanks hold the rest.
    const edge = 0.3;
    const found = area(problem((s) => 0.965 + 0.1 * (edge * edge - s * s), { measure: { kind: 'plane', m1, m2, volume: false } }));
    expect(found.fraction).toAgreeWith((2 * edge) / (1.8 * m1), 1e-12);
  });

  it('weighs with the cube of the loudness', () => {
    const found = area(problem((s) => 0.965 + s, { rhos: spins.map((s) => 2 + s), measure: { ...equal, kind: 'diagonal', volume: true } }));
    expect(found.fraction).toAgreeWith((2.9 ** 4 - 2 ** 4) / (2.9 ** 4 - 1.1 ** 4), 1e-12);
  });

  it('counts every part above the threshold', () => {
    const found = area(problem((s) => 0.965 + (s + 0.5) * (s - 0.1) * (s - 0.6), { measure: { ...equal, kind: 'diagonal' } }));
    expect(found.regions).toHaveLength(2);
    expect(found.fraction).toAgreeWith((0.6 + 0.3) / 1.8, 1e-12);
  });

  it('is all or nothing where the curve stays on one side', () => {
    expect(area(problem(() => 0.99)).fraction).toBe(1);
    expect(area(problem(() => 0.9))).toEqual({ fraction: 0, regions: [] });
    expect(area(problem(() => Number.NaN)).fraction).toBeNaN();
  });
});

it('is the same by both constructions for any matches', () => {
  const random = seededRandom(5);
  for (let round = 0; round < 40; round++) {
    const n = 5 + Math.floor(15 * random());
    const at = Array.from({ length: n }, (_, i) => i + 0.7 * random());
    const measure: SpinMeasure = { kind: round % 2 === 0 ? 'plane' : 'diagonal', m1: 0.6, m2: 0.4, volume: round % 3 === 0 };
    const drawn = { spins: at, matches: at.map(() => 0.9 + 0.1 * random()), rhos: at.map(() => 1 + random()), threshold: 0.95, measure };
    const [a, b] = [areaBySegments(drawn), areaByBasis(drawn)];
    expect(a.regions.length).toBe(b.regions.length);
    expect(a.fraction).toAgreeWith(b.fraction, 1e-7);
  }
});
