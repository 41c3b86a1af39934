import type { Mode, Waveform } from '../contract/waveform';
import { MSUN_S } from '../units/constants';

/** One M in the unit of a waveform's own axis; null where its mass is not known, or it has no times. */
export function unitsPerM({ domain, unit, ownTotalMassMsun }: Waveform): number | null {
  if (domain !== 'time') return null;
  return unit === 'M' ? 1 : ownTotalMassMsun === null ? null : ownTotalMassMsun * MSUN_S;
}

/**
 * The record without what lies before a time on its own axis.
 * Shape:  the rest of every series.
 * Units:  those of the axis.
 * Error:  none.
 * Fails:  null where fewer than half of its samples would be left.
 * Source: domain reference 5.1 (E07).
 */
export function cutBefore(waveform: Waveform, time: number): Waveform | null {
  const { axis, content } = waveform;
  const from = axis.findIndex((t) => t >= time);
  if (from < 0 || from > axis.length / 2) return null;
  const rest = (values: Float64Array): Float64Array => values.subarray(from);
  const maybe = (values: Float64Array | null | undefined): Float64Array | null => (values ? rest(values) : null);
  if (content.kind === 'modes') {
    const modes = content.modes.map((mode): Mode => ({ ...mode, re: rest(mode.re), im: rest(mode.im) }));
    return { ...waveform, axis: rest(axis), content: { kind: 'modes', modes } };
  }
  return { ...waveform, axis: rest(axis), content: { kind: 'line-of-sight', plus: rest(content.plus), cross: maybe(content.cross) } };
}
