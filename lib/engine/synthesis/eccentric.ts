import { polarOf } from '../series/polar';
import { smoothStep, type Modes } from './effects';

/** Radial over orbital period: the ellipse turns as it is run through. */
const RADIAL = 1.2;
/** The swing dies over so many M, and is gone this long before the peak. */
const [FADING_M, BEFORE_PEAK_M] = [300, 100];

/**
 * A slightly eccentric inspiral: the orbital frequency swings as Ω(1 + 2e cos(Φ/1.2)), so every phase by m times 2.4 e sin(Φ/1.2).
 * Shape:  same axis and modes.
 * Units:  peakM in M; e dimensionless.
 * Error:  first order in e.
 * Fails:  a mode set without (2,2) comes back as it was.
 * Source: domain reference, section 7, synthesis details.
 */
export function withEccentricity<T extends Modes>(wave: T, e: number, peakM: number): T {
  const quadrupole = wave.modes.find(({ l, m }) => l === 2 && m === 2);
  if (quadrupole === undefined) return wave;
  const orbital = polarOf(quadrupole).phase.map((phase) => -phase / 2);
  const swing = orbital.map((phase, i) => 2 * e * RADIAL * Math.sin(phase / RADIAL) * (1 - smoothStep((wave.t[i]! - (peakM - BEFORE_PEAK_M - FADING_M)) / FADING_M)));
  const modes = wave.modes.map((mode) => {
    const [re, im] = [new Float64Array(mode.re.length), new Float64Array(mode.re.length)];
    for (let i = 0; i < re.length; i++) {
      const [c, s] = [Math.cos(mode.m * swing[i]!), -Math.sin(mode.m * swing[i]!)];
      re[i] = c * mode.re[i]! - s * mode.im[i]!;
      im[i] = c * mode.im[i]! + s * mode.re[i]!;
    }
    return { ...mode, re, im };
  });
  return { ...wave, modes };
}
