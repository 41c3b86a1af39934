import type { Figure, MeasuredPoint, Measurement } from '@/lib/engine/contract/measurement';
import { isFiniteNumber } from '@/lib/kernel/finite';
import type { SweptValue } from '@/lib/kernel/place';

const times = (value: number | null, k: number): number | null => (value === null ? null : value * k);

const scaledPoint = ({ at, value, routes, expandedUncertainty, settings }: MeasuredPoint, k: number): MeasuredPoint => ({
  at, value: times(value, k), routes: { A: times(routes.A, k), B: times(routes.B, k) }, expandedUncertainty: times(expandedUncertainty, Math.abs(k)), ...(settings ? { settings } : {}),
});

const isNumberLine = ({ kind }: Figure, role: string): boolean => kind === 'sweep' && role === 'recomputed';

/** What else was drawn is of the number before its factor: waveforms, integrands, noise. */
const scaledFigure = (figure: Figure, at: (i: number) => number): Figure => ({ ...figure, series: figure.series.map((s) => (isNumberLine(figure, s.role) ? { ...s, values: s.values.map((v, i) => times(v, at(i))) } : s)) });

/** Number, routes and U times every factor. Components, budget and sensitivities are of the number without, and are left out. */
export function timesFactors(measurement: Measurement, factors: readonly (number | readonly number[])[]): Measurement {
  if (factors.length === 0) return measurement;
  const at = (i: number): number => factors.reduce<number>((all, k) => all * (typeof k === 'number' ? k : (k[i] ?? Number.NaN)), 1);
  const { metricBound: _bound, sensitivities: _sensitivities, ...rest } = measurement;
  return { ...rest, points: measurement.points.map((point, i) => scaledPoint(point, at(i))), budget: [], figures: measurement.figures.map((figure) => scaledFigure(figure, at)) };
}

/** Points at the places that the author stated, though the engine was asked at scaled ones; sweeps are drawn there too. */
export function atPlaces(measurement: Measurement, places: readonly SweptValue[], { setting, by }: { readonly setting: string; readonly by: number }): Measurement {
  const back = (value: SweptValue | undefined): SweptValue | undefined => places.find((place) => isFiniteNumber(place) && isFiniteNumber(value) && Math.abs(place * by - value) <= 1e-9 * Math.abs(value)) ?? value;
  const figures = measurement.figures.map((figure): Figure => {
    const stated = back(figure.at?.[setting]);
    const drawn = figure.kind === 'sweep' ? { ...figure, x: { ...figure.x, values: figure.x.values.map((x) => x / by) } } : figure;
    return stated === undefined ? drawn : { ...drawn, at: { ...drawn.at, [setting]: stated } };
  });
  return { ...measurement, figures, points: measurement.points.map((point, i) => ({ ...point, at: { [setting]: places[i] ?? Number.NaN } })) };
}

/** Figures of a sweep whose points were measured one by one, as one; curves of a single point stand once, those of the first. */
function oneSweep(figures: readonly (readonly Figure[])[]): Figure[] {
  const sweeps = figures.flatMap((of) => of.filter(({ kind }) => kind === 'sweep'));
  const [first] = sweeps;
  const whole = first && { ...first, x: { ...first.x, values: sweeps.flatMap(({ x }) => x.values) }, series: first.series.map((s, i) => ({ ...s, values: sweeps.flatMap(({ series }) => series[i]?.values ?? []) })) };
  return [...(whole ? [whole] : []), ...(figures[0] ?? []).filter(({ kind }) => kind !== 'sweep')];
}

/** One measurement of points that were measured one by one, each under settings of its own. */
export function oneAfterAnother(measurements: readonly Measurement[]): Measurement {
  const [first] = measurements;
  if (first === undefined || measurements.length === 1) return first ?? { points: [], budget: [], findings: [], assumed: [], settings: [], routeBPoints: [], figures: [] };
  const { metricBound: _bound, sensitivities: _sensitivities, ...rest } = first;
  return {
    ...rest,
    points: measurements.flatMap(({ points }) => points),
    routeBPoints: measurements.flatMap(({ routeBPoints }, i) => (routeBPoints.length > 0 ? [i] : [])),
    findings: [...new Map(measurements.flatMap(({ findings }) => findings).map((finding) => [JSON.stringify(finding), finding])).values()],
    assumed: [...new Set(measurements.flatMap(({ assumed }) => assumed))],
    figures: oneSweep(measurements.map(({ figures }) => figures)),
  };
}
