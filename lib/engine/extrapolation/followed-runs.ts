import { ALONG, asModes } from '../alignment/pair-point';
import { completeModes } from '../conditioning/complete-modes';
import { dominantMode } from '../conditioning/dominant-mode';
import type { Finding } from '../contract/finding';
import type { DeclaredSettings, ModeIndex } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { defaultFloor } from '../radiation/integration-floor';
import { radiationRecord, type RadiationRecord } from '../radiation/radiation-record';
import { stop } from '../tones/measure-tones';
import { isIntegrated, strainTones, type StrainTones } from '../tones/strain-tone';
import { toneName } from '../tones/tone';

/** One run, and the one mode of it that is followed. */
export interface FollowedRun {
  readonly waveform: Waveform;
  readonly tones: StrainTones;
  /** The mode whose peak is the peak of the waveform (rule 2.10). */
  readonly peakTones: StrainTones;
  readonly startM: number;
  /** The mode was made up by the mirror rule and nobody said that it may be. */
  readonly mirrored: boolean;
}

export interface Followed {
  readonly runs: readonly FollowedRun[];
  /** Null for strain along one line of sight. */
  readonly mode: ModeIndex | null;
  readonly severalModes: boolean;
  /** ω₀ in rad/M for |m| = 2, one for all runs; null where nothing was integrated. */
  readonly floor: number | null;
  /** Where the first of the runs ends. */
  readonly endM: number;
}

function recordOf(waveform: Waveform): RadiationRecord | Finding {
  const shaped = asModes(waveform);
  if ('code' in shaped) return shaped;
  const record = radiationRecord(shaped);
  return 'saw' in record ? stop('engine/no-signal', waveform.name, `No mode can be followed in ${record.saw}.`, record.fix) : record;
}

const houseMode: ModeIndex = [2, 2];

interface Choice {
  readonly mode: ModeIndex;
  readonly floor: number | null;
  readonly declared: DeclaredSettings;
}

const startOf = (declared: DeclaredSettings, waveform: Waveform, record: RadiationRecord): number => declared.startM ?? waveform.junkEndM ?? record.axis[0]!;

function follow(waveform: Waveform, record: RadiationRecord, { mode, floor, declared }: Choice): FollowedRun | Finding {
  const { name } = waveform;
  const tones = strainTones(record, mode, floor);
  if (tones === null) return stop('engine/modes-missing', name, `The claim follows ${toneName({ mode })}, which ${name} does not hold.`, 'Supply the mode, or name one that all runs hold in modes.');
  const peakTones = strainTones(record, houseMode, floor) ?? tones;
  return { waveform, tones, peakTones, startM: startOf(declared, waveform, record), mirrored: mode[1] < 0 && completeModes(waveform).mirrorAssumed };
}

/**
 * Takes one mode out of every run: the first of `modes`, else the dominant one of the run that leads (the finest, or the farthest out).
 * Shape:  parallel to the waveforms.
 * Units:  as FollowedRun.
 * Error:  see strainTones.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md section 6 and rules 2.9, 2.10.
 */
export function followRuns(waveforms: readonly Waveform[], leader: Waveform, declared: DeclaredSettings): Followed | Finding {
  const records = new Map<Waveform, RadiationRecord>();
  for (const waveform of waveforms) {
    const record = recordOf(waveform);
    if ('code' in record) return record;
    records.set(waveform, record);
  }
  const leading = records.get(leader)!;
  const loudest = dominantMode(leading.modes);
  const listed = declared.modes === 'all' ? undefined : declared.modes?.[0];
  const sighted = leader.content.kind !== 'modes';
  const mode = sighted ? ALONG : (listed ?? (loudest ? ([loudest.l, loudest.m] as const) : ALONG));
  const floor = isIntegrated(leading) ? (declared.integrationFloor ?? defaultFloor(leading, startOf(declared, leader, leading))) : null;
  if (isIntegrated(leading) && floor === null) return stop('engine/no-signal', leader.name, `The phase of the dominant mode of ${leader.name} does not move, so there is no frequency from which to integrate.`, 'Declare integrationFloor.');
  const runs: FollowedRun[] = [];
  for (const [waveform, record] of records) {
    const run = follow(waveform, record, { mode, floor, declared });
    if ('code' in run) return run;
    runs.push(run);
  }
  const endM = Math.min(...[...records.values()].map(({ axis }) => axis[axis.length - 1]!));
  return { runs, mode: sighted ? null : mode, severalModes: leader.content.kind === 'modes' && leader.content.modes.length > 1, floor, endM };
}
