/**
 * Tones: one mode by itself, followed in amplitude and phase. Everything here works in units of the
 * total mass M on one complex series (house rotation: H ∝ e^{−iφ}, φ increasing). Two routes evaluate
 * each definition of settings.md sections 5 and 6: route A on the samples (unwrapped phase, logarithm,
 * local polynomials), route B on splines of the real and imaginary part and Gauss panels, where phase
 * and growth come from Ḣ/H or from the product of two series, without unwrapping samples.
 */
import type { ModeIndex } from '../contract/settings';
import type { RadiationRecord } from '../radiation/radiation-record';

/** One complex series against t/M. */
export interface Tone {
  readonly axis: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
  readonly isEven: boolean;
  /** (ℓ, m); null for strain along one line of sight. */
  readonly mode: ModeIndex | null;
}

export const toneName = ({ mode }: Pick<Tone, 'mode'>): string => (mode === null ? 'the strain along the line of sight' : `the (${mode[0]},${mode[1]}) mode`);

/** The mode of a record by its indices. */
export function toneOfMode(record: RadiationRecord, [l, m]: ModeIndex): Tone | null {
  const found = record.modes.find((mode) => mode.l === l && mode.m === m);
  return found === undefined ? null : { axis: record.axis, re: found.re, im: found.im, isEven: record.step !== null, mode: [l, m] };
}

/**
 * The part of a tone between two times, with some samples more on either side.
 * Shape:  views of the same samples, at least two of them.
 * Units:  times in M.
 * Error:  none.
 * Fails:  never; times outside the record give its ends.
 * Source: definition.
 */
export function stretchOf(tone: Tone, from: number, to: number, margin: number): Tone {
  const { axis } = tone;
  const n = axis.length;
  let first = 0;
  while (first < n - 2 && axis[first + 1]! <= from) first++;
  let last = first + 1;
  while (last < n - 1 && axis[last]! < to) last++;
  const [i, j] = [Math.max(0, first - margin), Math.min(n, last + 1 + margin)];
  return { ...tone, axis: axis.subarray(i, j), re: tone.re.subarray(i, j), im: tone.im.subarray(i, j) };
}

/** Every second sample: what a record of twice the step would have shown. */
export function thinned(tone: Tone): Tone {
  const half = (values: Float64Array): Float64Array => values.filter((_, i) => i % 2 === 0);
  return { ...tone, axis: half(tone.axis), re: half(tone.re), im: half(tone.im) };
}

/**
 * Samples from one time to another; the whole tone when that is all of it.
 * Shape:  views of the same samples.
 * Units:  times in M.
 * Error:  none.
 * Fails:  never.
 * Source: definition.
 */
export function within(tone: Tone, from: number, to: number): Tone {
  const { axis } = tone;
  if (from <= axis[0]! && to >= axis[axis.length - 1]!) return tone;
  const part = stretchOf(tone, from, to, 0);
  const skip = part.axis[0]! < from ? 1 : 0;
  const end = part.axis[part.axis.length - 1]! > to ? part.axis.length - 1 : part.axis.length;
  return { ...part, axis: part.axis.subarray(skip, end), re: part.re.subarray(skip, end), im: part.im.subarray(skip, end) };
}
