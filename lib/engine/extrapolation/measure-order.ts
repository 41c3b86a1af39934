import { houseOrderObservable } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import type { Observable } from '../contract/settings';
import { err } from '@/lib/kernel/result';
import { stop } from '../tones/measure-tones';
import { floorRows, usedSettings } from '../tones/used-rows';
import { curveNamed, curvesByRouteA, differencesOf, orderByRouteB, ordersOf, pointwiseOrders, slipOf, soundOrder, type Interval, type ThreeRuns } from './curve-orders';
import { followRuns, type Followed, type FollowedRun } from './followed-runs';
import { fourthRunLine, intervalLine, orderComputation } from './order-budget';
import { orderByNewton } from './order-by-newton';
import { orderOfValues, richardsonValue, type OfThree, type Spacings } from './richardson';
import type { Curve } from './run-curves';
import type { Run } from './runs';
import { differsBeyondRounding, floorLines, propagatedLines, sensitivities } from './series-budget';
import { approachFigure, convergenceFigures, curveUnit } from './series-figures';
import { foundInRuns, named, noOrder, short, spreadFindings, waveformsOfRuns } from './series-findings';
import { areNumbers, isMeter, measurementOf, meterOf, readRuns, stepper, stopped, titleOf, type Scalars } from './series-measurement';
import { areRuns, spacedRuns, type SpacedRuns } from './spaced-runs';
import { runFindings, type RunScalar } from './run-scalar';

const spacingsOf = (runs: readonly Run[]): Spacings => runs.map(({ place }) => place) as unknown as Spacings;
const namesOf = (runs: readonly Run[]) => runs.map(({ waveform }) => waveform.name) as unknown as readonly [string, string, string];
const claimedOf = ({ claimed }: MeasureRequest): number | null => claimed[0] ?? null;

/** Which runs, as the beginning of the sentence that says why they have no order. */
const because = (runs: readonly Run[], what: string, reason: string): Finding =>
  noOrder(named(waveformsOfRuns(runs)), `${what} of ${named(waveformsOfRuns(runs))} ${reason}.`, 'Supply runs whose differences shrink with the spacing, or claim the difference of the two finest runs instead.');

function intervalOf(runs: readonly FollowedRun[], { settings: { window } }: MeasureRequest): Interval | Finding {
  const axes = runs.map(({ tones }) => tones.A.axis);
  const last = Math.min(...axes.map((axis) => axis[axis.length - 1]!));
  const first = Math.max(...axes.map((axis) => axis[0]!));
  const from = window?.[0] ?? Math.max(first, ...runs.map(({ startM }) => startM));
  const to = window?.[1] ?? null;
  const names = named(runs.map(({ waveform }) => waveform));
  if (from >= first && from < (to ?? last) && (to ?? last) <= last) return { from, to, last };
  return stop('engine/no-signal', names, `The runs are to be compared from t = ${from} to ${to ?? last} M, but ${names} have the times from ${first} to ${last} M in common.`, 'Declare a window inside all runs, or supply records of the same stretch.');
}

const isCurve = (observable: Observable): observable is 'dominant' | Curve => ['dominant', 'phase', 'amplitude', 'complex'].includes(observable);

const curveFindings = (followed: Followed): Finding[] => foundInRuns(followed.runs.map((run) => ({ name: run.waveform.name, findings: runFindings(run, followed) })));

/** Order of the next coarser three runs: null where they have none, undefined where there are not as many. */
const orderBefore = ({ all }: SpacedRuns, request: MeasureRequest, curve: Curve): number | null | undefined => (all.length < 4 ? undefined : orderAgain(all.slice(-4, -1), request, curve));

/** The order of three runs by route A, under other circumstances than the claim's. */
function orderAgain(runs: readonly Run[], request: MeasureRequest, curve: Curve): number | null {
  const followed = followRuns(waveformsOfRuns(runs), runs[2]!.waveform, request.settings);
  if ('code' in followed) return null;
  const interval = intervalOf(followed.runs, request);
  if ('code' in interval) return null;
  const three = followed.runs as unknown as ThreeRuns;
  const found = soundOrder(curvesByRouteA(three, interval), curve, spacingsOf(runs), slipOf(three));
  return found.ok ? found.value : null;
}

