import type { Finding } from '../contract/finding';
import type { Waveform } from '../contract/waveform';
import { radiationRecord, type RadiationRecord } from '../radiation/radiation-record';
import { stop } from '../tones/measure-tones';

/** φ₂ against t/M, in the place of Ḣ. */
export interface Phi2Record {
  readonly record: RadiationRecord;
  /** L over the flux that `radiation` gives for the same modes as Ḣ (1/16π of their squares). */
  readonly overFlux: number;
}

/** 16π times 1/4π for n = (t̂ − r̂)/√2, times 1/2π for n = (t̂ − r̂)/2. */
const OVER_FLUX = { symmetric: 4, kinnersley: 8 } as const;

/**
 * The modes of r·φ₂ as they stand in the file, under the name of a series that nothing is done to before
 * it is squared.
 * Shape:  all modes given; none is mirrored.
 * Units:  t in M, rφ₂ with B̂ in it or per B̂.
 * Error:  rounding.
 * Fails:  with the finding that stops: no modes, or none that holds a signal.
 * Source: settings.md section 7; domain reference Q23.
 */
export function phi2Record(waveform: Waveform): Phi2Record | Finding {
  const { name, content } = waveform;
  if (content.kind !== 'modes') return stop('engine/no-signal', name, `${name} holds no modes of φ₂.`, 'Supply the modes of φ₂: what is emitted is a sum over all directions.');
  const record = radiationRecord({ ...waveform, variable: 'news', amplitudeUnit: 'rh/M' });
  if ('saw' in record) return stop('engine/no-signal', name, `No electromagnetic energy can be computed from ${record.saw}.`, 'Supply r φ₂ against t/M.');
  const isSilent = record.modes.every(({ re, im }) => re.every((x) => x === 0) && im.every((x) => x === 0));
  if (isSilent) return stop('engine/no-signal', name, `None of the modes of ${name} holds a signal.`, 'Supply modes of φ₂ that are not zero.');
  return { record, overFlux: OVER_FLUX[waveform.tetrad ?? 'symmetric'] };
}
