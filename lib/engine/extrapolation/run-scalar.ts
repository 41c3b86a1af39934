import { LEAST, ROOT3 } from '../budget/half-width';
import type { Finding } from '../contract/finding';
import type { BudgetLine, UsedSetting } from '../contract/measurement';
import type { MeasureRequest, Quantity, Watch } from '../contract/quantity';
import type { DeclaredSettings, SettingName } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { toneSampling } from '../tones/tone-findings';
import { recordFindings } from '../findings/record-findings';
import { floorRows, usedSettings } from '../tones/used-rows';
import { relativeSlip } from '../radiation/input-rounding';
import { followRuns, type Followed, type FollowedRun } from './followed-runs';
import { floorLines } from './series-budget';
import { mirroredFindings } from './series-findings';
import type { PeakBy } from '../tones/peak';
import { atPeakOnSamples, atPeakOnSplines, turnOfPeak, type AtPeak } from './tone-at-peak';
import type { Tone } from '../tones/tone';

/** One number of one run, by both routes. */
export interface RunScalar {
  readonly A: number;
  readonly B: number;
  /** Lines that make U. */
  readonly computation: readonly BudgetLine[];
  readonly coverage: readonly BudgetLine[];
  readonly findings: readonly Finding[];
  readonly settings: readonly UsedSetting[];
  readonly assumed: readonly string[];
}

/** Gives one number of any run. */
export interface Meter {
  /** The number, or what stops it. */
  readonly of: (waveform: Waveform) => RunScalar | readonly Finding[];
  /** Route A alone; null where it is stopped. */
  readonly looked: (waveform: Waveform) => number | null;
}

export const isStopped = (found: RunScalar | readonly Finding[]): found is readonly Finding[] => Array.isArray(found);

const only = (declared: DeclaredSettings, names: readonly SettingName[]): DeclaredSettings => Object.fromEntries(Object.entries(declared).filter(([name]) => (names as readonly string[]).includes(name) && name !== 'observable'));

/**
 * The numbers of a quantity that is claimed of one waveform: its own routes, uncertainty and findings.
 * Shape:  see Meter.
 * Units:  the quantity's.
 * Error:  the quantity's.
 * Fails:  with the findings that stop it.
 * Source: settings.md section 5.
 */
export function meterOfQuantity(quantity: Quantity, request: MeasureRequest, watch: Watch): Meter {
  const quiet: Watch = { onProgress: () => undefined, cancelled: watch.cancelled };
  const settings = only(request.settings, quantity.settings);
  const measured = (waveform: Waveform, routeAOnly: boolean) =>
    quantity.measure({ claimId: request.claimId, inputs: { of: { a: waveform }, noise: null }, settings, over: null, claimed: [null], withFigures: false, routeAOnly }, quiet);
  return {
    of: (waveform) => {
      const { points, budget, findings, settings: used, assumed } = measured(waveform, request.routeAOnly === true);
      const [point] = points;
      if (point === undefined || point.value === null) return findings;
      const group = (which: BudgetLine['group']): BudgetLine[] => budget.filter((line) => line.group === which);
      return { A: point.value, B: point.routes.B ?? Number.NaN, computation: group('computation'), coverage: group('coverage'), findings, settings: used, assumed };
    },
    looked: (waveform) => measured(waveform, true).points[0]?.value ?? null,
  };
}

export type PeakNumber = 'amplitude' | 'phase';

interface Turned {
  readonly reading: readonly number[];
  readonly integration: readonly number[];
}

/** Route A with one knob turned at a time. */
function turnedOf({ tones, peakTones, startM }: FollowedRun, endM: number, which: PeakNumber): Turned {
  const by = (tone: Tone, peakTone: Tone, order: 6 | 8, peak: PeakBy): number => atPeakOnSamples({ tone, peakTone, startM, endM }, order, peak)[which];
  return {
    reading: [by(tones.A, peakTones.A, 6, 'polynomial'), by(tones.A, peakTones.A, 8, 'shorter polynomial')],
    integration: tones.floor === null ? [] : [by(tones.coarse, peakTones.coarse, 8, 'polynomial')],
  };
}

