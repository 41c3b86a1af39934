import type { Finding } from '../contract/finding';
import type { Mode } from '../contract/waveform';
import { lateDecay } from './late-decay';
import { loudModes } from './loud-modes';
import { modeName, percent, short } from './spelt';

/** V10 asks for more than this of the peak. */
const SHARE = 0.01;
/** Quieter modes carry nothing that a number would show. */
const LOUD = 0.05;
/** The last part of the record after the peak. */
const TAIL = 0.25;

interface Offset {
  readonly size: number;
  readonly spread: number;
}

/** Mean of a complex series from one time to the end, and how far the samples scatter about it. */
function offsetFrom(axis: Float64Array, { re, im }: Mode, from: number): Offset {
  let [weight, x, y, square] = [0, 0, 0, 0];
  for (let i = 1; i < axis.length; i++) {
    if (axis[i - 1]! < from) continue;
    const step = axis[i]! - axis[i - 1]!;
    [weight, x, y, square] = [weight + step, x + step * re[i]!, y + step * im[i]!, square + step * (re[i]! ** 2 + im[i]! ** 2)];
  }
  const size = Math.hypot(x, y) / weight;
  return { size, spread: Math.sqrt(Math.max(0, square / weight - size * size)) };
}

/**
 * V10: a strain that does not come back to zero after the ringdown. Modes with m = 0 may keep a
 * memory and are left out. `integrated` says that we integrated it ourselves.
 */
export function driftFindings(axis: Float64Array, unit: string, modes: readonly Mode[], name: string, integrated = false): Finding[] {
  const drifting = loudModes(modes.filter(({ m }) => m > 0), LOUD).flatMap(({ mode, peak }) => {
    const decay = lateDecay(axis, mode.re, mode.im);
    if (decay?.turning == null) return [];
    const [peakAt, end] = [axis[decay.peakIndex]!, axis[axis.length - 1]!];
    const from = end - TAIL * (end - peakAt);
    if (!((end - from) * decay.turning > 2 * Math.PI)) return [];
    const { size, spread } = offsetFrom(axis, mode, from);
    return size > SHARE * peak && size > spread ? [{ mode, size, share: size / peak, from }] : [];
  });
  const worst = drifting.reduce<(typeof drifting)[number] | null>((p, q) => (p === null || q.share > p.share ? q : p), null);
  if (worst === null) return [];
  const more = drifting.length > 1 ? ` So do ${drifting.length - 1} more modes, by less.` : '';
  return [
    {
      code: 'engine/drift',
      level: 'worth-a-look',
      where: name,
      text: `The strain ${modeName(worst.mode)} of ${name}${integrated ? ', as we integrate it,' : ''} ends at ${short(worst.size, 2)} instead of 0 (mean from t = ${short(worst.from, 6)} ${unit} on, ${percent(worst.share)} of its peak): integration drift.${more}`,
      fix: integrated ? 'Raise integrationFloor towards the lowest frequency of the signal.' : 'Supply ψ₄ or news, which we integrate with a floor in frequency, or remove the drift.',
    },
  ];
}
