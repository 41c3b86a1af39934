import { describe, expect, it } from 'vitest';
import { convergenceOrder } from '@/lib/engine/quantities/convergence-order';
import { extrapolatedValue } from '@/lib/engine/quantities/extrapolated-value';
import { radiusExtrapolation } from '@/lib/engine/quantities/radius-extrapolation';
import { goldenChecks } from './golden-check';
import { atRadius, measureSeries, mixedRuns, runOf, seriesBy } from './run-signals';

/** The signal is a closed form; what has none of its own is computed from it by a separate program that shares no code with the engine. */
const script = "numpy script over the closed-form signal: fine grid, sixth-order differences, Simpson's rule, bisection";
const routes = ['A', 'B'] as const;
const mixed = mixedRuns();
const powers = [80, 96, 112].map((n) => runOf({ phaseRad: 0, amplitude: 0.02 * (80 / n) ** 3 }, { name: `p${n}`, resolution: 1 / n }));
const areal = (r: number): number => r * (1 + 1 / (2 * r)) ** 2;
const radii = [60, 80, 100, 150, 200];
const isotropic = radii.map((r) => atRadius(r, areal(r), { radiusType: 'isotropic' }));

describe('the order of a series', () => {
  for (const route of routes)
    goldenChecks([
      { id: `D6 ${route}`, what: 'of a phase of orders 4 and 1.2 is neither', required: 'published', source: 'closed form: ratio 1.8992 of 0.28929 and 0.15232 rad', value: 2.7971166184658367, relative: 1e-8, compute: () => seriesBy(route, convergenceOrder, mixed) },
      { id: `amplitude ${route}`, what: 'of an amplitude of third order', required: 'published', source: 'closed form', value: 3, relative: 1e-8, compute: () => seriesBy(route, convergenceOrder, mixed, { observable: 'amplitude' }) },
      { id: `complex ${route}`, what: 'of both together, to where the finest falls below a tenth of its peak', required: 'independent derivation', source: script, value: 2.7873850575103916, relative: 1e-8, compute: () => seriesBy(route, convergenceOrder, mixed, { observable: 'complex' }) },
      { id: `window ${route}`, what: 'of both together from 100 to 500 M', required: 'independent derivation', source: script, value: 2.7919754188663806, relative: 1e-10, compute: () => seriesBy(route, convergenceOrder, mixed, { observable: 'complex', window: [100, 500] }) },
      { id: `energy ${route}`, what: 'of the radiated energy', required: 'independent derivation', source: script, value: 2.916237904772366, relative: 1e-6, compute: () => seriesBy(route, convergenceOrder, mixed, { observable: 'radiated-energy' }) },
    ]);

  it('stands beside those of each curve, the pointwise one and the two differences', () => {
    const { components } = measureSeries(convergenceOrder, mixed, { observable: 'phase-at-peak' }).points[0]!;
    expect(components!.phase).toAgreeWith(2.7971166184658367, 1e-8);
    expect(components!.amplitude).toAgreeWith(3, 1e-8);
    expect(components!.pointwiseMedian).toAgreeWith(2.7971166184658367, 1e-8);
    expect(components!.pointwiseRange).toAgreeWith(0, 1e-8);
    expect(components!.ratio).toAgreeWith(1.8992, 2e-4);
    expect(components!.coarseDifferenceRad).toAgreeWith(0.2887, 1e-3);
  });
});

describe('the limit at zero spacing', () => {
  for (const route of routes)
    goldenChecks([
      { id: `T5 ${route}`, what: 'of an amplitude with one power of the spacing is the amplitude without', required: 'published', source: 'closed form (T5 of the design reference)', value: 0.3270350226016691, relative: 1e-9, compute: () => seriesBy(route, extrapolatedValue, powers, { observable: 'amplitude-at-peak' }) },
      { id: `phase ${route}`, what: 'of the phase at the peak by the measured order', required: 'independent derivation', source: script, value: 67.23442316568632, relative: 1e-9, compute: () => seriesBy(route, extrapolatedValue, mixed, { observable: 'phase-at-peak' }) },
      { id: `formal ${route}`, what: 'of the phase at the peak by order 4', required: 'independent derivation', source: script, value: 67.33812830662195, relative: 1e-9, compute: () => seriesBy(route, extrapolatedValue, mixed, { observable: 'phase-at-peak', formalOrder: 4 }) },
      { id: `energy ${route}`, what: 'of the radiated energy', required: 'independent derivation', source: script, value: 0.02400954350817639, relative: 1e-8, compute: () => seriesBy(route, extrapolatedValue, mixed) },
    ]);

  it('comes with order, finest value and an error of 1.25 times the distance, or three where another order was declared', () => {
    const { components } = measureSeries(extrapolatedValue, mixed, { observable: 'phase-at-peak' }).points[0]!;
    expect(components!.order).toAgreeWith(2.7971166184659166, 1e-7);
    expect(components!.finest).toAgreeWith(67.51641986849549, 1e-8);
    expect(components!.errorEstimate).toAgreeWith(0.35249587851145847, 1e-7);
    const formal = measureSeries(extrapolatedValue, mixed, { observable: 'phase-at-peak', formalOrder: 4 });
    expect(formal.points[0]!.components).toMatchObject({ order: 4, measuredOrder: expect.closeTo(2.7971166, 6) as number });
    expect(formal.points[0]!.components!.errorEstimate).toAgreeWith(0.5348746856206077, 1e-7);
  });
});

describe('the limit at infinite radius', () => {
  for (const route of routes)
    goldenChecks([
      { id: `degree 1 ${route}`, what: 'of the energy by a straight line, isotropic radii', required: 'independent derivation', source: script, value: 0.023944017378277185, relative: 1e-10, compute: () => seriesBy(route, radiusExtrapolation, isotropic, { extrapolationOrder: 1 }) },
      { id: `degree 2 ${route}`, what: 'of the energy, isotropic radii', required: 'independent derivation', source: script, value: 0.02398439344160535, relative: 1e-10, compute: () => seriesBy(route, radiusExtrapolation, isotropic) },
      { id: `degree 3 ${route}`, what: 'of the energy by a cubic, isotropic radii', required: 'independent derivation', source: script, value: 0.02398487678358404, relative: 1e-10, compute: () => seriesBy(route, radiusExtrapolation, isotropic, { extrapolationOrder: 3 }) },
      { id: `amplitude ${route}`, what: 'of an amplitude that is a quadratic in 1/r is the one without radius', required: 'published', source: 'closed form', value: 0.3270350226016691, relative: 1e-9, compute: () => seriesBy(route, radiusExtrapolation, isotropic, { observable: 'amplitude-at-peak' }) },
    ]);

  it('comes with the value of a degree less and that of the largest radius', () => {
    const { components } = measureSeries(radiusExtrapolation, isotropic).points[0]!;
    expect(components!.previousOrder).toAgreeWith(0.023944017378277185, { relative: 1e-10 });
    expect(components!.largestRadius).toAgreeWith(0.023637672144591813, { relative: 1e-10 });
    expect(components!.checkPerturbative).toBeTypeOf('number');
  });
  it('takes a coordinate radius as it stands, and says so', () => {
    const stated = radii.map((r) => atRadius(r, r, { radiusType: 'coordinate' }));
    const { points, findings } = measureSeries(radiusExtrapolation, stated);
    expect(points[0]!.value).toAgreeWith(0.023984376153332498, { relative: 1e-10 });
    expect(findings.map(({ code }) => code)).toContain('engine/coordinate-radius');
  });
});
