import type { RadiationRecord } from '../radiation/radiation-record';

/** (2,2) read in the inspiral, where its amplitude and frequency must fit together. */
export interface InspiralReading {
  /** Orbital frequency Ω = ω₂₂/2, in rad/M, averaged over five cycles of the wave around it. */
  readonly omega: number;
  readonly atM: number;
  readonly amplitude: number;
}

export interface Inspiral {
  /** At the best of a few frequencies; null where the record does not sweep through any. */
  readonly reading: InspiralReading | null;
  /** Chirp mass over M, from the rise of Ω at leading order; null where too little of it is there. */
  readonly chirpMass: number | null;
  /** ω₂₂ just before the largest sample, rad/M. */
  readonly peakOmega: number;
}

/** Orbital frequencies at which it is read, the best first: early enough for leading order. */
const FREQUENCIES = [0.03, 0.025, 0.035, 0.04, 0.02, 0.015] as const;
/** Means over so many cycles of the wave even out an eccentric orbit. */
const CYCLES = 5;
/** Around the place that is read, one turn of the ellipse on either side: more would take in too much of the rise. */
const NEAR_CYCLES = 2.4;
/** Leading order holds up to about this share of the frequency at the peak, whatever the unit of time. */
const EARLY = 0.25;
/** And Ω must rise by this between the first and the last mean. */
const LEAST_RISE = 1.15;
/** The start of a record may hold start-up radiation. */
const START = 0.05;

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

interface Mean {
  readonly omega: number;
  readonly t: number;
}

/** Mean Ω over the cycles that begin (step 1) or end (step −1) at sample i. */
function meanFrom({ axis, phase, last }: Track, i: number, step: 1 | -1, cycles = CYCLES): Mean | null {
  let k = i;
  while (k > 0 && k < last && Math.abs(phase[k]! - phase[i]!) < 2 * Math.PI * cycles) k += step;
  const turned = Math.abs(phase[k]! - phase[i]!);
  if (turned < 2 * Math.PI * cycles) return null;
  return { omega: turned / Math.abs(axis[k]! - axis[i]!) / 2, t: (axis[i]! + axis[k]!) / 2 };
}

/** ω₂₂ over the last half radian before the largest sample. */
function peakFrequency({ axis, phase, last }: Track): number {
  let k = last;
  while (k > 0 && Math.abs(phase[last]! - phase[k]!) < 0.5) k--;
  return Math.abs(phase[last]! - phase[k]!) / (axis[last]! - axis[k]!);
}

/** At leading order Ω^{−8/3} falls along a straight line: two means far apart give its slope. */
function chirpMassOf(track: Track): number | null {
  const { axis, last } = track;
  const from = axis.findIndex((t) => t >= axis[0]! + START * (axis[last]! - axis[0]!));
  const end = reaching(track, (EARLY * peakFrequency(track)) / 2);
  const [first, late] = [meanFrom(track, from, 1), end < 0 ? null : meanFrom(track, end, -1)];
  if (first === null || late === null || !(late.omega > LEAST_RISE * first.omega) || !(late.t > first.t)) return null;
  return ((5 / 256) * ((first.omega ** (-8 / 3) - late.omega ** (-8 / 3)) / (late.t - first.t))) ** 0.6;
}

/** Mean amplitude over the samples within half a cycle of sample i. */
function amplitudeAt({ phase, last }: Track, size: (i: number) => number, i: number): number {
  let [sum, n] = [0, 0];
  for (let k = i; k >= 0 && Math.abs(phase[k]! - phase[i]!) <= Math.PI; k--) [sum, n] = [sum + size(k), n + 1];
  for (let k = i + 1; k <= last && Math.abs(phase[k]! - phase[i]!) <= Math.PI; k++) [sum, n] = [sum + size(k), n + 1];
  return sum / n;
}

/** Null without (2,2). Linear in the samples. */
export function readInspiral(record: RadiationRecord): Inspiral | null {
  const found = trackOf(record);
  if (found === null) return null;
  const { track, size } = found;
  for (const wanted of FREQUENCIES) {
    const i = reaching(track, wanted);
    const [before, after] = i < 0 ? [null, null] : [meanFrom(track, i, -1, NEAR_CYCLES), meanFrom(track, i, 1, NEAR_CYCLES)];
    if (before === null || after === null) continue;
    const reading = { omega: (before.omega + after.omega) / 2, atM: record.axis[i]!, amplitude: amplitudeAt(track, size, i) };
    return { reading, chirpMass: chirpMassOf(track), peakOmega: peakFrequency(track) };
  }
  return { reading: null, chirpMass: chirpMassOf(track), peakOmega: peakFrequency(track) };
}
