import type { Finding } from '../contract/finding';
import { short } from '../findings/spelt';
import { toneSampling } from '../tones/tone-findings';
import { toneName } from '../tones/tone';
import type { PairPoint, PairResult, PairSide } from './pair-point';

function madeUp({ waveform: { name }, mirrored }: PairSide, { mode }: PairPoint): Finding[] {
  if (!mirrored) return [];
  return [{ code: 'engine/negative-m-assumed', level: 'needs-answer', where: name, text: `In ${name} ${toneName({ mode })} is absent and the sheet does not say why. We use H(ℓ,−m) = (−1)^ℓ H*(ℓ,m), which holds for a system symmetric about its orbital plane.`, fix: 'Declare negativeM: mirror, given or none.' }];
}

function degenerate({ a, b }: PairPoint, { aligned }: PairResult): Finding[] {
  if (!aligned.degenerate) return [];
  const [from, to] = aligned.window;
  return [{ code: 'engine/alignment-degenerate', level: 'worth-a-look', where: `${a.waveform.name}, ${b.waveform.name}`, text: `Between ${short(from)} and ${short(to)} M the frequency of ${b.waveform.name} hardly changes, so a shift of time cannot be told from a constant phase. The smallest shift is used, ${short(aligned.timeShiftM)} M.`, fix: 'Declare a window in which the frequency changes, or alignment: peak.' }];
}

/**
 * What a pair shows beside its number: V04, V14 and an alignment that the data do not fix.
 * Shape:  a list, empty when there is nothing to say.
 * Units:  M.
 * Error:  none: thresholds only.
 * Fails:  never.
 * Source: domain reference 4.3; settings.md sections 6 and 8.
 */
export const pairFindings = (point: PairPoint, result: PairResult): Finding[] => [
  ...[point.a, point.b].flatMap((side) => [...madeUp(side, point), ...toneSampling({ ...side.tones.B, mode: point.mode }, side.waveform.name)]),
  ...degenerate(point, result),
];
