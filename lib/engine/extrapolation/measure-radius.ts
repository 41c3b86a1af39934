import { ROOT3 } from '../budget/half-width';
import { withUnit } from '../budget/numeral';
import { houseLimitObservable, houseValues } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { BudgetLine, Measurement, UsedSetting } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { usedSettings } from '../tones/used-rows';
import { atInfinity } from './perturbative';
import { fitInInverseRadius } from './radius-fit';
import { fitByReflections } from './radius-fit-by-reflections';
import type { Meter, RunScalar } from './run-scalar';
import { isSamePlace, runsApart, type Run, type Runs } from './runs';
import { chosenLines, otherRespectLine, propagatedLines } from './series-budget';
import { approachFigure } from './series-figures';
import { foundInRuns, leftOutFindings, named, radiusFindings, short, timeLabelFindings, waveformsOfRuns } from './series-findings';
import { areNumbers, isMeter, measurementOf, meterOf, readRuns, stepper, stopped, titleOf, type Scalars } from './series-measurement';

const fewRadii = (where: string, text: string, fix: string): Finding => ({ code: 'engine/few-radii', level: 'stops-lodging', where, text, fix });

/** The runs, nearest first, or why they cannot be fitted. */
function placedRuns({ inputs, claimId }: MeasureRequest, degree: number): { readonly apart: Runs; readonly where: string } | Finding {
  const series = inputs.of.series ?? [];
  const where = series[0]?.series ?? claimId;
  const apart = runsApart('radius', series);
  const { runs, unplaced } = apart;
  if (unplaced.length > 0) return fewRadii(named(unplaced), `${named(unplaced)} ${unplaced.length > 1 ? 'state' : 'states'} no extraction radius.`, 'State extractionRadiusM of each waveform of the series.');
  const different = runs.filter(({ place }, i) => i === 0 || !isSamePlace(place, runs[i - 1]!.place)).length;
  if (different >= degree + 2) return { apart, where };
  return fewRadii(where, `A polynomial of degree ${degree} in 1/r needs ${degree + 2} radii, one more than it goes through; the series ${where} has ${different} (${runs.map(({ place }) => short(place, 5)).join(', ')} M).`, 'Supply more radii, or lower extrapolationOrder.');
}

const atInfinityBy = (radii: readonly number[], values: readonly number[], degree: number): number => {
  const fit = fitInInverseRadius(radii, values, degree);
  return fit.ok ? fit.value.atInfinity : Number.NaN;
};

/** How the limit moves with each run: it is linear in them. */
const weightsOf = (radii: readonly number[], degree: number): number[] => radii.map((_, i) => atInfinityBy(radii, radii.map((_r, k) => (k === i ? 1 : 0)), degree));

/** E06: the limit against that of a degree less, and against perturbation theory from the largest radius. */
function radiusLine(value: number, previous: number | null, check: number | null, degree: number, unit: string): BudgetLine {
  const apart = [previous, check].flatMap((other) => (other === null ? [] : [Math.abs(other - value)]));
  const base = { component: 'Extraction radius', id: 'E06', group: 'coverage' } as const;
  if (apart.length === 0) return { ...base, u: null, note: 'Not available: no lower degree and no perturbative value.' };
  const other = check === null ? '' : `; perturbation theory from the largest radius gives ${withUnit(check, unit, 6)}`;
  return { ...base, u: Math.max(...apart) / ROOT3, note: `Degree ${degree - 1} gives ${previous === null ? 'nothing' : withUnit(previous, unit, 6)}${other}. The larger distance as a half-width over √3.` };
}

/** Radii that nobody said to be areal are taken for such. */
function typeRows(runs: readonly Run[]): { readonly settings: UsedSetting[]; readonly assumed: string[] } {
  const types = [...new Set(runs.map(({ waveform }) => waveform.radiusType ?? 'areal'))];
  const assumed = runs.some(({ waveform }) => waveform.radiusType === undefined);
  return { settings: [{ name: 'radiusType', value: types.length === 1 ? types[0] : types, standing: assumed ? 'assumed' : 'declared' }], assumed: assumed ? ['radiusType'] : [] };
}

/** Observables that begin or end at a time of the file. */
const readsTimes = (settings: MeasureRequest['settings'], observable: string): boolean => settings.window !== undefined || (observable !== 'amplitude-at-peak' && (settings.startM !== undefined || observable === 'phase-at-peak'));

