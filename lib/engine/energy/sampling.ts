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

/** The fewest samples to a period among modes that matter, and where. */
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
      const turn = Math.abs(Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!));
      const samplesPerPeriod = (2 * Math.PI) / turn;
      if (found === null || samplesPerPeriod < found.samplesPerPeriod) {
        const stepM = axis[i]! - axis[i - 1]!;
        found = { l, m, samplesPerPeriod, stepM, periodM: samplesPerPeriod * stepM, atM: axis[i]! };
      }
    }
  }
  return found;
}
