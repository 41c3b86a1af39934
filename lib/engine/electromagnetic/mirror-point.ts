import { completeModes } from '../conditioning/complete-modes';
import type { Finding } from '../contract/finding';
import { mirroringWindow } from '../contract/house-values';
import type { MeasureRequest } from '../contract/quantity';
import type { ModeIndex } from '../contract/settings';
import type { Waveform } from '../contract/waveform';
import { radiationRecord, type RadiationRecord } from '../radiation/radiation-record';
import { isFinding, stop } from '../tones/measure-tones';
import { peakOnSamples, peakOnSplines } from '../tones/peak';
import { toneName, toneOfMode, type Tone } from '../tones/tone';
import { curvatureTones, type CurvatureTones } from './curvature-tone';
import type { MirrorWindow } from './mirror-by-routes';
import { phi2Record } from './phi2-record';

const houseMode: ModeIndex = [2, 2];

/** One mode of both files, and the modes whose peaks are laid over each other. */
export interface MirrorPoint {
  readonly em: Tone;
  readonly gw: CurvatureTones;
  readonly peakEm: Tone;
  readonly peakGw: CurvatureTones;
  readonly mode: ModeIndex;
  readonly severalModes: boolean;
  readonly windowM: readonly [number, number];
  readonly emWaveform: Waveform;
  readonly gwWaveform: Waveform;
  /** The gravitational mode was made up by the mirror rule and nobody said that it may be. */
  readonly mirrored: boolean;
}

interface Records {
  readonly em: RadiationRecord;
  readonly gw: RadiationRecord;
}

const missing = (name: string, mode: ModeIndex): Finding => stop('engine/modes-missing', name, `The claim compares ${toneName({ mode })}, which ${name} does not hold.`, 'Supply the mode, or name one that both files hold in modes.');

function recordsOf(em: Waveform, gw: Waveform): Records | Finding {
  const light = phi2Record(em);
  if (isFinding(light)) return light;
  const waves = radiationRecord(completeModes(gw).waveform);
  if ('saw' in waves) return stop('engine/no-signal', gw.name, `φ₂ cannot be compared with ${waves.saw}.`, waves.fix);
  return { em: light.record, gw: waves };
}

/** Rule 2.10: the peak is that of (2,2) where both files hold it, else of the mode that is compared. */
function peakTones({ em, gw }: Records, own: { readonly em: Tone; readonly gw: CurvatureTones }): { readonly em: Tone; readonly gw: CurvatureTones } {
  const [light, waves] = [toneOfMode(em, houseMode), curvatureTones(gw, houseMode)];
  return light === null || waves === null ? own : { em: light, gw: waves };
}

/**
 * Takes one mode out of both files.
 * Shape:  one point.
 * Units:  as MirrorPoint.
 * Error:  none.
 * Fails:  with the finding that stops the claim.
 * Source: settings.md section 7.
 */
export function mirrorPoint(request: MeasureRequest): MirrorPoint | Finding {
  const { em, gw } = request.inputs.of;
  if (em === undefined || gw === undefined) return stop('engine/no-signal', request.claimId, 'The claim does not name both waveforms.', 'Name them as "em" and "gw" in `of`.');
  const records = recordsOf(em, gw);
  if (isFinding(records)) return records;
  const { modes, window } = request.settings;
  const mode = (modes === 'all' ? undefined : modes?.[0]) ?? houseMode;
  const [light, waves] = [toneOfMode(records.em, mode), curvatureTones(records.gw, mode)];
  if (light === null) return missing(em.name, mode);
  if (waves === null) return missing(gw.name, mode);
  const peaks = peakTones(records, { em: light, gw: waves });
  return {
    em: light, gw: waves, peakEm: peaks.em, peakGw: peaks.gw, mode, windowM: window ?? mirroringWindow,
    severalModes: records.em.modes.length > 1,
    emWaveform: em, gwWaveform: gw, mirrored: mode[1] < 0 && completeModes(gw).mirrorAssumed,
  };
}

const noPeak = (name: string): Finding => stop('engine/no-signal', name, `The amplitude of ${name} has no maximum inside the record, so there is no peak by which to lay the two over each other.`, 'Supply a record that reaches past the merger.');

export interface MirrorPeaks {
  readonly em: number | null;
  readonly gw: number | null;
}

/** Peaks of both as route A has them; by the five-sample parabola when its own error is asked for. */
export const peaksOnSamples = ({ peakEm, peakGw }: MirrorPoint, by: 'polynomial' | 'parabola' = 'polynomial'): MirrorPeaks => ({ em: peakOnSamples(peakEm, by), gw: peakOnSamples(peakGw.A, by) });

export const peaksOnSplines = ({ peakEm, peakGw }: MirrorPoint): MirrorPeaks => ({ em: peakOnSplines(peakEm), gw: peakOnSplines(peakGw.B) });

/** The window on ψ₄'s times, as far as both records reach, or why there is none. */
export function mirrorWindow(point: MirrorPoint, peaks: MirrorPeaks): (MirrorWindow & { readonly peakM: number; readonly cut: boolean }) | Finding {
  if (peaks.em === null) return noPeak(point.emWaveform.name);
  if (peaks.gw === null) return noPeak(point.gwWaveform.name);
  const [t1, t2] = point.windowM;
  const shiftM = peaks.em - peaks.gw;
  const [light, waves] = [point.em.axis, point.gw.A.axis];
  const from = Math.max(peaks.gw + t1, waves[0]!, light[0]! - shiftM);
  const to = Math.min(peaks.gw + t2, waves[waves.length - 1]!, light[light.length - 1]! - shiftM);
  const whole = t2 - t1;
  if (to - from >= whole / 2) return { from, to, shiftM, peakM: peaks.gw, cut: to - from < whole * (1 - 1e-9) };
  const names = `${point.emWaveform.name} and ${point.gwWaveform.name}`;
  return stop('engine/no-signal', names, `After their peaks are laid over each other ${names} share less than half of the window from ${t1} to ${t2} M around the peak.`, 'Declare a window inside both records, or supply longer ones.');
}
