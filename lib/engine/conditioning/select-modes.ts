import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';

export interface ModeChoice {
  readonly modes: 'all' | readonly ModeIndex[];
  readonly lMax: number | null;
  /** Does "all" contain m = 0 (time integrals), or not (detectors)? Rule 2.3. */
  readonly withZeroM: boolean;
}

export interface SelectedModes {
  readonly waveform: Waveform;
  /** Listed, but not in the file (after completion). */
  readonly missing: readonly ModeIndex[];
}

const isListed = (mode: Mode, list: readonly ModeIndex[]): boolean => list.some(([l, m]) => l === mode.l && m === mode.m);

/**
 * Restricts a completed mode set to the modes in use.
 * Shape:  returns a waveform with the same axis and fewer modes; line-of-sight content is unchanged.
 * Units:  those of the file.
 * Error:  none.
 * Fails:  never; an empty set is left for the caller to stop on.
 * Source: rule 2.3.
 */
export function selectModes(waveform: Waveform, choice: ModeChoice): SelectedModes {
  const { content } = waveform;
  if (content.kind !== 'modes') return { waveform, missing: [] };
  const { modes: wanted, lMax } = choice;
  const chosen =
    wanted === 'all'
      ? content.modes.filter((mode) => choice.withZeroM || mode.m !== 0)
      : content.modes.filter((mode) => isListed(mode, wanted));
  const modes = chosen.filter((mode) => lMax === null || mode.l <= lMax);
  const missing = wanted === 'all' ? [] : wanted.filter(([l, m]) => !content.modes.some((mode) => mode.l === l && mode.m === m));
  return { waveform: { ...waveform, content: { kind: 'modes', modes } }, missing };
}
