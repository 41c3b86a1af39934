import { routeBIndices, worstIndex } from '../budget/chosen-points';
import { LEAST, ROOT3 } from '../budget/half-width';
import { expandedOf } from '../budget/total';
import type { BudgetLine, MeasuredPoint, Measurement } from '../contract/measurement';
import { notComputable, type MeasureRequest, type Watch } from '../contract/quantity';
import { isFinding, type At } from '../tones/measure-tones';
import { usedSettings } from '../tones/used-rows';
import { fitFigure } from './fit-figure';
import { fitFindings } from './fit-findings';
import { fitPoint, type FitPoint } from './fit-point';
import { groups, halfRangeOf, meanOf, readFits, type FitReading } from './published-fits';

const usual: Readonly<Record<FitPoint['observable'], number>> = { mass: 1, spin: 1, 'peak-luminosity': 1e-3, recoil: 100 };

function valueOf({ fit }: FitPoint, readings: readonly FitReading[]): number {
  return fit === 'mean' ? meanOf(readings) : readings.find(({ name }) => name === fit)!.value;
}

/** Every fit of the observable by name; null where it does not apply to this binary. */
function componentsOf({ observable }: FitPoint, readings: readonly FitReading[]): Record<string, number | null> {
  const named = groups.filter(({ says }) => says[observable] !== undefined).map(({ name }) => [name, readings.find((reading) => reading.name === name)?.value ?? null] as const);
  return { ...Object.fromEntries(named), halfRange: halfRangeOf(readings) };
}

/** Equal masses with equal spins recoil by nothing at all, not by a rounded nothing. */
const computation = ({ observable }: FitPoint, value: number): BudgetLine => ({
  component: 'Rounding in double precision', id: 'E01', group: 'computation', u: value === 0 ? 0 : LEAST * Math.max(Math.abs(value), usual[observable]),
  note: 'The fit is a closed form; what it holds implicitly is bisected to the last bit.',
});

function scatter(readings: readonly FitReading[]): BudgetLine {
  const half = halfRangeOf(readings);
  const base = { component: 'Scatter of published fits', id: 'E16', group: 'coverage' } as const;
  if (half === null) return { ...base, u: null, note: 'One group alone speaks of it: no scatter to see.' };
  const names = readings.filter(({ isEstimate }) => !isEstimate).map(({ name }) => name);
  return { ...base, u: half / ROOT3, note: `Half the range of ${names.join(', ')}, over √3. They were fitted to overlapping sets of simulations.` };
}

/** A waveform that lends mass ratio and spins lends nothing else: no error of its data reaches the fit. */
const untouched = ({ inputs }: MeasureRequest): BudgetLine[] =>
  inputs.of.a === undefined
    ? []
    : [
        { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: 0, note: 'None: mass ratio and spins are read from the sheet, and no data enters.' },
        { component: 'Extraction radius', id: 'E06', group: 'coverage', u: 0, note: 'None: no data enters.' },
      ];

function usedBy(point: FitPoint, request: MeasureRequest): Pick<Measurement, 'settings' | 'assumed'> {
  const { given, spinAssumed } = point;
  return usedSettings(
    [
      { name: 'observable', value: point.observable, matters: true },
      { name: 'fit', value: point.fit, matters: true },
      { name: 'massRatio', value: given.massRatio, matters: false },
      { name: 'chi1z', value: given.chi1z, matters: spinAssumed.chi1z },
      { name: 'chi2z', value: given.chi2z, matters: spinAssumed.chi2z },
    ],
    request,
  );
}

/**
 * Evaluates published fits at the claim's mass ratio and spins.
 * Shape:  see Measurement; components are each fit by name and halfRange.
 * Units:  mass in M, spin dimensionless, luminosity in c⁵/G, recoil in km/s.
 * Error:  U of the arithmetic alone; the scatter of the fits is a coverage line.
 * Fails:  notComputable with the finding that says why.
 * Source: Q17; settings.md section 5; domain reference, appendix A.
 */
export function measureFit(request: MeasureRequest, _watch: Watch): Measurement {
  const { over, claimed } = request;
  const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  const points = ats.map((at) => fitPoint({ ...request, settings: { ...request.settings, ...at } }));
  const refused = points.filter(isFinding);
  if (refused.length > 0) return notComputable(refused, ats);
  const ready = points as readonly FitPoint[];
  const byA = ready.map(({ observable, binary }) => readFits(observable, binary, 'A'));
  const values = ready.map((point, i) => valueOf(point, byA[i]!));
  const worst = worstIndex(values, claimed, () => 1);
  const point = ready[worst]!;
  const routeBPoints = request.routeAOnly ? [] : routeBIndices(ready.length, worst);
  const byB = new Map(routeBPoints.map((i) => [i, valueOf(ready[i]!, readFits(ready[i]!.observable, ready[i]!.binary, 'B'))] as const));
  const measured = ready.map((each, i): MeasuredPoint => ({
    at: ats[i]!, value: values[i]!, routes: { A: values[i]!, B: byB.get(i) ?? null },
    ...(request.routeAOnly ? { expandedUncertainty: null } : { expandedUncertainty: expandedOf([computation(each, values[i]!).u!]), components: componentsOf(each, byA[i]!) }),
  }));
  const findings = fitFindings(point, request);
  if (request.routeAOnly) return { points: measured, budget: [], findings, assumed: [], settings: [], routeBPoints: [], figures: [] };
  return { points: measured, budget: [computation(point, values[worst]!), scatter(byA[worst]!), ...untouched(request)], findings, ...usedBy(point, request), routeBPoints, figures: request.withFigures ? [fitFigure(point)] : [] };
}
