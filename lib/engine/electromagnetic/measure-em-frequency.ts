import type { Finding } from '../contract/finding';
import type { Measurement } from '../contract/measurement';
import type { MeasureRequest, Watch } from '../contract/quantity';
import { scientific, short } from '../findings/spelt';
import { predictedRingdown } from '../ringdown/predicted';
import { lineByRouteA } from '../ringdown/ringdown-point';
import { ringdownFindings } from '../ringdown/ringdown-findings';
import { isFinding, measureTones, type ToneRecipe } from '../tones/measure-tones';
import { toneSampling } from '../tones/tone-findings';
import { floorRows, usedSettings } from '../tones/used-rows';
import { plasmaCutoffHz } from './em-units';
import { frequencyComputation, frequencyCoverage } from './frequency-budget';
import { frequencyFigure } from './frequency-figure';
import { frequencyByRouteA, frequencyByRouteB, frequencyPreparer, hzPerOmega, type FrequencyPoint, type FrequencyReading } from './frequency-point';
import { pointsOf } from './measure-em-energy';

function found(reading: FrequencyReading | Finding): FrequencyReading {
  if (isFinding(reading)) throw new Error(reading.text);
  return reading;
}

/** What the remnant that the sheet states should ring at: other physics, hence a check and no route. */
function predictedHz({ ringdown, totalMassMsun }: FrequencyPoint): number | null {
  const predicted = predictedRingdown([2, 2], ringdown.completed.waveform.binary, 'M');
  return predicted === null ? null : hzPerOmega(totalMassMsun) * predicted.real;
}

function componentsOf(point: FrequencyPoint, valueHz: number): Record<string, number | null> {
  const cutoffHz = plasmaCutoffHz(point.plasmaDensityCm3);
  return { cutoffHz, ratio: valueHz / cutoffHz, massLimitMsun: (point.totalMassMsun * valueHz) / cutoffHz, checkPredictedHz: predictedHz(point) };
}

/** Emitted is not observable. */
function cutoffFinding(point: FrequencyPoint, valueHz: number): Finding[] {
  const cutoff = plasmaCutoffHz(point.plasmaDensityCm3);
  if (valueHz >= cutoff) return [];
  const limit = (point.totalMassMsun * valueHz) / cutoff;
  return [
    {
      code: 'engine/below-cutoff', level: 'note', where: point.ringdown.completed.waveform.name,
      text: `At ${scientific(point.totalMassMsun)} M☉ the waves are emitted at ${scientific(valueHz)} Hz. A plasma of ${short(point.plasmaDensityCm3)} electrons in a cubic centimetre lets nothing through below ${scientific(cutoff, 3)} Hz: they do not arrive. Only total masses below ${short(limit)} M☉ ring above that.`,
      fix: 'Claim what is emitted, not what is observed; or declare the density of the plasma that is meant.',
    },
  ];
}

function findingsOf(point: FrequencyPoint): Finding[] {
  const { ringdown } = point;
  const reading = found(frequencyByRouteA(point));
  const line = reading.window === null ? null : lineByRouteA(ringdown);
  const ofRecord = line === null || isFinding(line) ? toneSampling(ringdown.tones.B, ringdown.completed.waveform.name) : ringdownFindings(ringdown, line.window, line.line);
  return [...ofRecord, ...cutoffFinding(point, hzPerOmega(point.totalMassMsun) * reading.omega)];
}

const toldPlace = ({ at }: FrequencyPoint): unknown => (at === 'ringdown' ? { ringdown: true } : at);

function recipeOf(request: MeasureRequest, tolerance: (claimed: number) => number): ToneRecipe<FrequencyPoint> {
  return {
    byRouteA: (point) => {
      const reading = frequencyByRouteA(point);
      if (isFinding(reading)) return reading;
      const value = hzPerOmega(point.totalMassMsun) * reading.omega;
      return { value, components: componentsOf(point, value) };
    },
    byRouteB: (point) => hzPerOmega(point.totalMassMsun) * frequencyByRouteB(point),
    computation: (point) => frequencyComputation(point, found(frequencyByRouteA(point))),
    coverage: (point) => frequencyCoverage(point, found(frequencyByRouteA(point))),
    findings: findingsOf,
    settings: (point) =>
      usedSettings(
        [
          { name: 'at', value: toldPlace(point), matters: true },
          ...(point.at === 'ringdown' ? [{ name: 'window', value: point.ringdown.settings.window, unit: 'M', matters: true } as const] : []),
          { name: 'totalMassMsun', value: point.totalMassMsun, unit: 'M☉', matters: false },
          { name: 'plasmaDensityCm3', value: point.plasmaDensityCm3, unit: 'cm⁻³', matters: false },
          ...floorRows(point.ringdown.tones.floor, point.ringdown.startM, request),
        ],
        request,
      ),
    figures: (point) => [frequencyFigure(point, hzPerOmega(point.totalMassMsun) * found(frequencyByRouteA(point)).omega)],
    tolerance,
  };
}

/**
 * Measures the frequency of the waves in Hz and where it lies against the cut-off of a plasma.
 * Shape:  see Measurement.
 * Units:  Hz.
 * Error:  see frequencyComputation.
 * Fails:  notComputable with the findings that say why.
 * Source: Q25; settings.md section 7.
 */
export const measureEmFrequency =
  (tolerance: (claimed: number) => number) =>
  (request: MeasureRequest, watch: Watch): Measurement => {
    const ats = pointsOf(request);
    return measureTones(request, watch, ats, ats.map(frequencyPreparer(request)), recipeOf(request, tolerance));
  };
