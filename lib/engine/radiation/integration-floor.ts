import { dominantMode, peakModulus } from '../conditioning/dominant-mode';
import type { RadiationRecord } from './radiation-record';

const QUIET = 1e-3;
const TWO_CYCLES = 4 * Math.PI;

/** First sample at or after `startM` at which the series is above 10⁻³ of its peak. */
function firstLoud(axis: Float64Array, re: Float64Array, im: Float64Array, startM: number): number {
  const floor = QUIET * peakModulus(re, im);
  const i = axis.findIndex((t, k) => t >= startM && Math.hypot(re[k]!, im[k]!) > floor);
  return i < 0 ? axis.length - 1 : i;
}

/**
 * Default ω₀ for |m| = 2: half the mean slope of the dominant mode's phase over its first two cycles.
 * Shape:  one number for the whole record.
 * Units:  startM in M; ω₀ in rad/M.
 * Error:  the end of the second cycle is found by linear interpolation (part of the definition).
 * Fails:  null when the phase does not move at all.
 * Source: settings.md rule 2.9 (house rule).
 */
export function defaultFloor(record: RadiationRecord, startM: number): number | null {
  const mode = dominantMode(record.modes);
  if (mode === undefined) return null;
  const { axis } = record;
  const { re, im } = mode;
  const first = firstLoud(axis, re, im, startM);
  let phase = 0;
  for (let i = first + 1; i < axis.length; i++) {
    const before = Math.abs(phase);
    phase += Math.atan2(im[i]! * re[i - 1]! - re[i]! * im[i - 1]!, re[i]! * re[i - 1]! + im[i]! * im[i - 1]!);
    const after = Math.abs(phase);
    if (after >= TWO_CYCLES) {
      const t = axis[i - 1]! + ((TWO_CYCLES - before) / (after - before)) * (axis[i]! - axis[i - 1]!);
      return TWO_CYCLES / (t - axis[first]!) / 2;
    }
  }
  const span = axis[axis.length - 1]! - axis[first]!;
  return phase !== 0 && span > 0 ? Math.abs(phase) / span / 2 : null;
}

/** Mode m divides by no frequency below ω₀·max(|m|, 1)/2 (rule 2.9). */
export const floorOfMode = (floor: number, m: number): number => (floor * Math.max(Math.abs(m), 1)) / 2;
