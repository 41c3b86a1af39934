import type { Mode, Waveform } from '../contract/waveform';
import { dominantMode, peakModulus } from '../conditioning/dominant-mode';
import { polynomialResidual } from './polynomial-residual';

/** The inspiral that is smoothed: from here after the start to here before the peak (as for a measured eccentricity). */
const AWAY_M = 200;
/** Of the polynomials in the eighth root of the time left: an inspiral's phase is one, but for logarithms. */
const DEGREE = 7;
/** Ramps at both ends of the interval, so that nothing jumps there. */
const RAMP = 0.1;

interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly peakM: number;
}

function inspiralOf({ axis, junkEndM }: Waveform, mode: Mode): Stretch | null {
  const top = peakModulus(mode.re, mode.im);
  const peak = mode.re.findIndex((x, i) => Math.hypot(x, mode.im[i]!) >= top);
  const start = (junkEndM ?? axis[0]!) + AWAY_M;
  const from = axis.findIndex((t) => t >= start);
  const to = axis.findLastIndex((t) => t <= axis[peak]! - AWAY_M);
  return from >= 0 && to - from > 20 * DEGREE ? { from, to, peakM: axis[peak]! } : null;
}

function unwrapped(mode: Mode, { from, to }: Stretch): Float64Array {
  const phase = new Float64Array(to - from + 1);
  for (let i = 0; i < phase.length; i++) {
    const here = Math.atan2(mode.im[from + i]!, mode.re[from + i]!);
    const before = i === 0 ? here : phase[i - 1]!;
    phase[i] = here - 2 * Math.PI * Math.round((here - before) / (2 * Math.PI));
  }
  return phase;
}

function ramp(i: number, n: number): number {
  const x = Math.min(i, n - 1 - i) / (RAMP * (n - 1));
  return x >= 1 ? 1 : Math.sin((Math.PI / 2) * x) ** 2;
}

/**
 * The same record with the wiggles of its inspiral taken out: phase and ln|H| of the dominant mode follow polynomials in
 * the eighth root of the time left to its peak, and every other mode turns with it.
 * Shape:  same axis and modes.
 * Units:  M.
 * Error:  what the polynomials cannot follow of a smooth inspiral is taken out too; below 1e-3 rad over thousands of M.
 * Fails:  null for anything but modes in M, and for an inspiral too short to fit.
 * Source: domain reference 5.1 (E10); powers of τ^{1/8} as in the post-Newtonian phase.
 */
export function smoothedInspiral(waveform: Waveform): Waveform | null {
  const { content, axis } = waveform;
  if (content.kind !== 'modes' || waveform.domain !== 'time' || waveform.unit !== 'M') return null;
  const leading = dominantMode(content.modes);
  const stretch = leading && inspiralOf(waveform, leading);
  if (!leading || !stretch) return null;
  const { from, to, peakM } = stretch;
  const times = axis.subarray(from, to + 1).map((t) => (peakM - t) ** 0.125);
  const turn = polynomialResidual(times, unwrapped(leading, stretch), DEGREE);
  const swell = polynomialResidual(times, times.map((_, i) => Math.log(Math.hypot(leading.re[from + i]!, leading.im[from + i]!))), DEGREE);
  if (![...turn, ...swell].every(Number.isFinite)) return null;
  const modes = content.modes.map((mode): Mode => {
    const [re, im] = [mode.re.slice(), mode.im.slice()];
    for (let i = 0; i < turn.length; i++) {
      const weight = ramp(i, turn.length);
      const angle = (-mode.m / leading.m) * turn[i]! * weight;
      const size = Math.exp(-swell[i]! * weight);
      const [x, y] = [re[from + i]!, im[from + i]!];
      re[from + i] = size * (x * Math.cos(angle) - y * Math.sin(angle));
      im[from + i] = size * (x * Math.sin(angle) + y * Math.cos(angle));
    }
    return { ...mode, re, im };
  });
  return { ...waveform, content: { kind: 'modes', modes } };
}
