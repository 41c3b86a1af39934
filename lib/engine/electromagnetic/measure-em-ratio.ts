import type { Finding } from '../contract/finding';
import type { BudgetLine, Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { burstFindings, samplingFindings } from '../radiation/radiation-findings';
import { energyOnSamples } from '../radiation/energy-on-samples';
import { energyRecipe } from '../radiation/energy-recipe';
import { isFinding, measureTones, type ToneRecipe } from '../tones/measure-tones';
import { floorRows, mirrorRows, usedSettings } from '../tones/used-rows';
import { carried, emComputation, emCoverage } from './em-budget';
import { bothFluxesFigure } from './em-figures';
import { sourceFindings, testFieldFindings } from './em-findings';
import { emEnergyA, emEnergyB } from './em-point';
import { ratioPreparer, type GwEnergy, type RatioPoint } from './em-ratio-point';
import { emRows } from './em-settings';
import { pointsOf } from './measure-em-energy';

const ratioOf = ({ em, gw }: RatioPoint): number => emEnergyA(em) / gw.outcome.value;

/** Said once for both files. */
const SHARED = new Set(['E05', 'E06']);

/** Lines of both energies, each by its relative size; coverage or computation as asked. */
function linesOf(point: RatioPoint, group: BudgetLine['group']): BudgetLine[] {
  const { em, gw } = point;
  const value = ratioOf(point);
  const light = group === 'computation' ? emComputation(em) : emCoverage(em);
  const waves = gw.budget().filter((line) => line.group === group && !SHARED.has(line.id));
  return [...carried(light, emEnergyA(em), value, 'electromagnetic'), ...carried(waves, gw.outcome.value, value, 'gravitational')];
}

function gwFindings({ completed, point, store, outcome }: GwEnergy, startDeclared: boolean): Finding[] {
  const { name } = completed.waveform;
  const radiation = store.fine(point.record, point.settings);
  const { startM } = point.settings;
  return [
    ...energyRecipe.findings({ completed, point, outcome, store, startDeclared }),
    ...samplingFindings(point.record, energyOnSamples(radiation, startM), name),
    ...burstFindings(radiation, startM, completed.waveform, startDeclared),
  ];
}

function recipeOf(request: MeasureRequest, points: readonly (RatioPoint | Finding)[], tolerance: (claimed: number) => number): ToneRecipe<RatioPoint> {
  const ready = points.filter((point): point is RatioPoint => !isFinding(point));
  // Over B̂² nothing is said of any field.
  const judged = ready.map((point) => ({ point: point.em, ratio: point.em.scale.perField ? null : ratioOf(point) }));
  return {
    byRouteA: (point) => ({ value: ratioOf(point), components: { emEnergy: emEnergyA(point.em), gwEnergy: point.gw.outcome.value, fieldHat: point.em.scale.fieldHat } }),
    byRouteB: ({ em, gw }) => emEnergyB(em) / gw.byRouteB(),
    computation: (point) => linesOf(point, 'computation'),
    coverage: (point) => linesOf(point, 'coverage'),
    findings: ({ em, gw }) => [...sourceFindings(em), ...gwFindings(gw, request.settings.startM !== undefined), ...testFieldFindings(judged)],
    settings: ({ em, gw }) => usedSettings([...emRows(em), ...floorRows(gw.point.settings.floor, gw.point.settings.startM, request).filter(({ name }) => name !== 'startM'), ...mirrorRows(gw.completed, gw.point.record.modes)], request),
    figures: ({ em, gw }) => [bothFluxesFigure(em, gw.store.fine(gw.point.record, gw.point.settings), [em.source.waveform.name, gw.completed.waveform.name])],
    tolerance,
  };
}

/**
 * Measures how much is emitted electromagnetically for what is radiated in gravitational waves.
 * Shape:  see Measurement.
 * Units:  a ratio; over B̂² where the file is per field and no field is named.
 * Error:  the relative sizes of both energies' components.
 * Fails:  notComputable with the findings that say why.
 * Source: Q24; settings.md section 7.
 */
export const measureEmRatio =
  (tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const ats = pointsOf(request);
    const points = ats.map(ratioPreparer(request));
    return measureTones(request, watch, ats, points, recipeOf(request, points, tolerance));
  };