function ofCurves(spaced: SpacedRuns, observable: 'dominant' | Curve, request: MeasureRequest, step: (doing: string) => void): Measurement {
  const { runs, where } = spaced;
  const followed = followRuns(waveformsOfRuns(runs), runs[2]!.waveform, request.settings);
  if ('code' in followed) return stopped([followed]);
  const interval = intervalOf(followed.runs, request);
  if ('code' in interval) return stopped([interval]);
  step('route A');
  const three = followed.runs as unknown as ThreeRuns;
  const spacings = spacingsOf(runs);
  const curves = curvesByRouteA(three, interval);
  const curve = curveNamed(observable, curves);
  const slip = slipOf(three);
  const found = soundOrder(curves, curve, spacings, slip);
  const seen = [...spaced.findings, ...curveFindings(followed)];
  if (!found.ok) return stopped([because(runs, `Over time, the ${curve === 'complex' ? 'complex values' : `${curve}s`}`, found.error), ...seen]);
  const order = found.value;
  const pointwise = pointwiseOrders(curves, curve, spacings, slip);
  const of = { runs: three, spacings, interval, curve, curves, order };
  const { mode, severalModes, floor } = followed;
  const budget = (): readonly BudgetLine[] => {
    step('uncertainty');
    return [...orderComputation(of), fourthRunLine(order, orderBefore(spaced, request, curve)), ...floorLines(floor, order, (other) => orderAgain(runs, { ...request, settings: { ...request.settings, integrationFloor: other } }, curve)), intervalLine(of)];
  };
  return measurementOf(
    {
      value: order,
      byRouteB: request.routeAOnly ? Number.NaN : orderByRouteB(three, interval, curve, spacings),
      components: { ...ordersOf(curves, spacings, slip), pointwiseMedian: pointwise.median, pointwiseRange: pointwise.range, ...differences(curveUnit[curve], differencesOf(curves, curve)) },
      budget,
      findings: [...seen, ...spreadFindings(pointwise.range, pointwise.median, where)],
      used: usedSettings(
        [
          { name: 'observable', value: observable, matters: true },
          ...(mode === null ? [] : [{ name: 'modes', value: [mode], matters: severalModes } as const]),
          { name: 'window', value: [curves.t[0]!, curves.t[curves.t.length - 1]!], unit: 'M', matters: true },
          ...floorRows(floor, three[2].startM, request),
        ],
        request,
      ),
      figures: () => convergenceFigures({ curves, curve, spacings, names: namesOf(runs), order, claimed: claimedOf(request), pointwise: pointwise.orders }),
    },
    request,
  );
}

/** Orders of the curves beside that of a number, where they can be had. */
function besides(runs: readonly Run[], request: MeasureRequest): Record<string, number | null> {
  const none = { phase: null, amplitude: null, complex: null, pointwiseMedian: null, pointwiseRange: null };
  // A window of a number is not one of the curves' times.
  const { window: _ofTheNumber, ...settings } = request.settings;
  const followed = followRuns(waveformsOfRuns(runs), runs[2]!.waveform, settings);
  if ('code' in followed) return none;
  const interval = intervalOf(followed.runs, { ...request, settings });
  if ('code' in interval) return none;
  const three = followed.runs as unknown as ThreeRuns;
  const curves = curvesByRouteA(three, interval);
  const slip = slipOf(three);
  const { median, range } = pointwiseOrders(curves, curveNamed('dominant', curves), spacingsOf(runs), slip);
  return { ...ordersOf(curves, spacingsOf(runs), slip), pointwiseMedian: median, pointwiseRange: range };
}

/** The two differences and their ratio; in a unit of their own where that is an angle or none. */
function differences(unit: string, [coarse, fine]: readonly [number, number]): Record<string, number> {
  const ratio = coarse / fine;
  if (unit === 'rad') return { coarseDifferenceRad: coarse, fineDifferenceRad: fine, ratio };
  return unit === '' ? { coarseDifference: coarse, fineDifference: fine, ratio } : { ratio };
}

