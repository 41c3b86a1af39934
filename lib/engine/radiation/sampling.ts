import { peakModulus } from '../conditioning/dominant-mode';
import type { ModeEnergy } from './energy-on-samples';
import type { RadiationRecord } from './radiation-record';

export interface CoarsestSampling {
  readonly l: number;
  readonly m: number;
  readonly samplesPerPeriod: number;
  readonly periodM: number;
  readonly stepM: number;
  readonly atM: number;
}

/** Modes with less than this share of the energy may be as coarse as they like. */
const COUNTS = 1e-3;
/** Phases of samples below this share of a mode's peak are noise. */
const AUDIBLE = 0.1;

/** Modes whose peak is below this share of the largest do not decide how finely a record is read. */
const LOUD = 1e-2;

const turnOf = (re: Float64Array, im: Float64Array, i: number): number =>
  Math.abs(Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!));

/**
 * Largest turn of phase between neighbouring samples, in loud modes where they are audible.
 * Shape:  two numbers for the whole record.
 * Units:  rad a step, and rad/M.
 * Error:  turns beyond π a step are read as less.
 * Fails:  never; zeros where nothing turns.
 * Source: definition.
 */
export function largestTurns(record: RadiationRecord): { readonly aStep: number; readonly inTime: number } {
  const { axis, modes } = record;
  const peaks = modes.map(({ re, im }) => peakModulus(re, im));
  const top = Math.max(0, ...peaks);
  let [aStep, inTime] = [0, 0];
  modes.forEach(({ re, im }, k) => {
    if (!(peaks[k]! > LOUD * top)) return;
    const floor = (AUDIBLE * peaks[k]!) ** 2;
    for (let i = 1; i < axis.length; i++) {
      if (re[i]! * re[i]! + im[i]! * im[i]! < floor || re[i - 1]! * re[i - 1]! + im[i - 1]! * im[i - 1]! < floor) continue;
      const turn = turnOf(re, im, i);
      if (turn > aStep) aStep = turn;
      const rate = turn / (axis[i]! - axis[i - 1]!);
      if (rate > inTime) inTime = rate;
    }
  });
  return { aStep, inTime };
}

/**
 * The fewest samples to a period among modes that matter, and where.
 * Shape:  one place, with its mode.
 * Units:  period, step and time in M; energies as fractions of M.
 * Error:  that of the phase between neighbouring samples.
 * Fails:  null where no mode matters.
 * Source: domain reference V04.
 */
export function coarsestSampling(record: RadiationRecord, energies: readonly ModeEnergy[]): CoarsestSampling | null {
  const { axis } = record;
  const total = energies.reduce((sum, { energy }) => sum + energy, 0);
  let found: CoarsestSampling | null = null;
  for (const { l, m, re, im } of record.modes) {
    const energy = energies.find((entry) => entry.l === l && entry.m === m)?.energy ?? 0;
    if (!(energy > COUNTS * total)) continue;
    const floor = AUDIBLE * peakModulus(re, im);
    for (let i = 1; i < axis.length; i++) {
      if (Math.hypot(re[i]!, im[i]!) < floor || Math.hypot(re[i - 1]!, im[i - 1]!) < floor) continue;
      const samplesPerPeriod = (2 * Math.PI) / turnOf(re, im, i);
      if (found === null || samplesPerPeriod < found.samplesPerPeriod) {
        const stepM = axis[i]! - axis[i - 1]!;
        found = { l, m, samplesPerPeriod, stepM, periodM: samplesPerPeriod * stepM, atM: axis[i]! };
      }
    }
  }
  return found;
}
