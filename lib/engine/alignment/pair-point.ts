import { houseValues } from '../contract/house-values';
import type { Finding } from '../contract/finding';
import type { MeasureRequest } from '../contract/quantity';
import type { DeclaredSettings, ModeIndex, ReadAt } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { completeModes } from '../conditioning/complete-modes';
import { dominantMode } from '../conditioning/dominant-mode';
import { defaultFloor } from '../radiation/integration-floor';
import { radiationRecord, type RadiationRecord } from '../radiation/radiation-record';
import { stop, type At } from '../tones/measure-tones';
import { isIntegrated, strainTones, type StrainTones } from '../tones/strain-tone';
import { toneName } from '../tones/tone';
import { alignPair, readPair, type Aligned, type AlignmentSettings, type NotAligned, type PairRoute, type Residual } from './alignment';
import { coarserPair, housePair, pairOnSamples } from './pair-on-samples';
import { pairOnSplines } from './pair-on-splines';

/** One record of a pair. */
export interface PairSide {
  readonly waveform: Waveform;
  readonly tones: StrainTones;
  readonly startM: number;
  /** The mode was made up by the mirror rule and nobody said that it may be. */
  readonly mirrored: boolean;
}

/** One point of a claim about two records, its settings filled in. */
export interface PairPoint {
  readonly a: PairSide;
  readonly b: PairSide;
  /** Null for strain along one line of sight. */
  readonly mode: ModeIndex | null;
  readonly severalModes: boolean;
  readonly settings: AlignmentSettings;
  /** Made when first asked for; points of a sweep share them. */
  readonly routes: PairRoutes;
}

export interface PairRoutes {
  readonly A: () => PairRoute;
  readonly coarse: () => PairRoute;
  readonly B: () => PairRoute;
}

/** The mode that stands for strain along a line of sight, so that it is scaled and integrated like one. */
export const ALONG: ModeIndex = [2, 2];

/**
 * Plus and cross as one complex series h₊ − ih×; modes completed by the mirror rule.
 * Shape:  a waveform that holds modes.
 * Units:  those of the file.
 * Error:  none.
 * Fails:  with the finding that stops the claim where there is one polarisation only.
 * Source: settings.md rules 2.2 and 2.3.
 */
export function asModes(waveform: Waveform): Waveform | Finding {
  const { content, name } = waveform;
  if (content.kind === 'modes') return completeModes(waveform).waveform;
  if (content.cross === null) return stop('engine/no-signal', name, `${name} holds one polarisation only, from which no phase can be read.`, 'Supply plus and cross, or modes.');
  return { ...waveform, content: { kind: 'modes', modes: [{ l: ALONG[0], m: ALONG[1], re: content.plus, im: content.cross.map((x) => -x) }] } };
}

function recordOf(waveform: Waveform): RadiationRecord | Finding {
  const shaped = asModes(waveform);
  if ('code' in shaped) return shaped;
  const record = radiationRecord(shaped);
  return 'saw' in record ? stop('engine/no-signal', waveform.name, `Two records cannot be compared in ${record.saw}.`, record.fix) : record;
}

function sideOf(waveform: Waveform, record: RadiationRecord, mode: ModeIndex, declared: DeclaredSettings): PairSide | Finding {
  const startM = declared.startM ?? waveform.junkEndM ?? record.axis[0]!;
  const { name } = waveform;
  const floor = isIntegrated(record) ? (declared.integrationFloor ?? defaultFloor(record, startM)) : null;
  if (isIntegrated(record) && floor === null) return stop('engine/no-signal', name, `The phase of the dominant mode of ${name} does not move, so there is no frequency from which to integrate.`, 'Declare integrationFloor.');
  const tones = strainTones(record, mode, floor);
  if (tones === null) return stop('engine/modes-missing', name, `The claim follows ${toneName({ mode })}, which ${name} does not hold.`, 'Supply the mode, or name one that both files hold in modes.');
  return { waveform, tones, startM, mirrored: mode[1] < 0 && completeModes(waveform).mirrorAssumed };
}

