import type { Finding } from '../contract/finding';
import type { Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { isFinding, measureTones, stop, type At, type ToneRecipe } from '../tones/measure-tones';
import { usedSettings } from '../tones/used-rows';
import { emComputation, emCoverage } from './em-budget';
import { emEnergyFigure, peakErgPerS } from './em-figures';
import { sourceFindings, testFieldFindings } from './em-findings';
import { emEnergyA, emEnergyB, emPreparer, type EmPoint } from './em-point';
import { emRows } from './em-settings';
import { MSUN_ERG } from './em-units';

/** The points of a sweep, or the one there is. */
export const pointsOf = ({ over }: MeasureRequest): At[] => (over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value })));

/** What the number is in erg, at which field, and how bright it is at most. */
export function emComponents(point: EmPoint): { readonly erg: number | null; readonly fieldHat: number | null; readonly peakErgPerS: number | null } {
  const { massMsun, fieldHat } = point.scale;
  return { erg: massMsun === null ? null : emEnergyA(point) * massMsun * MSUN_ERG, fieldHat, peakErgPerS: peakErgPerS(point) };
}

function recipeOf(request: MeasureRequest, points: readonly (EmPoint | Finding)[], tolerance: (claimed: number) => number): ToneRecipe<EmPoint> {
  const ready = points.filter((point): point is EmPoint => !isFinding(point));
  return {
    byRouteA: (point) => ({ value: emEnergyA(point), components: emComponents(point) }),
    byRouteB: emEnergyB,
    computation: emComputation,
    coverage: emCoverage,
    findings: (point) => [...sourceFindings(point), ...testFieldFindings(ready.map((each) => ({ point: each, ratio: null })))],
    settings: (point) => usedSettings(emRows(point), request),
    figures: (point) => [emEnergyFigure(point)],
    tolerance,
  };
}

/**
 * Measures the energy that is emitted in electromagnetic waves.
 * Shape:  see Measurement.
 * Units:  fraction of M; over M·B̂² where the file is per field and no field is named.
 * Error:  see emComputation.
 * Fails:  notComputable with the findings that say why.
 * Source: Q23; settings.md section 7.
 */
export const measureEmEnergy =
  (tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const ats = pointsOf(request);
    const { a } = request.inputs.of;
    const prepare = a === undefined ? () => stop('engine/no-signal', request.claimId, 'The claim names no waveform.', 'Name one in `of`.') : emPreparer(a, request.settings);
    const points = ats.map(prepare);
    return measureTones(request, watch, ats, points, recipeOf(request, points, tolerance));
  };
