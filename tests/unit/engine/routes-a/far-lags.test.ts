import { describe, expect, it } from 'vitest';
import type { DetectorRoute, Side } from '@/lib/engine/contract/route';
import { routeA } from '@/lib/engine/routes/a/route-a';
import { routeB } from '@/lib/engine/routes/b/route-b';
import { bandOf, timeSide, white } from '../../../golden/signals';

/**
 * The lag is looked for on every so-manieth bin when edges ask for narrow ones, and a lag is then known up to a period.
 * These records put their loudest part, from which times count, outside the band and far from what the band shows.
 */
const burst = (t: number, at: number, fHz: number, widthS: number, size: number) => {
  const envelope = size * Math.exp(-(((t - at) / widthS) ** 2) / 2);
  const angle = 2 * Math.PI * fHz * (t - at);
  return { plus: envelope * Math.cos(angle), cross: envelope * Math.sin(angle) };
};
/**
 * 3.9 s each: a period of the strided bins is 8 s, less than twice the lags below.
 * A weak second burst in the band makes the spectrum ripple at the band's edge, which asks for narrow bins.
 */
const record = (inBandAt: number, fHz: number, loudAt: number): Side =>
  timeSide(-1.95, 1.95, 8192, (t) => {
    const parts = [burst(t, inBandAt, fHz, 0.02, 1e-21), burst(t, loudAt, fHz, 0.02, 3e-22), burst(t, loudAt, 2500, 0.01, 5e-21)];
    return { plus: parts.reduce((sum, { plus }) => sum + plus, 0), cross: parts.reduce((sum, { cross }) => sum + cross, 0) };
  });
const match = (route: DetectorRoute, a: Side, b: Side, psd: (f: number) => number) =>
  route.match({
    a,
    b,
    band: bandOf(psd, 80, 900),
    response: 'plus',
    maximise: ['time', 'phase'],
    templateMassRange: [1, 1],
    rescale: (side) => side,
  });

describe.each([
  ['white noise', white],
  ['noise that is steep at the lower edge', (f: number) => 1e-46 * (1 + (60 / f) ** 24)],
] as const)('in %s', (_, psd) => {
  it.each([
    [1.65, -1.8, -1.65, 1.8],
    [-1.65, 1.8, 1.65, -1.8],
    [1.65, -1.8, 0, 1.8],
  ])('a record at %d s (loud at %d s) is found in one at %d s (loud at %d s)', (aAt, aLoud, bAt, bLoud) => {
    const [a, b] = [record(aAt, 80, aLoud), record(bAt, 82, bLoud)];
    const [byA, byB] = [match(routeA, a, b, psd), match(routeB, a, b, psd)];
    expect(byA.timeShiftS).toAgreeWith(aAt - bAt, 1e-3);
    expect(byA.timeShiftS).toAgreeWith(byB.timeShiftS, 1e-9);
    expect(byA.match).toAgreeWith(byB.match, 1e-8);
    expect(byA.match).toBeGreaterThan(0.85);
  });
});
