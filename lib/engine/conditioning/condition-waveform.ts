import type { ModeIndex } from '@/lib/engine/contract/settings';
import type { Mode, Waveform } from '@/lib/engine/contract/waveform';
import { completeModes, type NegativeM } from './complete-modes';
import { peakModulus } from './dominant-mode';
import { selectModes } from './select-modes';
import { measureTaper, type TaperMeasure } from './taper-window';

/** One waveform of a claim, completed once; its modes in use and its taper by setting. */
export interface ConditionedWaveform {
  readonly given: Waveform;
  readonly whole: Waveform;
  readonly negativeM: NegativeM;
  readonly mirrorAssumed: boolean;
  readonly used: (lMax: number | null) => Waveform;
  readonly missing: readonly ModeIndex[];
  readonly taper: (taper: 'auto' | 'none' | number, lMax: number | null) => TaperMeasure;
  /** Largest sampled modulus of a mode (or of the columns). */
  readonly peakOf: (mode: Mode) => number;
}

/**
 * Completes a waveform's modes and holds what the points of one claim share.
 * Shape:  `used` returns the same object for the same lMax, so that spectra can be kept by it.
 * Units:  the file's own.
 * Error:  none.
 * Fails:  never.
 * Source: settings.md rules 2.3 and 2.4.
 */
export function conditionWaveform(given: Waveform, modes: 'all' | readonly ModeIndex[]): ConditionedWaveform {
  const { waveform: whole, negativeM, mirrorAssumed } = completeModes(given);
  const selected = new Map<number | null, Waveform>();
  const tapers = new Map<string, TaperMeasure>();
  const peaks = new Map<Mode, number>();
  const used = (lMax: number | null): Waveform => {
    const known = selected.get(lMax);
    if (known) return known;
    const made = selectModes(whole, { modes, lMax, withZeroM: false }).waveform;
    selected.set(lMax, made);
    return made;
  };
  const taper = (setting: 'auto' | 'none' | number, lMax: number | null): TaperMeasure => {
    const key = `${setting}|${lMax}`;
    const known = tapers.get(key);
    if (known) return known;
    const made = measureTaper(used(lMax), whole, setting);
    tapers.set(key, made);
    return made;
  };
  const peakOf = (mode: Mode): number => {
    const known = peaks.get(mode);
    if (known !== undefined) return known;
    const made = peakModulus(mode.re, mode.im);
    peaks.set(mode, made);
    return made;
  };
  return {
    given,
    whole,
    negativeM,
    mirrorAssumed,
    used,
    missing: selectModes(whole, { modes, lMax: null, withZeroM: false }).missing,
    taper,
    peakOf,
  };
}