/**
 * Carries the numbers of several extraction radii to infinity by a polynomial in 1/r.
 * Shape:  see Measurement; one point.
 * Units:  those of the observable.
 * Error:  U of the runs carried to the limit.
 * Fails:  notComputable with the findings that say why.
 * Source: Q21; Boyle & Mroué 2009, arXiv:0905.3177; settings.md section 6.
 */
export const measureRadius =
  (scalars: Scalars, unitOfObservable: (observable: string) => string) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const degree = request.settings.extrapolationOrder ?? houseValues.extrapolationOrder;
    const observable = request.settings.observable ?? houseLimitObservable;
    const placed = placedRuns(request, degree);
    if ('code' in placed) return stopped([placed]);
    const { apart, where } = placed;
    const { runs } = apart;
    const leader = runs.at(-1)!.waveform;
    const meter = meterOf(observable, runs, leader, scalars, request, watch);
    if (!isMeter(meter)) return stopped(meter);
    const step = stepper(watch, runs.length + 1);
    const read = readRuns(meter, runs, step);
    if (!areNumbers(read)) return stopped(read);
    const findings = [...leftOutFindings(apart, where), ...radiusFindings(runs, degree, where), ...timeLabelFindings(runs, readsTimes(request.settings, observable), where), ...foundInRuns(read.map((run, i) => ({ name: runs[i]!.waveform.name, findings: run.findings })))];
    return fitted({ request, observable, unit: unitOfObservable(observable), title: titleOf(observable, scalars), degree, runs, read, meter, step, findings });
  };

interface Fitted {
  readonly request: MeasureRequest;
  readonly observable: string;
  readonly unit: string;
  readonly title: string;
  readonly degree: number;
  readonly runs: readonly Run[];
  readonly read: readonly RunScalar[];
  readonly meter: Meter;
  readonly step: (doing: string) => void;
  readonly findings: readonly Finding[];
}

/** A check on other physics, never a route. */
function perturbative({ request, runs, meter, step }: Fitted): number | null {
  step('perturbative check');
  const { waveform, place } = runs.at(-1)!;
  const corrected = atInfinity(waveform, place, request.settings);
  return corrected === null ? null : meter.looked(corrected);
}

function fitted(given: Fitted): Measurement {
  const { request, observable, unit, title, degree, runs, read, meter, findings } = given;
  const radii = runs.map(({ place }) => place);
  const values = read.map(({ A }) => A);
  const fit = fitInInverseRadius(radii, values, degree);
  if (!fit.ok) return stopped([fewRadii(named(waveformsOfRuns(runs)), `The limit cannot be found: ${fit.error}.`, 'Check the radii and the records.')]);
  const { atInfinity: value, previousOrder } = fit.value;
  const last = read.at(-1)!;
  const check = request.routeAOnly ? null : perturbative(given);
  const own = usedSettings([{ name: 'observable', value: observable, matters: true }, { name: 'extrapolationOrder', value: degree, matters: true }], request);
  const types = typeRows(runs);
  return measurementOf(
    {
      value,
      byRouteB: fitByReflections(radii, read.map(({ B }) => B), degree)[0]!,
      components: { previousOrder, largestRadius: values.at(-1)!, checkPerturbative: check },
      budget: () => [
        ...propagatedLines({ scalars: read, from: (x) => atInfinityBy(radii, x, degree), value, moves: weightsOf(radii, degree) }, 'Carried from the radii to infinity.'),
        otherRespectLine('resolution', runs.at(-1)!.waveform, values.at(-1)!, request.inputs.of.series ?? [], meter, unit),
        radiusLine(value, previousOrder, check, degree, unit),
        ...chosenLines(last),
      ],
      findings,
      used: { settings: [...own.settings, ...types.settings, ...last.settings], assumed: [...own.assumed, ...types.assumed, ...last.assumed] },
      figures: () => {
        const c = fitByReflections(radii, values, degree);
        const law = (x: number): number => c.reduceRight((sum, coefficient) => sum * radii[0]! * x + coefficient, 0);
        return [
          approachFigure({
            title: `${title} against the inverse radius, and its limit`, quantity: title, x: { label: 'Inverse radius', unit: '1/M' }, places: radii.map((r) => 1 / r), values, unit,
            law, lawName: `Polynomial of degree ${degree} in 1/r`, claimed: request.claimed[0] ?? null,
          }),
        ];
      },
    },
    request,
  );
}
