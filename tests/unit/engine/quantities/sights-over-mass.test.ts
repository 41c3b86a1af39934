import { describe, expect, it } from 'vitest';
import { conditionWaveform } from '@/lib/engine/conditioning/condition-waveform';
import { detectorPoint } from '@/lib/engine/conditioning/detector-settings';
import type { DetectorRoute, SightMatch } from '@/lib/engine/contract/route';
import type { DeclaredSettings } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { crestOf, ladderPoints } from '@/lib/engine/routes/a/mass-ladder';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { hillTop, WIDE } from '@/lib/engine/routes/b/mass-hill';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { degeneracyRecipe } from '@/lib/engine/quantities/detector/degeneracy-recipe';
import { placedAgain, sightProblem } from '@/lib/engine/quantities/detector/sight-problem';
import { curve, inMasses, measured } from '../../../support/detector-claims';

/** Two packets with mirrored modes; `faster` shortens time: a binary of so much more mass brings the original back. */
function packets(name: string, faster: number): Waveform {
  const axis = Float64Array.from({ length: 1000 }, (_, i) => i * 0.5);
  const mode = (l: number, m: number, omega: number, size: number): Mode[] => {
    const at = (t: number): number => size * Math.exp(-(((t * faster - 250) / 50) ** 2));
    const re = axis.map((t) => at(t) * Math.cos(omega * t * faster));
    const im = axis.map((t) => -at(t) * Math.sin(omega * t * faster));
    const sign = l % 2 === 0 ? 1 : -1;
    return [{ l, m, re, im }, { l, m: -m, re: re.map((x) => sign * x), im: im.map((x) => -sign * x) }];
  };
  return inMasses(name, axis, [...mode(2, 2, 0.25, 1), ...mode(3, 3, 0.45, 0.4)], { uniformStep: 0.5 });
}
const slow = packets('slow', 1);
const fast = packets('fast', 1.07);
const declared: DeclaredSettings = { totalMassMsun: 100, fLowHz: 20, fHighHz: 600, maximise: ['time', 'polarisation', 'phase', 'templateMass'] };

function seen(route: DetectorRoute, range: readonly [number, number], changes: DeclaredSettings = {}): { table: SightMatch; whole: SightMatch } {
  const [a, b] = [conditionWaveform(slow, 'all'), conditionWaveform(fast, 'all')];
  const point = detectorPoint({ declared: { ...declared, ...changes, templateMassRange: range }, at: {}, a, b, noise: curve('G2'), traits: degeneracyRecipe.traits({}) });
  const problem = sightProblem({ route }, point, point.b!, 1.1);
  const sight = { inclinationRad: 1.1, azimuthRad: 0.4 };
  const table = problem.matcher.best(sight);
  return { table, whole: placedAgain(problem, sight, table) };
}

describe('a template’s mass searched from a line of sight by tables', { timeout: 60_000 }, () => {
  it.each([routeA, routeB])('finds the mass at which a hastened signal is the original again (route $name)', (route) => {
    const { table, whole } = seen(route, [1, 1.15]);
    expect(table.massFactor!).toAgreeWith(1.07, 1e-5);
    expect(table.match).toAgreeWith(1, 1e-8);
    expect(whole.match).toAgreeWith(1, 1e-9);
    expect(table.onBound).toBe(false);
  });

  it('is on the bound where the range ends before the maximum, and both routes read the same there', () => {
    const [A, B] = [routeA, routeB].map((route) => seen(route, [0.95, 1.02]));
    for (const { table, whole } of [A!, B!]) {
      expect(table.massFactor!).toAgreeWith(1.02, 1e-9);
      expect(table.onBound).toBe(true);
      expect(table.match).toAgreeWith(whole.match, 1e-8);
    }
    expect(B!.table.match).toAgreeWith(A!.table.match, 1e-8);
    expect(A!.table.match).toBeLessThan(0.999);
  });

  it('says so beside the number', () => {
    const claim = { quantity: 'degeneracy', a: slow, b: fast, settings: { ...declared, inclinationRad: 1.1, azimuthRad: 0.4, templateMassRange: [0.99, 1.02] as const } };
    expect(measured(claim).points[0]!.remarks).toContain('lower bound only');
  });

  it.each([routeA, routeB])('holds without a free shift, azimuth or turn (route $name)', (route) => {
    // Both begin at t = 0, about which a mass stretches.
    expect(seen(route, [1.04, 1.1], { maximise: ['templateMass'] }).table.massFactor!).toAgreeWith(1.07, 1e-5);
    expect(seen(route, [1.04, 1.1], { maximise: ['time', 'templateMass', 'inclination'] }).table.match).toAgreeWith(1, 1e-8);
  });
});

describe('the top of a hill over mass', () => {
  const peak = 0.23456;
  const hill = (x: number): number => 1 - 0.01 * (1 - Math.cos(3 * (x - peak)));

  it('is read off a Chebyshev series, whose last terms say what it is worth (route A)', () => {
    const { y, value, tail } = crestOf(Array.from(ladderPoints, (x) => hill(x)));
    expect(y).toAgreeWith(peak, 1e-2);
    expect(Math.abs(value - 1)).toBeLessThan(3 * tail + 1e-15);
    expect(crestOf(Array.from(ladderPoints, (x) => x)).y).toBe(1);
    expect(crestOf(Array.from(ladderPoints, () => Number.NaN)).tail).toBe(Infinity);
  });

  it('is read off equal steps, and halving them gains two orders and more (route B)', () => {
    const errors = [0.4, 0.2, 0.1].map((step) => {
      const first = Math.round(peak / step) - 3;
      return Math.abs(hillTop(Array.from({ length: WIDE }, (_, i) => hill((first + i) * step)), 3).value - 1);
    });
    expect(errors[1]! * 30).toBeLessThan(errors[0]!);
    expect(errors[2]!).toBeLessThan(1e-9);
  });
});
