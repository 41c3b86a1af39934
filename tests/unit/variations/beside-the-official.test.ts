import { describe, expect, it } from 'vitest';
import { comparePoints } from '@/app/(public)/variations/compare';
import { overlayFigures, pointOnSweep } from '@/app/(public)/variations/overlay';
import { drawnAsPoints, drawnDashed } from '@/app/_ui/charts/panels';
import type { Figure } from '@/lib/engine/contract/measurement';
import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';

const point = (value: number | null, at: Record<string, number> = {}, tolerance: number | null = 0.1): ResultPoint => ({ at, value, tolerance, expandedUncertainty: 0.01, routes: { A: value, B: value }, claimed: 1, printed: '1', apart: 0, verdict: 'agrees' });
const claim = (...points: ResultPoint[]): ResultClaim => ({ id: 'C1', quantity: 'match', unit: '', verdict: 'agrees', remarks: [], coverage: { state: 'covered' }, points, budget: [], assumed: [], settings: [], routeB: [], findings: [], candidates: [] }) as unknown as ResultClaim;
const sweep = claim(point(0.9, { totalMassMsun: 60 }), point(0.8, { totalMassMsun: 100 }));

describe('the varied number beside the official one', () => {
  it('is apart by their difference, in units of the tolerance of the claim', () => {
    const [row] = comparePoints(claim(point(1)), claim(point(1.25)), {}, 'absolute');
    expect(row).toMatchObject({ apart: 0.25, inTolerances: 2.5 });
  });

  it('is apart by the logarithm of their ratio on that scale', () => {
    const [row] = comparePoints(claim(point(2)), claim(point(4)), {}, 'ln');
    expect(row?.inTolerances).toBeCloseTo(Math.LN2 / 0.1, 12);
  });

  it('meets its own place of a sweep, and each place that has no partner says so', () => {
    const rows = comparePoints(sweep, claim(point(0.7, { totalMassMsun: 100 })), { settings: { totalMassMsun: 100 } }, 'absolute');
    expect(rows).toHaveLength(1);
    expect(rows[0]?.apart).toBeCloseTo(-0.1, 12);
    const beside = comparePoints(sweep, claim(point(0.7)), { settings: { totalMassMsun: 80 } }, 'absolute');
    expect(beside.map((r) => [r.at['totalMassMsun'], r.official?.value ?? null, r.varied?.value ?? null, r.apart])).toEqual([[80, null, 0.7, null], [60, 0.9, null, null], [100, 0.8, null, null]]);
    expect(comparePoints(sweep, claim(point(0.7)), { settings: { totalMassMsun: 100 } }, 'absolute')[0]?.official?.value).toBe(0.8);
  });

  it('has no distance where either is missing, and no unit where there is no tolerance', () => {
    expect(comparePoints(claim(point(1)), null, {}, 'absolute')).toMatchObject([{ varied: null, apart: null, inTolerances: null }]);
    expect(comparePoints(claim(point(null)), claim(point(1)), {}, 'absolute')[0]).toMatchObject({ apart: null, inTolerances: null });
    expect(comparePoints(claim(point(1, {}, null)), claim(point(2)), {}, 'absolute')[0]).toMatchObject({ apart: 1, inTolerances: null });
    expect(comparePoints(claim(point(-1)), claim(point(2)), {}, 'ln')[0]).toMatchObject({ apart: null });
  });
});

const figure = (xs: number[], values: (number | null)[], kind: Figure['kind'] = 'integrand'): Figure => ({
  kind, title: 'Weighted integrand', x: { label: 'f', unit: 'Hz', scale: 'linear', values: xs },
  series: [{ label: 'integrand', unit: '', role: 'recomputed', axis: 'left', scale: 'linear', values }],
});

describe('the plots of both', () => {
  it('lay the varied line over the official one, which alone is dashed', () => {
    const [both] = overlayFigures([figure([0, 1, 2], [0, 1, 4])], [figure([0, 1, 2], [0, 2, 8])]);
    if (!both) throw new Error('no figure');
    expect(both.series.map((s) => [s.role, s.label, drawnDashed(both, s)])).toEqual([['recomputed', 'integrand', true], ['varied', 'integrand, varied', false]]);
  });

  it('read each line between its own points where the places differ, and never outside or across a gap', () => {
    const [both] = overlayFigures([figure([0, 2, 4], [0, 2, null])], [figure([1, 2, 3], [10, 20, 30])]);
    expect(both?.x.values).toEqual([0, 1, 2, 3, 4]);
    expect(both?.series.map((s) => s.values)).toEqual([[0, 1, 2, null, null], [null, 10, 20, 30, null]]);
  });

  it('draw once what did not move', () => {
    const [both] = overlayFigures([figure([0, 1], [1, 2])], [figure([0, 1], [1, 2])]);
    expect(both?.series).toHaveLength(1);
  });

  it('are not laid over one another where they are of two points of a sweep', () => {
    const at = (totalMassMsun: number): Figure => ({ ...figure([0, 1], [1, totalMassMsun]), at: { totalMassMsun } });
    expect(overlayFigures([at(60)], [figure([0, 1], [1, 3])]).map((f) => f.title)).toEqual(['Weighted integrand', 'Weighted integrand, varied']);
    expect(overlayFigures([at(60)], [at(100)])).toHaveLength(2);
    expect(overlayFigures([at(60)], [{ ...at(60), series: figure([0, 1], [2, 3]).series }])).toHaveLength(1);
  });

  it('set one value in the place of a sweep as a point on the axes of the sweep', () => {
    const drawn: Figure = { ...figure([60, 100], [0.9, 0.8], 'sweep'), x: { label: 'totalMassMsun', unit: 'M☉', scale: 'linear', values: [60, 100] } };
    const beside = comparePoints(sweep, claim(point(0.7)), { settings: { totalMassMsun: 80 } }, 'absolute');
    const [both] = overlayFigures([drawn], pointOnSweep([drawn], beside));
    expect(both?.x.values).toEqual([60, 80, 100]);
    const lone = both?.series.find(({ role }) => role === 'varied');
    expect(lone?.values).toEqual([null, 0.7, null]);
    expect(both && lone && drawnAsPoints(both, lone)).toBe(true);
    expect(pointOnSweep([drawn], comparePoints(sweep, sweep, {}, 'absolute'))).toEqual([]);
    expect(pointOnSweep([], beside)).toEqual([]);
  });

  it('keep a figure that only one of them has', () => {
    const figures = overlayFigures([figure([0, 1], [1, 2])], [figure([0, 1], [1, 3]), figure([60], [0.9], 'sweep')]);
    expect(figures.map((f) => f.title)).toEqual(['Weighted integrand', 'Weighted integrand, varied']);
    const [, single] = figures;
    expect(single && single.series[0] && drawnAsPoints(single, single.series[0])).toBe(true);
  });
});
