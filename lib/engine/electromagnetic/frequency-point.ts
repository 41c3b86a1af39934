import { houseValues } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { lineByRouteA, lineByRouteB, ringdownPreparer, type FitWindow, type RingdownPoint } from '../ringdown/ringdown-point';
import { peakOnSamples, peakOnSplines } from '../tones/peak';
import { isFinding, stop, type At } from '../tones/measure-tones';
import { MSUN_S } from '../units/constants';
import { frequencyOnSamples, frequencyOnSplines, type SlopeNumerics } from './tone-frequency';

/** Where the frequency is read. */
export type FrequencyAt = 'ringdown' | 'peak' | { readonly timeM: number };

export interface FrequencyPoint {
  /** The mode that is followed, with its peak and its window. */
  readonly ringdown: RingdownPoint;
  readonly at: FrequencyAt;
  readonly totalMassMsun: number;
  readonly plasmaDensityCm3: number;
}

/** One reading by route A; `window` is where the line was fitted, null when a curve was read at a time. */
export interface FrequencyReading {
  /** rad/M, > 0. */
  readonly omega: number;
  readonly window: FitWindow | null;
  /** On the file's own axis; null for a fit. */
  readonly timeM: number | null;
}

/** Hz of one rad/M at a total mass. */
export const hzPerOmega = (massMsun: number): number => 1 / (2 * Math.PI * massMsun * MSUN_S);

/** φ₂ rings as it stands in the file: its mode is followed like that of a strain. */
const asTone = (waveform: Waveform): Waveform => (waveform.variable === 'phi2' ? { ...waveform, variable: 'strain', amplitudeUnit: 'rh/M' } : waveform);

/** A sheet is refused for any other word; the ringdown stands where one would have come through. */
function placeOf({ at }: DeclaredSettings): FrequencyAt {
  if (at === 'peak') return at;
  return typeof at === 'object' && 'timeM' in at ? { timeM: at.timeM } : 'ringdown';
}

function ringdownSettings({ window, startM, integrationFloor }: DeclaredSettings): DeclaredSettings {
  return { ...(window === undefined ? {} : { window }), ...(startM === undefined ? {} : { startM }), ...(integrationFloor === undefined ? {} : { integrationFloor }) };
}

/**
 * Takes the (2,2) mode out of the file and fills in the settings of each point; the mode is read once.
 * Shape:  gives a function of the swept mass.
 * Units:  as FrequencyPoint.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md section 7.
 */
export function frequencyPreparer(request: MeasureRequest): (at: At) => FrequencyPoint | Finding {
  const { a } = request.inputs.of;
  if (a === undefined) return () => stop('engine/no-signal', request.claimId, 'The claim names no waveform.', 'Name one in `of`.');
  const ringdown = ringdownPreparer({ ...request, inputs: { of: { a: asTone(a) }, noise: null }, settings: ringdownSettings(request.settings), over: null })({});
  return (at) => {
    const declared: DeclaredSettings = { ...request.settings, ...at };
    const { totalMassMsun, plasmaDensityCm3 } = declared;
    if (isFinding(ringdown)) return ringdown;
    if (totalMassMsun === undefined) return stop('engine/no-signal', a.name, 'A frequency in Hz needs the total mass.', 'Declare totalMassMsun.');
    return { ringdown, at: placeOf(declared), totalMassMsun, plasmaDensityCm3: plasmaDensityCm3 ?? houseValues.plasmaDensityCm3 };
  };
}

function timeBy({ at, ringdown }: FrequencyPoint, peakM: number | null): number | Finding {
  const { axis } = ringdown.tones.B;
  const { name } = ringdown.completed.waveform;
  const [first, last] = [axis[0]!, axis[axis.length - 1]!];
  // Rule 2.10: without an interior maximum the end of the record is read.
  const t = typeof at === 'object' ? at.timeM : (peakM ?? last);
  if (t >= first && t <= last) return t;
  return stop('engine/no-signal', name, `The frequency is asked for at t = ${t} M, but ${name} runs from ${first} to ${last} M.`, 'Give a time inside the record, on its own axis.');
}

const noTurn = (name: string): Finding => stop('engine/no-signal', name, `The (2,2) mode of ${name} does not rotate where its frequency is read.`, 'Declare a time at which the mode is heard.');

/** Route A at a point; the peak by another rule or the slope by other points where its own error is asked for. */
export function frequencyByRouteA(point: FrequencyPoint, peak: 'polynomial' | 'parabola' = 'polynomial', numerics?: SlopeNumerics): FrequencyReading | Finding {
  const { ringdown } = point;
  const { name } = ringdown.completed.waveform;
  if (point.at === 'ringdown') {
    const found = lineByRouteA(ringdown);
    if (isFinding(found)) return found;
    const omega = Math.abs(found.line.omega);
    return omega > 0 ? { omega, window: found.window, timeM: null } : noTurn(name);
  }
  const t = timeBy(point, peakOnSamples(ringdown.peakTones.A, peak));
  if (typeof t !== 'number') return t;
  const omega = Math.abs(frequencyOnSamples(ringdown.tones.A, t, numerics).omega);
  return omega > 0 ? { omega, window: null, timeM: t } : noTurn(name);
}

/** Route B at a point, in rad/M; not finite where it finds none. */
export function frequencyByRouteB(point: FrequencyPoint): number {
  const { ringdown } = point;
  if (point.at === 'ringdown') return Math.abs(lineByRouteB(ringdown).omega);
  const t = timeBy(point, peakOnSplines(ringdown.peakTones.B));
  return typeof t === 'number' ? Math.abs(frequencyOnSplines(ringdown.tones.B, t)) : Number.NaN;
}
