/**
 * Orbits: what the inspiral shows in the phase of its dominant mode. Everything here works in units of M
 * on one complex series over a window of the file's own times. Route A reads unwrapped phases and local
 * differences at the samples, route B splines of the real and imaginary part and Gauss panels.
 */
import { asModes } from '../alignment/pair-point';
import { completeModes } from '../conditioning/complete-modes';
import { dominantMode } from '../conditioning/dominant-mode';
import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings, ModeIndex } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { defaultFloor } from '../radiation/integration-floor';
import { radiationRecord, upTo, upToWords, type RadiationRecord } from '../radiation/radiation-record';
import { stop, type At } from '../tones/measure-tones';
import { peakOnSamples, peakOnSplines, type PeakBy } from '../tones/peak';
import { isIntegrated, strainTones, type StrainTones } from '../tones/strain-tone';
import { toneName } from '../tones/tone';
import { floorRows, highestRows, mirrorRows, type UsedRow } from '../tones/used-rows';

/** One point of a claim about an inspiral, its settings filled in. */
export interface OrbitPoint {
  readonly waveform: Waveform;
  readonly tones: StrainTones;
  /** Null for strain along one line of sight. */
  readonly mode: ModeIndex | null;
  readonly lMax: number | null;
  /** Is there more than one mode that could be followed? */
  readonly severalModes: boolean;
  readonly startM: number;
  /** Declared, on the file's own times; null for the default of the quantity. */
  readonly declaredWindow: readonly [number, number] | null;
}

const quadrupole: ModeIndex = [2, 2];

/** The first mode that the claim lists; (2,2), or the dominant mode where the file has none. */
function modeOf(record: RadiationRecord, listed: ModeIndex | undefined): ModeIndex | null {
  if (listed !== undefined) return listed;
  if (record.modes.some(({ l, m }) => l === quadrupole[0] && m === quadrupole[1])) return quadrupole;
  const loudest = dominantMode(record.modes);
  return loudest === undefined ? null : [loudest.l, loudest.m];
}

/**
 * Fills in the settings of one point and takes its mode out of the file.
 * Shape:  gives a function of the swept setting's value.
 * Units:  as OrbitPoint.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md sections 1 and 5.
 */
export function orbitPreparer({ inputs, settings, claimId }: MeasureRequest): (at: At) => OrbitPoint | Finding {
  const waveform = inputs.of.a;
  if (waveform === undefined) return () => stop('engine/no-signal', claimId, 'The claim names no waveform.', 'Name one in `of`.');
  const { name } = waveform;
  const shaped = asModes(waveform);
  if ('code' in shaped) return () => shaped;
  const record = radiationRecord(shaped);
  if ('saw' in record) return () => stop('engine/no-signal', name, `Cycles cannot be followed in ${record.saw}.`, record.fix);
  return (at) => {
    const declared: DeclaredSettings = { ...settings, ...at };
    const startM = declared.startM ?? waveform.junkEndM ?? record.axis[0]!;
    const floor = isIntegrated(record) ? (declared.integrationFloor ?? defaultFloor(record, startM)) : null;
    if (isIntegrated(record) && floor === null) return stop('engine/no-signal', name, `The phase of the dominant mode of ${name} does not move, so there is no frequency from which to integrate.`, 'Declare integrationFloor.');
    const lMax = declared.lMax ?? null;
    const used = upTo(record, lMax);
    // Strain along a line of sight has no modes to choose from.
    const isSet = waveform.content.kind === 'modes';
    const mode = modeOf(used, isSet && declared.modes !== 'all' ? declared.modes?.[0] : undefined);
    if (mode === null) return stop('engine/no-signal', name, `${name} holds no mode to follow${upToWords(lMax)}.`, 'Supply the (2,2) mode.');
    const tones = strainTones(used, mode, floor);
    if (tones === null) return stop('engine/modes-missing', name, `The claim follows ${toneName({ mode })}, which ${name} does not hold${upToWords(lMax)}.`, 'Supply the mode, or name one that the file holds in modes.');
    return { waveform, tones, mode: isSet ? mode : null, lMax, severalModes: record.modes.length > 1, startM, declaredWindow: declared.window ?? null };
  };
}

/** A stretch of the record, on its own times. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** How much a default window leaves out at its two ends. */
export interface Margins {
  readonly afterStart: number;
  readonly beforePeak: number;
}

const LEAST_SAMPLES = 8;
const shown = (x: number): string => String(Number(x.toPrecision(6)));

/**
 * The window of a claim, whose default reaches from the start to the peak less some margins; a record
 * without a peak inside ends at its last sample (rule 2.10).
 * Shape:  one stretch.
 * Units:  M, on the file's own times.
 * Error:  that of the peak.
 * Fails:  with the finding that stops the claim where the window is not inside the record.
 * Source: settings.md section 5 and rule 2.10.
 */
export function stretchFrom(point: OrbitPoint, { afterStart, beforePeak }: Margins, peakM: number | null): Stretch | Finding {
  const { axis } = point.tones.B;
  const { name } = point.waveform;
  const [first, last] = [axis[0]!, axis[axis.length - 1]!];
  const [from, to] = point.declaredWindow ?? [Math.max(point.startM, first) + afterStart, (peakM ?? last) - beforePeak];
  const slack = 1e-9 * (last - first);
  const inside = axis.filter((t) => t >= from && t <= to).length;
  if (from >= first - slack && to <= last + slack && inside >= LEAST_SAMPLES) return { from: Math.max(from, first), to: Math.min(to, last) };
  return stop('engine/no-signal', name, `The window from ${shown(from)} to ${shown(to)} M holds ${inside} samples of ${name}, which runs from ${shown(first)} to ${shown(last)} M.`, 'Declare a window inside the record, on its own times, or supply a longer one.');
}

export const stretchByRouteA = (point: OrbitPoint, margins: Margins, by: PeakBy = 'polynomial'): Stretch | Finding =>
  stretchFrom(point, margins, point.declaredWindow === null ? peakOnSamples(point.tones.A, by) : null);

export const stretchByRouteB = (point: OrbitPoint, margins: Margins): Stretch | Finding =>
  stretchFrom(point, margins, point.declaredWindow === null ? peakOnSplines(point.tones.B) : null);

/** Settings of either number of an inspiral; where the window is the default one, the start is read from it. */
export const orbitRows = ({ waveform, mode, lMax, severalModes, startM, declaredWindow, tones }: OrbitPoint, { from, to }: Stretch, request: MeasureRequest): UsedRow[] => [
  ...(mode === null ? [] : [{ name: 'modes', value: [mode], matters: severalModes } as const]),
  ...highestRows(lMax),
  { name: 'window', value: [from, to], unit: 'M', matters: true },
  ...(declaredWindow === null ? [{ name: 'startM', value: startM, unit: 'M', matters: false } as const] : []),
  ...floorRows(tones.floor, startM, request).filter(({ name }) => name !== 'startM'),
  ...(mode === null ? [] : mirrorRows(completeModes(waveform), [{ m: mode[1] }])),
];
