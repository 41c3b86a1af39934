/**
 * Conditioning: what is done to a parsed waveform before any number is taken from it. Modes are
 * completed and restricted (rule 2.3), the dominant one is found, and the taper is fixed as a
 * few times (rule 2.4). Both routes take these definitions; neither takes the other's samples.
 */
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';

export type NegativeM = 'mirror' | 'given' | 'none';

export interface CompletedModes {
  readonly waveform: Waveform;
  readonly negativeM: NegativeM;
  /** True when the sheet did not say and partners were made up by the mirror rule. */
  readonly mirrorAssumed: boolean;
}

/** H_{l,−m} = (−1)^l H*_{lm}. In the frequency domain that is content at −f, and marked so. */
function mirrored(mode: Mode, frequencyDomain: boolean): Mode {
  const sign = mode.l % 2 === 0 ? 1 : -1;
  const re = mode.re.map((x) => sign * x);
  const im = mode.im.map((x) => -sign * x);
  const base = { l: mode.l, m: -mode.m, re, im };
  return frequencyDomain ? { ...base, atNegativeFrequencies: true } : base;
}

function withPartners(modes: readonly Mode[], frequencyDomain: boolean): Mode[] {
  const present = new Set(modes.map((mode) => `${mode.l},${mode.m}`));
  const lone = modes.filter((mode) => mode.m > 0 && !present.has(`${mode.l},${-mode.m}`));
  return [...modes, ...lone.map((mode) => mirrored(mode, frequencyDomain))];
}

/**
 * Applies the sheet's word on modes with m < 0: use what is given, mirror, or drop them.
 * Shape:  line-of-sight content passes through unchanged.
 * Units:  those of the file.
 * Error:  none; signs only.
 * Fails:  never.
 * Source: reflection symmetry of a non-precessing binary about its orbital plane (common practice).
 */
export function completeModes(waveform: Waveform): CompletedModes {
  const { content } = waveform;
  if (content.kind !== 'modes') return { waveform, negativeM: 'given', mirrorAssumed: false };
  const anyNegative = content.modes.some((mode) => mode.m < 0);
  const negativeM = waveform.negativeM ?? (anyNegative ? 'given' : 'mirror');
  const anyPositive = content.modes.some((mode) => mode.m > 0);
  const mirrorAssumed = waveform.negativeM === null && negativeM === 'mirror' && anyPositive;
  if (negativeM === 'given') return { waveform, negativeM, mirrorAssumed };
  const modes =
    negativeM === 'none' ? content.modes.filter((mode) => mode.m >= 0) : withPartners(content.modes, waveform.domain === 'frequency');
  return { waveform: { ...waveform, content: { kind: 'modes', modes } }, negativeM, mirrorAssumed };
}
