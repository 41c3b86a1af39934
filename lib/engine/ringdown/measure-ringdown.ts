import type { Finding } from '../contract/finding';
import type { Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { isFinding, measureTones, stop, type At, type Reading, type ToneRecipe } from '../tones/measure-tones';
import { toneName } from '../tones/tone';
import { floorRows, highestRows, mirrorRows, usedSettings } from '../tones/used-rows';
import type { RingdownLine } from './line-on-samples';
import { predictedRingdown } from './predicted';
import { ringdownComputation, ringdownCoverage, type Read } from './ringdown-budget';
import { ringdownFigure } from './ringdown-figure';
import { ringdownFindings } from './ringdown-findings';
import { lineByRouteA, lineByRouteB, ringdownPreparer, type FitWindow, type RingdownPoint } from './ringdown-point';

export type RingdownNumber = 'frequency' | 'damping';

const readOf = (which: RingdownNumber, { scale }: RingdownPoint): Read => (which === 'frequency' ? ({ omega }) => scale * Math.abs(omega) : ({ gamma }) => scale * gamma);

function readingOf(which: RingdownNumber, point: RingdownPoint, line: RingdownLine): Reading | Finding {
  const { settings, completed } = point;
  const { binary, name } = completed.waveform;
  const value = readOf(which, point)(line);
  if (!(value > 0)) return stop('engine/no-signal', name, `In the window ${toneName(settings)} of ${name} ${which === 'damping' ? 'does not decay' : 'does not rotate'}, so it is no damped tone there.`, 'Declare a window in the ringdown.');
  const predicted = predictedRingdown(settings.mode, binary, settings.normaliseBy);
  return which === 'frequency'
    ? { value, components: { predicted: predicted?.real ?? null } }
    : { value, components: { predicted: predicted?.imag ?? null, tauM: 1 / line.gamma } };
}

/** Route A's window and lines at a point are asked for several times over. */
function remembered(): (point: RingdownPoint) => { readonly window: FitWindow; readonly line: RingdownLine } | Finding {
  const known = new Map<RingdownPoint, ReturnType<typeof lineByRouteA>>();
  return (point) => {
    const found = known.get(point) ?? lineByRouteA(point);
    known.set(point, found);
    return found;
  };
}

/** What route A found where it is known to have found something. */
function found(entry: ReturnType<typeof lineByRouteA>): { readonly window: FitWindow; readonly line: RingdownLine } {
  if (isFinding(entry)) throw new Error(entry.text);
  return entry;
}

function recipeOf(which: RingdownNumber, request: MeasureRequest, tolerance: (claimed: number) => number): ToneRecipe<RingdownPoint> {
  const lineOf = remembered();
  return {
    byRouteA: (point) => {
      const entry = lineOf(point);
      return isFinding(entry) ? entry : readingOf(which, point, entry.line);
    },
    byRouteB: (point) => readOf(which, point)(lineByRouteB(point)),
    computation: (point, { value }) => ringdownComputation(point, found(lineOf(point)).window, value, readOf(which, point)),
    coverage: (point) => ringdownCoverage(point, found(lineOf(point)).window, readOf(which, point)),
    findings: (point) => {
      const { window, line } = found(lineOf(point));
      return ringdownFindings(point, window, line);
    },
    settings: ({ settings, record, completed, tones, startM }) =>
      usedSettings(
        [
          { name: 'modes', value: [settings.mode], matters: record.modes.length > 1 },
          ...highestRows(settings.lMax),
          { name: 'window', value: settings.window, unit: 'M', matters: true },
          { name: 'normaliseBy', value: settings.normaliseBy, matters: completed.waveform.binary.remnantMass !== undefined },
          ...floorRows(tones.floor, startM, request),
          ...mirrorRows(completed, [{ m: settings.mode[1] }]),
        ],
        request,
      ),
    figures: (point) => {
      const { window, line } = found(lineOf(point));
      return [ringdownFigure(point.tones.A, window, line, `Ringdown of ${toneName(point.settings)} of ${point.completed.waveform.name}`)];
    },
    tolerance,
  };
}

/**
 * Measures the frequency or the decay rate of one mode's ringdown.
 * Shape:  see Measurement.
 * Units:  Mω, or M_f ω when referred to the remnant.
 * Error:  see ringdownComputation.
 * Fails:  notComputable with the findings that say why.
 * Source: Q18; settings.md section 5.
 */
export const measureRingdown =
  (which: RingdownNumber, tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const { over } = request;
    const ats: At[] = over === null ? [{}] : over.values.map((value) => ({ [over.setting]: value }));
    return measureTones(request, watch, ats, ats.map(ringdownPreparer(request)), recipeOf(which, request, tolerance));
  };
