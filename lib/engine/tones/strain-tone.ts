import type { ModeIndex } from '../contract/settings';
import { coarserSamples, houseSamples, radiationOnSamples, type SampleNumerics } from '../radiation/news-on-samples';
import { radiationOnPanels } from '../radiation/news-on-panels';
import { divisionsTo, type RadiationRecord } from '../radiation/radiation-record';
import { toneOfMode, type Tone } from './tone';

/** H of one mode as each route has it: strain as it stands, news and ψ4 integrated with the floor (rule 2.9). */
export interface StrainTones {
  readonly A: Tone;
  readonly B: Tone;
  /** Route A with its knobs turned down; the same as A where nothing was integrated. */
  readonly coarse: Tone;
  /** ω₀ in rad/M for |m| = 2; null where nothing was integrated. */
  readonly floor: number | null;
}

/** Is H integrated from this record, or there as it stands? */
export const isIntegrated = (record: RadiationRecord): boolean => divisionsTo(record.variable, true) > 0;

function onSamples(record: RadiationRecord, floor: number, numerics: SampleNumerics, mode: ModeIndex): Tone {
  const { axis, isEven, strain } = radiationOnSamples(record, floor, numerics, true);
  const { re, im } = strain![0]!;
  return { axis, re, im, isEven, mode };
}

/**
 * H of one mode by both routes. Route A divides in frequency on a uniform grid; route B integrates
 * splines in time with the closed-form kernel and reads H at the file's own samples.
 * Shape:  three tones; null when the record has no such mode.
 * Units:  floor in rad/M for |m| = 2; H in r·h/M.
 * Error:  see radiationOnSamples and radiationOnPanels.
 * Fails:  null.
 * Source: settings.md rules 2.1 and 2.9.
 */
export function strainTones(record: RadiationRecord, mode: ModeIndex, floor: number | null): StrainTones | null {
  const given = toneOfMode(record, mode);
  if (given === null) return null;
  if (floor === null || !isIntegrated(record)) return { A: given, B: given, coarse: given, floor: null };
  const own = { ...record, modes: record.modes.filter(({ l, m }) => l === mode[0] && m === mode[1]) };
  const [series] = radiationOnPanels(own, own.axis[0]!, floor, true).modes;
  const { re, im } = series!.strain!(own.axis);
  return { A: onSamples(own, floor, houseSamples, mode), B: { ...given, re, im }, coarse: onSamples(own, floor, coarserSamples, mode), floor };
}
