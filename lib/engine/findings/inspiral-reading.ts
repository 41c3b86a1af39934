import type { RadiationRecord } from '../radiation/radiation-record';

/** (2,2) read in the inspiral, where its amplitude and frequency must fit together. */
export interface InspiralReading {
  /** Orbital frequency Ω = ω₂₂/2, in rad/M. */
  readonly omega: number;
  readonly atM: number;
  readonly amplitude: number;
  /** Chirp mass over M, from Ω and its rate at leading order. */
  readonly chirpMass: number;
}

/** Orbital frequencies at which it is read, the best first: late enough for a rate, early enough for leading order. */
const FREQUENCIES = [0.03, 0.025, 0.035, 0.04, 0.02, 0.015] as const;
/** Cycles of (2,2) on either side over which Ω and its rate are fitted. */
const HALF_CYCLES = 1.5;

interface Track {
  readonly axis: Float64Array;
  readonly phase: Float64Array;
  readonly last: number;
}

/** Unwrapped phase up to the largest sample. */
function trackOf({ axis, modes }: RadiationRecord): { readonly track: Track; readonly size: (i: number) => number } | null {
  const mode = modes.find(({ l, m }) => l === 2 && m === 2);
  if (mode === undefined) return null;
  const { re, im } = mode;
  const phase = new Float64Array(axis.length);
  let [top, last] = [0, 0];
  for (let i = 0; i < axis.length; i++) {
    const size = re[i]! * re[i]! + im[i]! * im[i]!;
    if (size > top) [top, last] = [size, i];
    if (i > 0) phase[i] = phase[i - 1]! + Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!);
  }
  return { track: { axis, phase, last }, size: (i) => Math.hypot(re[i]!, im[i]!) };
}

/** First sample at which the mean frequency of the cycle before it has passed 2Ω; −1 where it is passed at once or never. */
function reaching({ axis, phase, last }: Track, omega: number): number {
  let from = 0;
  for (let i = 1; i <= last; i++) {
    while (Math.abs(phase[i]! - phase[from + 1]!) >= 2 * Math.PI && from + 1 < i) from++;
    if (Math.abs(phase[i]! - phase[from]!) < 2 * Math.PI) continue;
    if (Math.abs(phase[i]! - phase[from]!) / (axis[i]! - axis[from]!) >= 2 * omega) return from === 0 ? -1 : from + ((i - from) >> 1);
  }
  return -1;
}

/** Parabola through the phase around sample i: Ω and Ω̇ there. */
function rateAt({ axis, phase, last }: Track, i: number): { readonly omega: number; readonly rate: number } | null {
  const reach = 2 * Math.PI * HALF_CYCLES;
  let [from, to] = [i, i];
  while (from > 0 && Math.abs(phase[i]! - phase[from]!) < reach) from--;
  while (to < last && Math.abs(phase[to]! - phase[i]!) < reach) to++;
  if (Math.abs(phase[i]! - phase[from]!) < reach || Math.abs(phase[to]! - phase[i]!) < reach || to - from < 12) return null;
  const scale = axis[to]! - axis[from]!;
  const s = [0, 0, 0, 0, 0];
  const r = [0, 0, 0];
  for (let k = from; k <= to; k++) {
    const [x, y] = [(axis[k]! - axis[i]!) / scale, phase[k]! - phase[i]!];
    let power = 1;
    for (let p = 0; p < 5; p++, power *= x) {
      s[p] = s[p]! + power;
      if (p < 3) r[p] = r[p]! + y * power;
    }
  }
  const [s0, s1, s2, s3, s4] = s as [number, number, number, number, number];
  const [r0, r1, r2] = r as [number, number, number];
  const det = s0 * (s2 * s4 - s3 * s3) - s1 * (s1 * s4 - s3 * s2) + s2 * (s1 * s3 - s2 * s2);
  const slope = (s0 * (r1 * s4 - s3 * r2) - r0 * (s1 * s4 - s3 * s2) + s2 * (s1 * r2 - r1 * s2)) / det;
  const bend = (s0 * (s2 * r2 - r1 * s3) - s1 * (s1 * r2 - r1 * s2) + r0 * (s1 * s3 - s2 * s2)) / det;
  const sense = Math.sign(slope);
  return { omega: (sense * slope) / scale / 2, rate: (sense * bend) / scale ** 2 };
}

/** Mean amplitude over the samples within half a cycle of sample i. */
function amplitudeAt({ phase, last }: Track, size: (i: number) => number, i: number): number {
  let [sum, n] = [0, 0];
  for (let k = i; k >= 0 && Math.abs(phase[k]! - phase[i]!) <= Math.PI; k--) [sum, n] = [sum + size(k), n + 1];
  for (let k = i + 1; k <= last && Math.abs(phase[k]! - phase[i]!) <= Math.PI; k++) [sum, n] = [sum + size(k), n + 1];
  return sum / n;
}

/** Null without (2,2) or where the record does not sweep through such a frequency. Linear in the samples. */
export function readInspiral(record: RadiationRecord): InspiralReading | null {
  const found = trackOf(record);
  if (found === null) return null;
  for (const wanted of FREQUENCIES) {
    const i = reaching(found.track, wanted);
    const here = i < 0 ? null : rateAt(found.track, i);
    if (here === null || !(here.omega > 0 && here.rate > 0)) continue;
    const { omega, rate } = here;
    const chirpMass = ((5 / 96) * rate * omega ** (-11 / 3)) ** 0.6;
    return { omega, atM: record.axis[i]!, amplitude: amplitudeAt(found.track, found.size, i), chirpMass };
  }
  return null;
}
