import { houseLimitObservable } from '../contract/house-values';
import type { BudgetLine, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import type { Waveform } from '../contract/waveform';
import { usedSettings } from '../tones/used-rows';
import { limitByWeights, orderByNewton } from './order-by-newton';
import { orderOfValues, richardsonValue, type OfThree, type Spacings } from './richardson';
import type { Meter, RunScalar } from './run-scalar';
import { chosenLines, differsBeyondRounding, otherRespectLine, propagatedLines, sensitivities } from './series-budget';
import { approachFigure } from './series-figures';
import { foundInRuns, named, noOrder, short, waveformsOfRuns } from './series-findings';
import { areNumbers, isMeter, measurementOf, meterOf, readRuns, stepper, stopped, titleOf, type Scalars } from './series-measurement';
import { areRuns, spacedRuns } from './spaced-runs';

/** Grid-convergence practice: three runs that show an order, and anything less. */
const SAFETY = { consistent: 1.25, otherwise: 3 } as const;
/** How near a measured order has to come to the formal one. */
const ORDER_APART = 0.7;

/** Order by route A; null where the values have none. */
const measuredOrder = (values: readonly number[], spacings: readonly number[]): number | null => {
  const found = values.length < 3 ? null : orderOfValues(values as unknown as OfThree, spacings as unknown as Spacings);
  return found?.ok ? found.value : null;
};

const orderB = (values: readonly number[], spacings: readonly number[]): number => {
  const [x1, x2, x3] = values as unknown as OfThree;
  return orderByNewton((x1 - x2) / (x2 - x3), spacings as unknown as Spacings);
};

/** Safety factor and its reason. */
function safetyOf(measured: number | null, formal: number | undefined): { readonly factor: number; readonly why: string } {
  if (measured === null) return { factor: SAFETY.otherwise, why: 'no order was measured' };
  if (formal === undefined || Math.abs(measured - formal) <= ORDER_APART) return { factor: SAFETY.consistent, why: `three runs show order ${short(measured, 3)}` };
  return { factor: SAFETY.otherwise, why: `three runs show order ${short(measured, 3)}, not the formal ${short(formal, 3)}` };
}

function truncationLine(errorEstimate: number, { factor, why }: ReturnType<typeof safetyOf>, runs: number): BudgetLine {
  return { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: errorEstimate, degreesOfFreedom: runs - 1, note: `${factor} times the distance of the limit from the finest run, since ${why}.` };
}

/**
 * Carries the numbers of the finest runs to zero spacing.
 * Shape:  see Measurement; one point.
 * Units:  those of the observable.
 * Error:  U of the runs carried to the limit.
 * Fails:  notComputable with the findings that say why.
 * Source: Q20; settings.md section 6.
 */
export const measureExtrapolated =
  (scalars: Scalars, unitOfObservable: (observable: string) => string) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const { formalOrder, observable = houseLimitObservable } = request.settings;
    const spaced = spacedRuns(request, 2, '; the error is taken as three times the distance of the limit');
    if (!areRuns(spaced)) return stopped(spaced);
    const { runs, findings } = spaced;
    const leader = runs.at(-1)!.waveform;
    const meter = meterOf(observable, runs, leader, scalars, request, watch);
    if (!isMeter(meter)) return stopped(meter);
    const read = readRuns(meter, runs, stepper(watch, runs.length));
    if (!areNumbers(read)) return stopped(read);
    return carried({ request, leader, meter, observable, unit: unitOfObservable(observable), title: titleOf(observable, scalars), formalOrder, names: named(waveformsOfRuns(runs)), spacings: runs.map(({ place }) => place), read, spaced: [...findings, ...foundInRuns(read.map((run, i) => ({ name: runs[i]!.waveform.name, findings: run.findings })))] });
  };

interface Carried {
  readonly request: MeasureRequest;
  readonly leader: Waveform;
  readonly meter: Meter;
  readonly observable: string;
  readonly unit: string;
  readonly title: string;
  readonly formalOrder: number | undefined;
  readonly names: string;
  readonly spacings: readonly number[];
  readonly read: readonly RunScalar[];
  readonly spaced: Measurement['findings'];
}

/** Why the finest runs give no order: the end of a sentence. */
function reasonOf(values: readonly number[], spacings: readonly number[]): string {
  const found = values.length < 3 ? null : orderOfValues(values as unknown as OfThree, spacings as unknown as Spacings);
  return found === null || found.ok ? 'are two, which show no order' : found.error;
}

function carried({ request, leader, meter, observable, unit, title, formalOrder, names, spacings, read, spaced }: Carried): Measurement {
  const values = read.map(({ A }) => A);
  const differs = differsBeyondRounding(read);
  const measured = differs ? measuredOrder(values, spacings) : null;
  const order = formalOrder ?? measured;
  if (order === null) return stopped([noOrder(names, `The values ${values.map((x) => short(x, 8)).join(', ')} of ${observable} of ${names} ${differs ? reasonOf(values, spacings) : 'do not differ by more than their rounding'}.`, 'Declare formalOrder, or supply runs whose differences shrink with the spacing.'), ...spaced]);
  const [hMiddle, hFinest] = spacings.slice(-2) as [number, number];
  const limitAt = (x: readonly number[]): number => richardsonValue(x.at(-2)!, x.at(-1)!, hMiddle, hFinest, formalOrder ?? measuredOrder(x, spacings) ?? Number.NaN);
  const value = limitAt(values);
  const byB = read.map(({ B }) => B);
  const finest = values.at(-1)!;
  const safety = safetyOf(measured, formalOrder);
  const errorEstimate = safety.factor * Math.abs(value - finest);
  const last = read.at(-1)!;
  const own = usedSettings([{ name: 'observable', value: observable, matters: true }, ...(formalOrder === undefined ? [] : [{ name: 'formalOrder', value: formalOrder, matters: true } as const])], request);
  return measurementOf(
    {
      value,
      byRouteB: limitByWeights(byB.at(-2)!, byB.at(-1)!, hMiddle, hFinest, formalOrder ?? orderB(byB, spacings)),
      components: { order, finest, errorEstimate, ...(formalOrder === undefined ? {} : { measuredOrder: measured }) },
      budget: () => [
        ...propagatedLines({ scalars: read, from: limitAt, value, moves: sensitivities(limitAt, values) }, 'Carried from the runs to the limit.'),
        truncationLine(errorEstimate, safety, values.length),
        otherRespectLine('radius', leader, finest, request.inputs.of.series ?? [], meter, unit),
        ...chosenLines(last),
      ],
      findings: spaced,
      used: { settings: [...own.settings, ...last.settings], assumed: [...own.assumed, ...last.assumed] },
      figures: () => [
        approachFigure({
          title: `${title} against the grid spacing, and its limit`, quantity: title, x: { label: 'Grid spacing', unit: 'M' }, places: spacings, values, unit,
          law: (h) => value + (finest - value) * (h / hFinest) ** order, lawName: `Limit plus a power ${short(order, 3)} of the spacing`, claimed: request.claimed[0] ?? null,
        }),
      ],
    },
    request,
  );
}
