import type { Finding } from '../contract/finding';
import type { Measurement, MeasuredPoint } from '../contract/measurement';
import { Cancelled, notComputable, type MeasureRequest, type Watch } from '../contract/quantity';
import type { Waveform } from '../contract/waveform';
import { completeModes, type CompletedModes } from '../conditioning/complete-modes';
import { energyOnSamples } from './energy-on-samples';
import { fluxFindings } from './flux-findings';
import { preparerOf, stop, type At, type PreparedPoint } from './prepare-radiated';
import { combinedU, computationUncertainty, radiationBudget } from './radiation-budget';
import { burstFindings, samplingFindings } from './radiation-findings';
import { house, sampledStore, type Outcome, type RadiationRecipe, type SampledStore } from './radiation-recipe';
import { settingsUsed } from './radiation-settings';
import { routeBIndices, worstIndex } from './spread-points';

/** Route A's word on one point, with U. */
interface ByRouteA {
  readonly outcome: Outcome;
  readonly expanded: number;
}

function measuredPoint(recipe: RadiationRecipe, { at }: PreparedPoint, { outcome, expanded }: ByRouteA, b: Outcome | null): MeasuredPoint {
  const { value, remarks } = outcome;
  const components = recipe.settle?.(outcome, expanded) ?? outcome.components;
  return { at, value, routes: { A: value, B: b?.value ?? null }, expandedUncertainty: expanded, components, ...(remarks ? { remarks } : {}) };
}

/** A floor that nobody declared is read at each start: a point that is read alone needs its own. */
function ownFloor({ settings, over }: MeasureRequest, points: readonly PreparedPoint[], { settings: here }: PreparedPoint): Pick<MeasuredPoint, 'settings'> {
  const differ = points.some((point) => point.settings.floor !== points[0]!.settings.floor);
  return differ && settings.integrationFloor === undefined && over?.setting !== 'integrationFloor' ? { settings: { integrationFloor: here.floor } } : {};
}

const noStart = (name: string): Finding =>
  stop('engine/modes-missing', name, `Energy before the start is to be added, but ${name} has no (2,2) mode, or fewer than three samples of it after the start, from which to read the starting frequency.`, 'Supply the (2,2) mode or declare includeEnergyBeforeStart: false.');

const unique = (findings: readonly Finding[]): Finding[] => findings.filter((f, i) => findings.findIndex((g) => g.text === f.text) === i);

/** Counts the steps of a measurement and lets it be cancelled between them. */
function stepper(watch: Watch, steps: number): (doing: string) => void {
  let done = 0;
  return (doing) => {
    if (watch.cancelled()) throw new Cancelled();
    watch.onProgress(Math.min(1, done++ / steps), doing);
  };
}

/** Everything that stays the same from point to point. */
interface Task {
  readonly request: MeasureRequest;
  readonly watch: Watch;
  readonly recipe: RadiationRecipe;
  readonly completed: CompletedModes;
  readonly points: readonly PreparedPoint[];
  readonly ats: readonly At[];
  readonly store: SampledStore;
}

const noNumber = ({ recipe, completed }: Task): Finding => (recipe.noNumber ?? noStart)(completed.waveform.name);

function findingsOf({ request, recipe, completed, store }: Task, point: PreparedPoint, outcome: Outcome): Finding[] {
  const { settings, record } = point;
  const { name } = completed.waveform;
  const startDeclared = request.settings.startM !== undefined || request.over?.setting === 'startM';
  const radiation = store.fine(record, settings);
  return [
    ...recipe.findings({ completed, point, outcome, store, startDeclared }),
    ...fluxFindings({ given: request.inputs.of.a!, record, radiation, toTheEnd: recipe.atOneTime !== true }),
    ...samplingFindings(record, energyOnSamples(radiation, settings.startM), name),
    ...burstFindings(radiation, settings.startM, completed.waveform, startDeclared),
  ];
}

