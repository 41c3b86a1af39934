import { houseValues, ringdownWindow } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings, ModeIndex } from '../contract/settings';
import { completeModes, type CompletedModes } from '../conditioning/complete-modes';
import { dominantMode } from '../conditioning/dominant-mode';
import { defaultFloor } from '../radiation/integration-floor';
import { radiationRecord, upTo, upToWords, type RadiationRecord } from '../radiation/radiation-record';
import { peakOnSamples, peakOnSplines } from '../tones/peak';
import { stop, type At } from '../tones/measure-tones';
import { isIntegrated, strainTones, type StrainTones } from '../tones/strain-tone';
import { toneName } from '../tones/tone';
import { lineOnPanels } from './line-on-panels';
import { lineOnSamples, type RingdownLine } from './line-on-samples';

export interface RingdownSettings {
  readonly mode: ModeIndex;
  readonly lMax: number | null;
  /** From the peak, in M. */
  readonly window: readonly [number, number];
  readonly normaliseBy: 'M' | 'remnant';
}

/** One point, its settings filled in. */
export interface RingdownPoint {
  readonly completed: CompletedModes;
  readonly record: RadiationRecord;
  readonly settings: RingdownSettings;
  readonly startM: number;
  /** The mode that is fitted, and the one whose peak is the zero of the window. */
  readonly tones: StrainTones;
  readonly peakTones: StrainTones;
  /** By which rates per M are multiplied. */
  readonly scale: number;
}

/** A window on the file's own axis; an end beyond the record is drawn in to its last sample. */
export interface FitWindow {
  readonly peakM: number;
  readonly from: number;
  readonly to: number;
}

function scaleOf(declared: DeclaredSettings, { waveform }: CompletedModes): number | Finding {
  const normaliseBy = declared.normaliseBy ?? houseValues.normaliseBy;
  const { remnantMass } = waveform.binary;
  if (normaliseBy === 'M') return 1;
  if (normaliseBy === 'adm') return stop('engine/normaliser-missing', waveform.name, 'A ringdown is referred to the total mass or to the remnant, and the claim asks for the ADM energy.', 'Declare normaliseBy: M or remnant.');
  if (remnantMass !== undefined && remnantMass > 0) return remnantMass;
  return stop('engine/normaliser-missing', waveform.name, `The claim refers the ringdown to the remnant, but ${waveform.name} states no binary.remnantMass.`, 'State binary.remnantMass beside the waveform, or refer the number to M.');
}

const noFloor = (name: string): Finding =>
  stop('engine/no-signal', name, `The phase of the dominant mode of ${name} does not move, so there is no frequency from which to integrate.`, 'Declare integrationFloor.');

const missing = (name: string, mode: ModeIndex, lMax: number | null): Finding =>
  stop('engine/modes-missing', name, `The claim fits ${toneName({ mode })}, which ${name} does not hold${upToWords(lMax)}.`, 'Supply the mode, or name one that the file holds in modes.');

/**
 * Fills in the settings of one point and takes its mode out of the file.
 * Shape:  gives a function of the swept setting's value.
 * Units:  as RingdownPoint.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md sections 1 and 5.
 */
export function ringdownPreparer(request: MeasureRequest): (at: At) => RingdownPoint | Finding {
  const waveform = request.inputs.of.a;
  if (waveform === undefined) return () => stop('engine/no-signal', request.claimId, 'The claim names no waveform.', 'Name one in `of`.');
  const completed = completeModes(waveform);
  const { name } = waveform;
  const record = radiationRecord(completed.waveform);
  return (at) => {
    const declared: DeclaredSettings = { ...request.settings, ...at };
    if ('saw' in record) return stop('engine/no-signal', name, `A ringdown cannot be read from ${record.saw}.`, record.fix);
    const scale = scaleOf(declared, completed);
    if (typeof scale !== 'number') return scale;
    const listed = declared.modes === 'all' ? undefined : declared.modes?.[0];
    const mode = listed ?? houseMode;
    const startM = declared.startM ?? waveform.junkEndM ?? record.axis[0]!;
    const floor = isIntegrated(record) ? (declared.integrationFloor ?? defaultFloor(record, startM)) : null;
    if (isIntegrated(record) && floor === null) return noFloor(name);
    const lMax = declared.lMax ?? null;
    const used = upTo(record, lMax);
    const tones = strainTones(used, mode, floor);
    const loudest = dominantMode(used.modes);
    const peakTones = strainTones(used, houseMode, floor) ?? (loudest ? strainTones(used, [loudest.l, loudest.m], floor) : null);
    if (tones === null || peakTones === null) return missing(name, mode, lMax);
    const normaliseBy = declared.normaliseBy === 'remnant' ? 'remnant' : 'M';
    return { completed, record, startM, settings: { mode, lMax, window: declared.window ?? ringdownWindow, normaliseBy }, tones, peakTones, scale };
  };
}

const houseMode: ModeIndex = [2, 2];
/** Fewer samples, or less than half of the window inside the record, give no line. */
const LEAST_SAMPLES = 8;

/**
 * The window from a peak at a time, or why there is none.
 * Shape:  one window.
 * Units:  M.
 * Error:  none.
 * Fails:  with the finding that stops the claim: no peak, or less than half of the window inside the record.
 * Source: settings.md section 5 (ringdown).
 */
export function fitWindow({ tones, settings, completed }: RingdownPoint, peakM: number | null): FitWindow | Finding {
  const { name } = completed.waveform;
  const { axis } = tones.B;
  if (peakM === null) return stop('engine/no-signal', name, `The amplitude of ${name} has no maximum inside the record, so there is no peak from which to count the window.`, 'Supply a record that reaches past the merger.');
  const [t1, t2] = settings.window;
  const from = peakM + t1;
  const to = Math.min(peakM + t2, axis[axis.length - 1]!);
  const inside = axis.filter((t) => t >= from && t <= to).length;
  if (from >= axis[0]! && to - from >= (t2 - t1) / 2 && inside >= LEAST_SAMPLES) return { peakM, from, to };
  return stop('engine/no-signal', name, `The window from ${t1} to ${t2} M after the peak at t = ${Number(peakM.toPrecision(6))} M holds ${inside} samples of ${name}, which runs from ${axis[0]} to ${axis[axis.length - 1]} M.`, 'Declare a window inside the record, or supply a longer one.');
}

/** Route A at a point: its window, and the lines in it. */
export function lineByRouteA(point: RingdownPoint): { readonly window: FitWindow; readonly line: RingdownLine } | Finding {
  const window = fitWindow(point, peakOnSamples(point.peakTones.A));
  return 'code' in window ? window : { window, line: lineOnSamples(point.tones.A, window.from, window.to) };
}

/** Route B at a point; not finite where it finds no window. */
export function lineByRouteB(point: RingdownPoint): RingdownLine {
  const window = fitWindow(point, peakOnSplines(point.peakTones.B));
  return 'code' in window ? { omega: Number.NaN, gamma: Number.NaN } : lineOnPanels(point.tones.B, window.from, window.to);
}