/** The shift does not depend on where the difference is read: a sweep over times looks for it once. */
function remembering(route: PairRoute): PairRoute {
  const shifts = new Map<string, ReturnType<PairRoute['bestShift']>>();
  const bestShift: PairRoute['bestShift'] = (window, low, high) => {
    const key = [...window, low, high].join();
    const found = shifts.get(key) ?? route.bestShift(window, low, high);
    shifts.set(key, found);
    return found;
  };
  return { ...route, bestShift };
}

const once = <T>(make: () => T): (() => T) => {
  let made: { readonly value: T } | null = null;
  return () => (made ??= { value: make() }).value;
};

/**
 * Takes one mode out of both files and fills in the settings.
 * Shape:  gives a function of the swept time at which the difference is read.
 * Units:  as PairPoint.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md section 6.
 */
export function pairPreparer(request: MeasureRequest): (at: At) => PairPoint | Finding {
  const { a: waveA, b: waveB } = request.inputs.of;
  const refuse = (finding: Finding) => () => finding;
  if (waveA === undefined || waveB === undefined) return refuse(stop('engine/no-signal', request.claimId, 'The claim does not name two waveforms.', 'Name them in `of`.'));
  const { settings: declared } = request;
  const [recordA, recordB] = [recordOf(waveA), recordOf(waveB)];
  if ('code' in recordA) return refuse(recordA);
  if ('code' in recordB) return refuse(recordB);
  const sighted = waveA.content.kind !== 'modes';
  if (sighted !== (waveB.content.kind !== 'modes')) return refuse(stop('engine/no-signal', waveB.name, `${waveA.name} and ${waveB.name} are not of one kind: one holds modes, the other strain along a line of sight.`, 'Supply both as modes, or both along one line of sight.'));
  const loudest = dominantMode(recordA.modes);
  const listed = declared.modes === 'all' ? undefined : declared.modes?.[0];
  const mode = sighted ? ALONG : (listed ?? (loudest ? ([loudest.l, loudest.m] as const) : ALONG));
  const [a, b] = [sideOf(waveA, recordA, mode, declared), sideOf(waveB, recordB, mode, declared)];
  if ('code' in a) return refuse(a);
  if ('code' in b) return refuse(b);
  const routes: PairRoutes = {
    A: once(() => remembering(pairOnSamples(a.tones.A, b.tones.A, housePair))),
    coarse: once(() => remembering(pairOnSamples(a.tones.A, b.tones.A, coarserPair))),
    B: once(() => remembering(pairOnSplines(a.tones.B, b.tones.B))),
  };
  const settingsAt = (at: ReadAt): AlignmentSettings => ({ alignment: declared.alignment ?? houseValues.alignment, window: declared.window ?? null, at });
  return (swept) => ({ a, b, mode: sighted ? null : mode, severalModes: recordA.modes.length > 1, routes, settings: settingsAt(typeof swept.at === 'number' ? { timeM: swept.at } : placeIn(declared.at)) });
}

export type Which = 'phase' | 'amplitude';

export interface PairResult {
  readonly aligned: Aligned;
  readonly residual: Residual;
}

/** The sheet refuses a ringdown for two records; the house default stands where one would have come through. */
const placeIn = (at: DeclaredSettings['at']): ReadAt => (at === undefined || (typeof at === 'object' && 'ringdown' in at) ? houseValues.at : at);

/** Alignment and reading by one route. */
export function pairBy(route: PairRoute, settings: AlignmentSettings, which: Which): PairResult | NotAligned {
  const aligned = alignPair(route, settings);
  if ('because' in aligned) return aligned;
  const residual = readPair(route, aligned, settings.at, which);
  return 'because' in residual ? residual : { aligned, residual };
}
