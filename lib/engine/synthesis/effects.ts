import type { Mode } from '@/lib/engine/contract/waveform';

export interface Modes {
  readonly t: Float64Array;
  readonly modes: readonly Mode[];
}

/** Multiplies each sample of each mode by a complex factor of (mode, sample). */
function scaled<T extends Modes>(wave: T, factor: (mode: Mode, i: number) => readonly [number, number]): T {
  const modes = wave.modes.map((mode) => {
    const re = new Float64Array(mode.re.length);
    const im = new Float64Array(mode.im.length);
    for (let i = 0; i < re.length; i++) {
      const [a, b] = factor(mode, i);
      re[i] = a * mode.re[i]! - b * mode.im[i]!;
      im[i] = a * mode.im[i]! + b * mode.re[i]!;
    }
    return { ...mode, re, im };
  });
  return { ...wave, modes };
}

export interface Burst {
  readonly amplitude: number;
  readonly atM: number;
  readonly widthM: number;
  readonly omega: number;
}

/** Appendix 7's burst of start-up radiation: 0.05 exp(−(t−75)²/128) e^{−0.6it} in (2,2) and its mirror. */
export const defaultBurst: Burst = { amplitude: 0.05, atM: 75, widthM: 8, omega: 0.6 };

/**
 * Adds start-up radiation to the (2,±2) modes.
 * Shape:  same axis and modes.
 * Units:  amplitude in rh/M, times in M, omega in rad/M; Gaussian of standard width `widthM`.
 * Error:  none, closed form.
 * Fails:  never; a mode set without (2,±2) comes back as it was.
 * Source: domain reference, section 7, D5.
 */
export function withStartUpBurst<T extends Modes>(wave: T, burst: Burst = defaultBurst): T {
  const modes = wave.modes.map((mode) => {
    if (mode.l !== 2 || Math.abs(mode.m) !== 2) return mode;
    const re = mode.re.slice();
    const im = mode.im.slice();
    for (let i = 0; i < re.length; i++) {
      const t = wave.t[i]!;
      const a = burst.amplitude * Math.exp(-(((t - burst.atM) / burst.widthM) ** 2) / 2);
      re[i] = re[i]! + a * Math.cos(burst.omega * t);
      im[i] = im[i]! - Math.sign(mode.m) * a * Math.sin(burst.omega * t);
    }
    return { ...mode, re, im };
  });
  return { ...wave, modes };
}

export interface ResolutionError {
  /** Phase of the (2,2) mode at the end, rad. */
  readonly phaseRad: number;
  /** Relative change of every amplitude. */
  readonly amplitude: number;
}

/**
 * A stand-in for a coarser simulation: amplitude and phase drift off smoothly up to the peak.
 * Shape:  same axis and modes; H_{ℓm} is multiplied by (1 + α) e^{−imεs(t)/2}, s rising 0 → 1.
 * Units:  α dimensionless, ε in rad.
 * Error:  none, closed form.
 * Fails:  never.
 * Source: domain reference, section 7, synthesis details.
 */
export function withResolutionError<T extends Modes>(wave: T, error: ResolutionError, peakM: number): T {
  const start = wave.t[0] ?? 0;
  return scaled(wave, (mode, i) => {
    const s = smoothStep((wave.t[i]! - start) / (peakM - start));
    const angle = (-mode.m * error.phaseRad * s) / 2;
    const gain = 1 + error.amplitude;
    return [gain * Math.cos(angle), gain * Math.sin(angle)];
  });
}

/** Terms in 1/r of appendix 7: 1.4 % of the amplitude and 0.05 rad of (2,2) at 100 M. */
const FINITE_RADIUS = { a1: -1.5, a2: 8, b1: 2.5 } as const;

/**
 * A stand-in for extraction at a finite radius.
 * Shape:  same axis and modes; H_{ℓm} is multiplied by (1 + a₁/r + a₂/r²) e^{imb₁/r}.
 * Units:  areal radius in M.
 * Error:  none, closed form; the terms are invented, and obey no wave equation.
 * Fails:  never.
 * Source: domain reference, section 7, synthesis details.
 */
export function withFiniteRadius<T extends Modes>(wave: T, radiusM: number): T {
  const { a1, a2, b1 } = FINITE_RADIUS;
  const gain = 1 + a1 / radiusM + a2 / radiusM ** 2;
  return scaled(wave, ({ m }) => {
    const angle = (m * b1) / radiusM;
    return [gain * Math.cos(angle), gain * Math.sin(angle)];
  });
}

/** sin²(πx/2) on 0…1: no corner at either end, so the drift adds no power of its own. */
export const smoothStep = (x: number): number => Math.sin((Math.PI / 2) * Math.min(Math.max(x, 0), 1)) ** 2;

/**
 * Time of the largest |H22| sample.
 * Shape:  one set of modes on a common time axis; a scalar comes back.
 * Units:  M.
 * Error:  up to half a sample; the true peak lies between samples.
 * Fails:  throws without a (2,2) mode.
 * Source: definition.
 */
export function peakTime(wave: Modes): number {
  const mode = wave.modes.find(({ l, m }) => l === 2 && m === 2);
  if (!mode) throw new RangeError('the waveform has no (2,2) mode');
  let best = 0;
  let largest = -1;
  for (let i = 0; i < wave.t.length; i++) {
    const power = mode.re[i]! ** 2 + mode.im[i]! ** 2;
    if (power > largest) [best, largest] = [i, power];
  }
  return wave.t[best]!;
}
