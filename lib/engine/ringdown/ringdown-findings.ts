import type { Finding } from '../contract/finding';
import { short } from '../findings/spelt';
import { toneSampling } from '../tones/tone-findings';
import { toneName } from '../tones/tone';
import { lineOnSamples, type RingdownLine } from './line-on-samples';
import type { FitWindow, RingdownPoint } from './ringdown-point';

/** V11 asks for so many damping times after the peak. */
const DAMPING_TIMES = 5;
/** V12: a decay in the last quarter of the window slower than this share of the first half's is a floor. */
const STALLED = 0.5;

function shortRecord({ tones, settings, completed }: RingdownPoint, { peakM, to }: FitWindow, { gamma }: RingdownLine): Finding[] {
  const { name } = completed.waveform;
  const { axis } = tones.B;
  const last = axis[axis.length - 1]!;
  const times = (last - peakM) * gamma;
  const cut = to < peakM + settings.window[1] - 1e-9 * Math.abs(settings.window[1]);
  if (times >= DAMPING_TIMES && !cut) return [];
  const clipped = cut ? ` The fit ends there instead of ${short(settings.window[1])} M after the peak.` : '';
  return [{ code: 'engine/short-ringdown', level: 'worth-a-look', where: name, text: `${name} stops ${short(last - peakM)} M (${short(times, 2)} damping times) after the peak.${clipped}`, fix: 'Supply the record to five damping times after the peak, or declare a window inside it.' }];
}

function noiseFloor({ tones, completed }: RingdownPoint, { from, to, peakM }: FitWindow): Finding[] {
  const tone = tones.A;
  const early = lineOnSamples(tone, from, (from + to) / 2).gamma;
  const late = lineOnSamples(tone, to - (to - from) / 4, to).gamma;
  if (!(early > 0) || late >= STALLED * early) return [];
  return [{ code: 'engine/noise-floor', level: 'note', where: completed.waveform.name, text: `Towards the end of the window, ${short(to - peakM)} M after the peak, ${toneName(tone)} decays at ${short(late)}/M instead of the ${short(early)}/M of its first half: it no longer is one damped tone there.`, fix: 'Declare a window that ends earlier.' }];
}

function madeUp({ settings, completed }: RingdownPoint): Finding[] {
  if (settings.mode[1] >= 0 || !completed.mirrorAssumed) return [];
  const { name } = completed.waveform;
  return [{ code: 'engine/negative-m-assumed', level: 'needs-answer', where: name, text: `In ${name} ${toneName(settings)} is absent and the sheet does not say why. We use H(ℓ,−m) = (−1)^ℓ H*(ℓ,m), which holds for a system symmetric about its orbital plane.`, fix: 'Declare negativeM: mirror, given or none.' }];
}

/**
 * What the ringdown shows beside its number: V04, V11, V12, V14.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  M.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3; settings.md section 8.
 */
export const ringdownFindings = (point: RingdownPoint, window: FitWindow, line: RingdownLine): Finding[] => [
  ...madeUp(point),
  ...toneSampling(point.tones.B, point.completed.waveform.name),
  ...shortRecord(point, window, line),
  ...noiseFloor(point, window),
];
