import type { Finding } from '@/lib/engine/contract/finding';
import type { MeasuredPoint, Measurement } from '@/lib/engine/contract/measurement';
import { isFiniteNumber } from '@/lib/kernel/finite';
import type { SweptValue } from '@/lib/kernel/place';
import { distinct } from '../measure-claim';
import { isStopped } from '../stopped-points';

const times = (value: number | null, k: number): number | null => (value === null ? null : value * k);

const scaledPoint = ({ at, value, routes, expandedUncertainty, settings }: MeasuredPoint, k: number): MeasuredPoint => ({
  at, value: times(value, k), routes: { A: times(routes.A, k), B: times(routes.B, k) }, expandedUncertainty: times(expandedUncertainty, Math.abs(k)), ...(settings ? { settings } : {}),
});

/** Number, routes and U times every factor. Components, budget and sensitivities are of the number without, and are left out. */
export function timesFactors(measurement: Measurement, factors: readonly (number | readonly number[])[]): Measurement {
  if (factors.length === 0) return measurement;
  const at = (i: number): number => factors.reduce<number>((all, k) => all * (typeof k === 'number' ? k : (k[i] ?? Number.NaN)), 1);
  const { metricBound: _bound, sensitivities: _sensitivities, ...rest } = measurement;
  return { ...rest, points: measurement.points.map((point, i) => scaledPoint(point, at(i))), budget: [] };
}

/** Points and curves at the places that the author stated, though the engine was asked at scaled ones. */
export function atPlaces(measurement: Measurement, places: readonly SweptValue[], { setting, by }: { readonly setting: string; readonly by: number }): Measurement {
  const stated = (value: SweptValue | undefined): SweptValue | undefined => places.find((place) => isFiniteNumber(place) && isFiniteNumber(value) && Math.abs(place * by - value) <= 1e-9 * Math.abs(value));
  const figures = measurement.figures.map((figure) => {
    const place = stated(figure.at?.[setting]);
    return place === undefined ? figure : { ...figure, at: { ...figure.at, [setting]: place } };
  });
  const findings = measurement.findings.map((finding) => {
    const place = stated(finding.at?.[setting]);
    return place === undefined ? finding : { ...finding, at: { [setting]: place } };
  });
  return { ...measurement, figures, findings, points: measurement.points.map((point, i) => ({ ...point, at: { [setting]: places[i] ?? Number.NaN } })) };
}

/** What stops one point speaks of it alone. */
const ofItsPoint = ({ findings, points: [point] }: Measurement): Finding[] =>
  findings.map((finding) => (finding.level === 'stops-lodging' && point !== undefined ? { ...finding, at: point.at } : finding));

/** One measurement of points that were measured one by one, each under settings of its own; curves are those of the first. */
export function oneAfterAnother(measurements: readonly Measurement[]): Measurement {
  const [first, ...more] = measurements;
  if (first === undefined) throw new Error('a claim has at least one point');
  if (more.length === 0) return first;
  const { metricBound: _bound, sensitivities: _sensitivities, ...rest } = first;
  const all = measurements.every(isStopped);
  return {
    ...rest,
    points: measurements.flatMap(({ points }) => points),
    routeBPoints: measurements.flatMap(({ routeBPoints }, i) => (routeBPoints.length > 0 ? [i] : [])),
    findings: distinct(measurements.flatMap((measurement) => (all ? measurement.findings : ofItsPoint(measurement)))),
    assumed: [...new Set(measurements.flatMap(({ assumed }) => assumed))],
  };
}
