import { dominantMode } from '../conditioning/dominant-mode';
import type { Finding } from '../contract/finding';
import type { Mode } from '../contract/waveform';
import { lateDecay, type LateDecay } from './late-decay';
import { modeName, percent, scientific, short } from './spelt';

/** V11 asks for so many damping times after the peak. */
const DAMPING_TIMES = 5;
/** A record that ends lower than this has said what it had to say, however it came down. */
const OVER = 2e-3;

/** What the power at the end would still have carried, over what the whole record did. */
function shareBeyond(axis: Float64Array, { re, im }: Mode, rate: number): number {
  const n = axis.length;
  let total = 0;
  const power = (i: number): number => re[i]! * re[i]! + im[i]! * im[i]!;
  for (let i = 1; i < n; i++) total += ((axis[i]! - axis[i - 1]!) * (power(i) + power(i - 1))) / 2;
  return power(n - 1) / (2 * rate) / total;
}

function shortRecord(axis: Float64Array, mode: Mode, { peakIndex, endShare, rate }: LateDecay, name: string): Finding[] {
  const after = axis[axis.length - 1]! - axis[peakIndex]!;
  if (!(endShare > OVER) || (rate !== null && after * rate >= DAMPING_TIMES)) return [];
  const times = rate === null ? '' : ` (${short(after * rate, 2)} damping times)`;
  const missing = rate === null ? '' : `; about ${percent(shareBeyond(axis, mode, rate), 1)} of its power lies beyond`;
  return [
    {
      code: 'engine/short-ringdown',
      level: 'worth-a-look',
      where: name,
      text: `${name} stops ${short(after)} M${times} after its flux peaks, where the flux amplitude of ${modeName(mode)} is still ${percent(endShare)} of its largest${missing}.`,
      fix: 'Supply the record to five damping times after the peak.',
    },
  ];
}

function noiseFloor(mode: Mode, { floor }: LateDecay, name: string): Finding[] {
  if (floor === null) return [];
  return [
    {
      code: 'engine/noise-floor',
      level: 'note',
      where: name,
      text: `${modeName(mode)} of ${name} stops decaying at ${scientific(floor.share)} of its peak, from about t = ${short(floor.at, 5)} M on: what follows is noise, and it is integrated too.`,
      fix: 'Cut the record there, or say why the floor does no harm.',
    },
  ];
}

/** V11 and V12 for what is integrated to the end of the record: Ḣ of the modes in use, in M. */
export function lateFindings(axis: Float64Array, news: readonly Mode[], name: string): Finding[] {
  const mode = dominantMode(news);
  const decay = mode && lateDecay(axis, mode.re, mode.im);
  return mode && decay ? [...shortRecord(axis, mode, decay, name), ...noiseFloor(mode, decay, name)] : [];
}
