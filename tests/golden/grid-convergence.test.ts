import { describe, expect, it } from 'vitest';
import { orderOfValues, richardsonValue } from '@/lib/engine/extrapolation/richardson';
import { convergenceOrder } from '@/lib/engine/quantities/convergence-order';
import { extrapolatedValue } from '@/lib/engine/quantities/extrapolated-value';
import { measureSeries, runOf, seriesBy } from './run-signals';

/** What a run without error peaks at; runs are scaled so that the numbers of the examples are their amplitudes there. */
const PEAK = 0.3270350226016691;
const runs = (values: readonly number[], spacings: readonly number[]) => values.map((value, i) => runOf({ phaseRad: 0, amplitude: value / PEAK - 1 }, { name: `run ${i}`, resolution: spacings[i]! }));
const settings = { observable: 'amplitude-at-peak' } as const;
const routes = ['A', 'B'] as const;

describe('published examples of grid convergence', () => {
  const roache = [0.96178, 0.96854, 0.9705];
  it('H1: constant ratio 2 gives order 1.78617, the value 0.9713, and errors of 0.1031 and 0.3562 per cent by the factor 1.25 (required: published; examination of spatial grid convergence of NASA Glenn, after Roache 1998)', () => {
    const series = runs(roache, [4, 2, 1]);
    for (const route of routes) {
      expect(seriesBy(route, convergenceOrder, series, settings)).toAgreeWith(1.78617, { relative: 2e-4 });
      expect(seriesBy(route, extrapolatedValue, series, settings)).toAgreeWith(0.9713, { relative: 2e-4 });
    }
    const { value, components } = measureSeries(extrapolatedValue, series, settings).points[0]!;
    expect(components!.errorEstimate! / roache[2]!).toAgreeWith(0.00103083, { relative: 2e-4 });
    expect((1.25 * Math.abs(value! - roache[1]!)) / roache[1]!).toAgreeWith(0.00356249, { relative: 2e-4 });
  });

  it('H2: ratios 1.5 and 1.333 give order 1.53 and the value 6.1685 (required: from memory; Celik et al. 2008, J. Fluids Eng. 130, 078001, Table 1)', () => {
    const series = runs([5.863, 5.972, 6.063], [1.5 * 1.333, 1.5, 1]);
    for (const route of routes) {
      expect(seriesBy(route, convergenceOrder, series, settings)).toAgreeWith(1.53, { relative: 6e-3 });
      expect(seriesBy(route, extrapolatedValue, series, settings)).toAgreeWith(6.1685, { relative: 6e-3 });
    }
  });

  it('H3: 1 + 0.3h⁴ at ratio 1.25 gives order 4, and T5: 1 + hᵖ any p and the value 1 (required: published; closed form)', () => {
    const fourth = [1, 0.8, 0.64] as const;
    const found = orderOfValues([1.3, 1.12288, 1.050331648], fourth);
    expect(found.ok ? found.value : NaN).toAgreeWith(4, { relative: 1e-9 });
    for (const p of [0.7, 1, 2.5, 6]) {
      const [x1, x2, x3] = fourth.map((h) => 1 + h ** p) as [number, number, number];
      const order = orderOfValues([x1, x2, x3], fourth);
      expect(order.ok ? order.value : NaN).toAgreeWith(p, { relative: 1e-9 });
      expect(richardsonValue(x2, x3, 0.8, 0.64, p)).toAgreeWith(1, 1e-9);
    }
  });
});