/** Route A's values alone: what was not estimated is null. */
function looked(task: Task): Measurement {
  const { watch, recipe, points, ats, store } = task;
  const step = stepper(watch, points.length);
  const found: Outcome[] = [];
  for (const point of points) {
    step('route A');
    const outcome = recipe.byRouteA(point, store, house);
    if (outcome === null) return notComputable([noNumber(task)], ats);
    found.push(outcome);
  }
  const findings = findingsOf(task, points[0]!, found[0]!);
  if (findings.some(({ level }) => level === 'stops-lodging')) return notComputable(findings, ats);
  const measured = points.map(({ at }, i): MeasuredPoint => ({ at, value: found[i]!.value, routes: { A: found[i]!.value, B: null }, expandedUncertainty: null }));
  return { points: measured, budget: [], findings, assumed: [], settings: [], routeBPoints: [], figures: [] };
}

/** Route A at every point, each with its U; null when what should be added cannot be computed. */
function allByRouteA({ recipe, completed, points, store }: Task, step: (doing: string) => void): ByRouteA[] | null {
  const digits = completed.waveform.significantDigits;
  const found: ByRouteA[] = [];
  for (const point of points) {
    step('route A');
    const outcome = recipe.byRouteA(point, store, house);
    if (outcome === null) return null;
    found.push({ outcome, expanded: combinedU(computationUncertainty({ recipe, point, store, digits }, outcome)) });
  }
  return found;
}

function measurePoints(task: Task): Measurement {
  const { request, watch, recipe, completed, points, ats, store } = task;
  const { name, significantDigits: digits } = completed.waveform;
  const step = stepper(watch, points.length + Math.min(points.length, 11) + 1);
  const byA = allByRouteA(task, step);
  if (byA === null) return notComputable([noNumber(task)], ats);
  const worst = worstIndex(byA.map(({ outcome }) => outcome.value), request.claimed);
  const point = points[worst]!;
  const { outcome } = byA[worst]!;
  const findings = findingsOf(task, point, outcome);
  if (findings.some(({ level }) => level === 'stops-lodging')) return notComputable(findings, ats);
  const routeBPoints = routeBIndices(points.length, worst);
  const byB = new Map<number, Outcome | null>();
  for (const index of routeBPoints) {
    step('route B');
    byB.set(index, recipe.byRouteB(points[index]!));
  }
  step('error budget');
  return {
    points: points.map((each, i) => ({ ...measuredPoint(recipe, each, byA[i]!, byB.get(i) ?? null), ...ownFloor(request, points, each) })),
    budget: radiationBudget({ recipe, point, store, digits }, outcome),
    findings,
    ...settingsUsed(point.settings, request, completed, point.record, recipe.settings, recipe.rows?.(point)),
    routeBPoints,
    figures: request.withFigures ? recipe.figures(point, store, name) : [],
  };
}

/**
 * Measures a claim of what is radiated: route A at every point, route B at up to ten of them.
 * Shape:  see Measurement.
 * Units:  the quantity's.
 * Error:  see computationUncertainty.
 * Fails:  notComputable with the findings that say why; throws Cancelled when told to stop.
 * Source: settings.md section 5.
 */
export function measureRadiated(recipe: RadiationRecipe, request: MeasureRequest, watch: Watch): Measurement {
  const { over, inputs } = request;
  const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  const waveform: Waveform | undefined = inputs.of.a;
  if (waveform === undefined) return notComputable([stop('engine/no-signal', request.claimId, 'The claim names no waveform.', 'Name one in `of`.')], ats);
  const completed = completeModes(waveform);
  const prepared = ats.map(preparerOf(completed.waveform, request, recipe));
  const stops = prepared.filter((entry): entry is Finding => 'code' in entry);
  if (stops.length > 0) return notComputable(unique(stops), ats);
  const points = prepared.filter((entry): entry is PreparedPoint => 'record' in entry);
  const task: Task = { request, watch, recipe, completed, points, ats, store: sampledStore(recipe.withStrain) };
  return request.routeAOnly ? looked(task) : measurePoints(task);
}
