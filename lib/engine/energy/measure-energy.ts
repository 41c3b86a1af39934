import type { Finding } from '../contract/finding';
import type { Measurement, MeasuredPoint } from '../contract/measurement';
import { Cancelled, notComputable, type MeasureRequest, type Watch } from '../contract/quantity';
import type { Waveform } from '../contract/waveform';
import { completeModes, type CompletedModes } from '../conditioning/complete-modes';
import { selectModes } from '../conditioning/select-modes';
import { energyBudget } from './energy-budget';
import { energyFigure } from './energy-figures';
import { burstFindings, missingModesFindings, negativeModesFinding, samplingFindings } from './energy-findings';
import { combinedU, computationUncertainty, energyByRouteA, energyByRouteB, fluxStore, type EnergyAtPoint, type FluxStore } from './energy-point';
import { settingsUsed } from './energy-settings';
import { preparerOf, stop, type At, type PreparedPoint } from './prepare-energy';
import { routeBIndices, worstIndex } from './spread-points';

/** Route A's word on one point, with U as a fraction of M. */
interface ByRouteA {
  readonly a: EnergyAtPoint;
  readonly expanded: number;
}

function byRouteA({ record, settings }: PreparedPoint, store: FluxStore, digits: number | null): ByRouteA | null {
  const a = energyByRouteA(record, settings, store);
  return a === null ? null : { a, expanded: combinedU(computationUncertainty(record, settings, store, digits)) };
}

function measuredPoint({ at, norm }: PreparedPoint, { a, expanded }: ByRouteA, b: EnergyAtPoint | null): MeasuredPoint {
  const value = a.energy / norm;
  const components: Record<string, number | null> = {};
  for (const { l, m, energy } of a.modes) components[`E:${l},${m}`] = energy / norm;
  components.before = a.before / norm;
  return { at, value, routes: { A: value, B: b === null ? null : b.energy / norm }, expandedUncertainty: expanded / norm, components };
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

function findingsOf(request: MeasureRequest, completed: CompletedModes, point: PreparedPoint, a: EnergyAtPoint, store: FluxStore): Finding[] {
  const { settings, record } = point;
  const { name } = completed.waveform;
  const { missing } = selectModes(completed.waveform, { modes: settings.modes, lMax: null, withZeroM: true });
  const startDeclared = request.settings.startM !== undefined || request.over?.setting === 'startM';
  return [
    ...negativeModesFinding(completed, name),
    ...missingModesFindings(completed, missing, settings.modes !== 'all' || settings.lMax !== null),
    ...samplingFindings(record, a.modes, name),
    ...burstFindings(store.fine(record, settings.floor), settings.startM, completed.waveform, startDeclared),
  ];
}

/** Route A's values alone: what was not estimated is null. */
function looked(request: MeasureRequest, watch: Watch, completed: CompletedModes, points: readonly PreparedPoint[], ats: readonly At[]): Measurement {
  const step = stepper(watch, points.length);
  const store = fluxStore();
  const found: EnergyAtPoint[] = [];
  for (const { record, settings } of points) {
    step('route A');
    const a = energyByRouteA(record, settings, store);
    if (a === null) return notComputable([noStart(completed.waveform.name)], ats);
    found.push(a);
  }
  const findings = findingsOf(request, completed, points[0]!, found[0]!, store);
  if (findings.some(({ level }) => level === 'stops-lodging')) return notComputable(findings, ats);
  const measured = points.map(({ at, norm }, i): MeasuredPoint => ({ at, value: found[i]!.energy / norm, routes: { A: found[i]!.energy / norm, B: null }, expandedUncertainty: null }));
  return { points: measured, budget: [], findings, assumed: [], settings: [], routeBPoints: [], figures: [] };
}

function measurePoints(request: MeasureRequest, watch: Watch, completed: CompletedModes, points: readonly PreparedPoint[], ats: readonly At[]): Measurement {
  const { name, significantDigits: digits } = completed.waveform;
  const step = stepper(watch, points.length + Math.min(points.length, 11) + 1);
  const store = fluxStore();
  const byA: ByRouteA[] = [];
  for (const point of points) {
    step('route A');
    const found = byRouteA(point, store, digits);
    if (found === null) return notComputable([noStart(name)], ats);
    byA.push(found);
  }
  const worst = worstIndex(byA.map(({ a }, i) => a.energy / points[i]!.norm), request.claimed);
  const routeBPoints = routeBIndices(points.length, worst);
  const byB = new Map<number, EnergyAtPoint | null>();
  for (const index of routeBPoints) {
    step('route B');
    byB.set(index, energyByRouteB(points[index]!.record, points[index]!.settings));
  }
  step('error budget');
  const point = points[worst]!;
  const { a } = byA[worst]!;
  const findings = findingsOf(request, completed, point, a, store);
  if (findings.some(({ level }) => level === 'stops-lodging')) return notComputable(findings, ats);
  const { record, settings, norm } = point;
  return {
    points: points.map((each, i) => ({ ...measuredPoint(each, byA[i]!, byB.get(i) ?? null), ...ownFloor(request, points, each) })),
    budget: energyBudget(record, settings, a, store, digits, norm),
    findings,
    ...settingsUsed(settings, request.settings, request.over?.setting ?? null, completed.waveform, record),
    routeBPoints,
    figures: request.withFigures ? [energyFigure(store.fine(record, settings.floor), settings.startM, name)] : [],
  };
}

/**
 * Measures a radiated-energy claim: route A at every point, route B at up to ten of them.
 * Shape:  see Measurement.
 * Units:  fractions of the normalising mass.
 * Error:  see computationUncertainty.
 * Fails:  notComputable with the findings that say why; throws Cancelled when told to stop.
 * Source: settings.md section 5.
 */
export function measureEnergy(request: MeasureRequest, watch: Watch): Measurement {
  const { over, inputs } = request;
  const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
  const waveform: Waveform | undefined = inputs.of.a;
  if (waveform === undefined) return notComputable([stop('engine/no-signal', request.claimId, 'The claim names no waveform.', 'Name one in `of`.')], ats);
  const completed = completeModes(waveform);
  const prepared = ats.map(preparerOf(completed.waveform, request));
  const stops = prepared.filter((entry): entry is Finding => 'code' in entry);
  if (stops.length > 0) return notComputable(unique(stops), ats);
  const measure = request.routeAOnly ? looked : measurePoints;
  return measure(request, watch, completed, prepared.filter((entry): entry is PreparedPoint => 'record' in entry), ats);
}