function computationOf(run: FollowedRun, here: AtPeak, endM: number, which: PeakNumber): BudgetLine[] {
  const { tones, peakTones, waveform } = run;
  const { reading, integration: integrated } = turnedOf(run, endM, which);
  const value = here[which];
  const size = (turned: readonly number[]): number => Math.max(turned.reduce((sum, other) => sum + Math.abs(other - value), 0) / ROOT3, LEAST * Math.abs(value));
  const integration: BudgetLine[] = tones.floor === null ? [] : [{ component: 'Integration in frequency', id: 'E02', group: 'computation', u: size(integrated), turned: { values: integrated }, note: 'Interpolation of order 8 against 6 and half the points.' }];
  const digits = waveform.significantDigits;
  const slip = digits === null ? 0 : relativeSlip(digits);
  return [
    { component: 'Interpolation and time of the peak', id: 'E01', group: 'computation', u: size(reading), turned: { values: reading }, note: 'Local polynomials of order 8 against 6, in the reading and in the peak; changes added, half-width over √3.' },
    ...integration,
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: which === 'amplitude' ? slip * Math.abs(value) : Math.hypot(Math.SQRT2 * slip, turnOfPeak(tones.A, peakTones.A, here.timeM, slip)), note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.` },
  ];
}

/** What one run shows in the mode that is followed. */
export function runFindings(run: FollowedRun, { mode }: Followed): Finding[] {
  const { waveform, tones } = run;
  return [...mirroredFindings(run, mode), ...toneSampling({ ...tones.B, mode }, waveform.name), ...recordFindings(waveform, (l, m) => mode !== null && l === mode[0] && m === mode[1])];
}

/**
 * Amplitude at the peak, or the phase from the start to there, of the mode that all runs follow.
 * Shape:  see Meter.
 * Units:  those of the amplitude; rad.
 * Error:  see atPeakOnSamples.
 * Fails:  with the finding that stops it.
 * Source: settings.md section 6.
 */
export function meterAtPeak(which: PeakNumber, followed: Followed, request: MeasureRequest): Meter {
  const { mode, severalModes, endM, floor } = followed;
  const read = ({ tones, peakTones, startM }: FollowedRun) => ({ A: atPeakOnSamples({ tone: tones.A, peakTone: peakTones.A, startM, endM }), B: () => atPeakOnSplines({ tone: tones.B, peakTone: peakTones.B, startM, endM }) });
  const outside = ({ waveform: { name }, startM }: FollowedRun, peakM: number): Finding => ({ code: 'engine/no-signal', level: 'stops-lodging', where: name, text: `The phase is counted from t = ${startM} M to the peak of ${name} at t = ${Number(peakM.toPrecision(6))} M, and the start does not lie before it in the record.`, fix: 'Give a startM inside every record, before the peak.' });
  const again = (waveform: Waveform, more: DeclaredSettings = {}): number | null => {
    const found = followRuns([waveform], waveform, { ...request.settings, ...(mode === null ? {} : { modes: [mode] }), ...more });
    if ('code' in found) return null;
    const value = read(found.runs[0]!).A[which];
    return Number.isFinite(value) ? value : null;
  };
  return {
    of: (waveform) => {
      const run = followed.runs.find((each) => each.waveform === waveform)!;
      const { A, B } = read(run);
      if (!Number.isFinite(A[which])) return [outside(run, A.timeM)];
      const { settings, assumed } = usedSettings(
        [
          ...(mode === null ? [] : [{ name: 'modes', value: [mode], matters: severalModes } as const]),
          ...(which === 'phase' ? [{ name: 'startM', value: run.startM, unit: 'M', matters: waveform.junkEndM === null } as const] : []),
          ...floorRows(floor, run.startM, request).filter(({ name }) => name !== 'startM' || which !== 'phase'),
        ],
        request,
      );
      const looks = request.routeAOnly === true;
      if (looks) return { A: A[which], B: Number.NaN, computation: [], coverage: [], findings: runFindings(run, followed), settings, assumed };
      return { A: A[which], B: B()[which], computation: computationOf(run, A, endM, which), coverage: floorLines(floor, A[which], (other) => again(waveform, { integrationFloor: other })), findings: runFindings(run, followed), settings, assumed };
    },
    looked: (waveform) => again(waveform),
  };
}