const valuesA = (scalars: readonly RunScalar[]): OfThree => scalars.map(({ A }) => A) as unknown as OfThree;

function ofScalars(spaced: SpacedRuns, observable: Observable, scalars: Scalars, request: MeasureRequest, watch: Watch, step: (doing: string) => void): Measurement {
  const { runs } = spaced;
  const leader = runs[2]!.waveform;
  const meter = meterOf(observable, runs, leader, scalars, request, watch);
  if (!isMeter(meter)) return stopped(meter);
  const read = readRuns(meter, runs, step);
  if (!areNumbers(read)) return stopped(read);
  const spacings = spacingsOf(runs);
  const values = valuesA(read);
  const seen = [...spaced.findings, ...foundInRuns(read.map(({ findings }, i) => ({ name: runs[i]!.waveform.name, findings })))];
  const found = differsBeyondRounding(read) ? orderOfValues(values, spacings) : err('do not differ by more than their rounding');
  if (!found.ok) return stopped([because(runs, `The values ${values.map((x) => short(x, 8)).join(', ')} of ${observable}`, found.error), ...seen]);
  const order = found.value;
  const [b1, b2, b3] = read.map(({ B }) => B) as [number, number, number];
  const orderAt = (x: readonly number[]): number => {
    const moved = orderOfValues(x as unknown as OfThree, spacings);
    return moved.ok ? moved.value : Number.NaN;
  };
  const unit = scalars.get(observable)?.unit ?? (observable === 'phase-at-peak' ? 'rad' : '');
  const limit = richardsonValue(values[1], values[2], spacings[1], spacings[2], order);
  const own = usedSettings([{ name: 'observable', value: observable, matters: true }], request);
  const last = read[2]!;
  return measurementOf(
    {
      value: order,
      byRouteB: orderByNewton((b1 - b2) / (b2 - b3), spacings),
      components: { ...besides(runs, request), ...differences(unit, [values[0] - values[1], values[1] - values[2]]) },
      budget: () => {
        const made = { scalars: read, from: orderAt, value: order, moves: sensitivities(orderAt, values) };
        return [...propagatedLines(made, 'Carried from the runs to the order.'), fourthRunLine(order, scalarBefore(spaced, meter, values))];
      },
      findings: seen,
      used: { settings: [...own.settings, ...last.settings], assumed: [...own.assumed, ...last.assumed] },
      figures: () => [
        approachFigure({
          title: `${titleOf(observable, scalars)} against the grid spacing`, quantity: titleOf(observable, scalars), x: { label: 'Grid spacing', unit: 'M' }, places: spacings, values, unit,
          law: (h) => limit + (values[2] - limit) * (h / spacings[2]) ** order, lawName: `Limit plus a power ${short(order, 3)} of the spacing`, claimed: null,
        }),
      ],
    },
    request,
  );
}

/** Order of the next coarser three numbers. */
function scalarBefore({ all }: SpacedRuns, meter: { readonly looked: (waveform: Run['waveform']) => number | null }, [first, second]: OfThree): number | null | undefined {
  if (all.length < 4) return undefined;
  const before = meter.looked(all.at(-4)!.waveform);
  if (before === null) return null;
  const found = orderOfValues([before, first, second], spacingsOf(all.slice(-4, -1)));
  return found.ok ? found.value : null;
}

/**
 * Measures the order at which the three finest runs of a series converge.
 * Shape:  see Measurement; one point.
 * Units:  none.
 * Error:  see orderComputation and propagatedLines.
 * Fails:  notComputable with the findings that say why.
 * Source: Q20; settings.md section 6.
 */
export const measureOrder =
  (scalars: Scalars) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const spaced = spacedRuns(request, 3, '');
    if (!areRuns(spaced)) return stopped(spaced);
    const observable = request.settings.observable ?? houseOrderObservable;
    const step = stepper(watch, 6);
    return isCurve(observable) ? ofCurves(spaced, observable, request, step) : ofScalars(spaced, observable, scalars, request, watch, step);
  };
