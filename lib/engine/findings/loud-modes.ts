import { peakModulus } from '../conditioning/dominant-mode';
import type { Mode } from '../contract/waveform';

export interface LoudMode {
  readonly mode: Mode;
  readonly peak: number;
}

/** Peaks of samples are asked for by several findings of one claim, and by several claims of one sheet. */
const known = new WeakMap<Float64Array, { readonly im: Float64Array; readonly peak: number }>();

export function peakOf({ re, im }: Mode): number {
  const found = known.get(re);
  if (found?.im === im) return found.peak;
  const peak = peakModulus(re, im);
  known.set(re, { im, peak });
  return peak;
}

/** Modes whose peak is at least this share of the loudest one's. */
export function loudModes(modes: readonly Mode[], share: number): LoudMode[] {
  const all = modes.map((mode) => ({ mode, peak: peakOf(mode) }));
  const top = Math.max(0, ...all.map(({ peak }) => peak));
  return all.filter(({ peak }) => peak > 0 && peak >= share * top);
}
