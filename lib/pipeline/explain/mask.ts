import type { Waveform } from '@/lib/engine/contract/waveform';
import type { Mask } from '@/lib/explain/read-otherwise';

/** Share of the stretch that each edge takes to fall: an edge of one sample would ring over the whole band. */
const EDGE = 0.1;

/** 1 outside, 0 inside, cos² between; the edges lie within the stretch, so that nothing outside is touched. */
function weights(axis: Float64Array, { from, to }: Mask): Float64Array {
  const edge = EDGE * to - EDGE * from;
  return axis.map((t) => {
    const inside = Math.min(t - from, to - t) / edge;
    return inside <= 0 ? 1 : inside >= 1 ? 0 : Math.cos((Math.PI / 2) * inside) ** 2;
  });
}

/** Does the stretch hold a sample of this record? */
export const reaches = ({ domain, axis }: Waveform, { from, to }: Mask): boolean => domain === 'time' && axis.some((t) => t > from && t < to);

/** The record with one stretch of its own time taken out; a record in frequency has none and stays. */
export function masked(waveform: Waveform, mask: Mask): Waveform {
  if (!reaches(waveform, mask)) return waveform;
  const w = weights(waveform.axis, mask);
  const times = (x: Float64Array): Float64Array => x.map((y, i) => y * (w[i] ?? 1));
  const { content } = waveform;
  if (content.kind === 'modes') return { ...waveform, content: { ...content, modes: content.modes.map((mode) => ({ ...mode, re: times(mode.re), im: times(mode.im) })) } };
  return { ...waveform, content: { ...content, plus: times(content.plus), cross: content.cross === null ? null : times(content.cross) } };
}
