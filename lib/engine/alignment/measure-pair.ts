import type { Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { measureTones, stop, type At, type ToneRecipe } from '../tones/measure-tones';
import { floorRows, usedSettings } from '../tones/used-rows';
import { toldPhase, type NotAligned } from './alignment';
import { pairComputation, pairCoverage, valueOf } from './pair-budget';
import { pairFigure } from './pair-figure';
import { pairFindings } from './pair-findings';
import { pairBy, pairPreparer, type PairPoint, type PairResult, type Which } from './pair-point';

/** Route A's result at a point is asked for several times over. */
function remembered(which: Which): (point: PairPoint) => PairResult | NotAligned {
  const known = new Map<PairPoint, PairResult | NotAligned>();
  return (point) => {
    const found = known.get(point) ?? pairBy(point.routes.A(), point.settings, which);
    known.set(point, found);
    return found;
  };
}

/** What route A found where it is known to have found something. */
function found(entry: PairResult | NotAligned): PairResult {
  if ('because' in entry) throw new Error(`the records ${entry.because}`);
  return entry;
}

function settingsOf(point: PairPoint, { aligned }: PairResult, request: MeasureRequest): ReturnType<ToneRecipe<PairPoint>['settings']> {
  const { a, b, mode, severalModes, settings } = point;
  const usesWindow = settings.alignment === 'window' || settings.at === 'window';
  const integrated = a.tones.floor === null ? b : a;
  return usedSettings(
    [
      ...(mode === null ? [] : [{ name: 'modes', value: [mode], matters: severalModes } as const]),
      { name: 'alignment', value: settings.alignment, matters: true },
      ...(usesWindow ? [{ name: 'window', value: aligned.window, unit: 'M', matters: true } as const] : []),
      { name: 'at', value: settings.at, matters: true },
      ...floorRows(integrated.tones.floor, integrated.startM, request),
    ],
    request,
  );
}

function recipeOf(which: Which, request: MeasureRequest, tolerance: (claimed: number) => number): ToneRecipe<PairPoint> {
  const resultOf = remembered(which);
  return {
    byRouteA: (point) => {
      const entry = resultOf(point);
      const names = `${point.a.waveform.name} and ${point.b.waveform.name}`;
      if ('because' in entry) return stop('engine/no-signal', names, `The records ${names} ${entry.because}.`, entry.fix);
      const { aligned, residual } = entry;
      return { value: valueOf(entry, which), components: { timeShiftM: aligned.timeShiftM, phaseShiftRad: toldPhase(aligned, point.settings), atM: residual.atM } };
    },
    byRouteB: (point) => {
      const entry = pairBy(point.routes.B(), point.settings, which);
      return 'because' in entry ? Number.NaN : valueOf(entry, which);
    },
    computation: (point) => pairComputation(point, found(resultOf(point)), which),
    coverage: (point) => pairCoverage(point, found(resultOf(point)), which),
    findings: (point) => pairFindings(point, found(resultOf(point))),
    settings: (point) => settingsOf(point, found(resultOf(point)), request),
    figures: (point) => [pairFigure(point, found(resultOf(point)))],
    tolerance,
  };
}

/**
 * Measures the phase or amplitude difference of two records after their alignment.
 * Shape:  see Measurement.
 * Units:  rad, or a ratio less one.
 * Error:  see pairComputation.
 * Fails:  notComputable with the findings that say why.
 * Source: Q19; settings.md section 6.
 */
export const measurePair =
  (which: Which, tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const { over } = request;
    const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
    return measureTones(request, watch, ats, ats.map(pairPreparer(request)), recipeOf(which, request, tolerance));
  };
