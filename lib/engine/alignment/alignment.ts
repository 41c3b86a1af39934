/**
 * Alignment: two tones laid over each other by one shift of time and one constant phase, and what is
 * left between them. Route A unwraps the samples and interpolates phase and amplitude by local
 * polynomials on a uniform grid; route B takes the argument of H_b H_a* from splines at Gauss nodes.
 */
import type { Alignment, ReadAt } from '../contract/settings';

export interface AlignmentSettings {
  readonly alignment: Alignment;
  /** On a's times, in M; null when it is read from a's peak. */
  readonly window: readonly [number, number] | null;
  readonly at: ReadAt;
}

/** Shift and phase by which b is laid over a, and the interval of a's times on which both then exist. */
export interface Aligned {
  readonly timeShiftM: number;
  /** Unwrapped; what is subtracted from φ_b − φ_a. */
  readonly phaseShift: number;
  readonly from: number;
  readonly to: number;
  readonly window: readonly [number, number];
  /** Where the phases of a and b begin to be followed: inside the common interval. */
  readonly anchorM: number;
  /** The cost does not depend on the shift: the smallest one was taken. */
  readonly degenerate: boolean;
}

/** What is left at one time. */
export interface Residual {
  /** φ_b(t+Δt) − φ_a(t) − Δφ, in rad. */
  readonly phase: number;
  /** A_b(t+Δt)/A_a(t) − 1. */
  readonly amplitude: number;
  /** Time on a's axis; null for a mean over the window. */
  readonly atM: number | null;
}

/** Why two tones cannot be aligned or read: a sentence that goes on from "The records …". */
export interface NotAligned {
  readonly because: string;
  readonly fix: string;
}

/** What one of the two routes can do with a pair of tones. */
export interface PairRoute {
  readonly firstA: number;
  readonly lastA: number;
  readonly firstB: number;
  readonly lastB: number;
  /** Time of the largest amplitude of a between two times, or null. */
  readonly peakOfA: (from: number, to: number) => number | null;
  readonly peakOfB: () => number | null;
  /** First time at which the frequency rises through ω, or null. */
  readonly reachedByA: (omega: number) => number | null;
  readonly reachedByB: (omega: number) => number | null;
  readonly frequencyOfB: (t: number) => number;
  /** Shift that minimises the variance of φ_b(t+Δt) − φ_a(t) over the window, between two bounds. */
  readonly bestShift: (window: readonly [number, number], low: number, high: number) => { readonly shift: number; readonly degenerate: boolean };
  /** Mean of φ_b(t+Δt) − φ_a(t) and of A_b/A_a over the window; phases unwrapped from its start. */
  readonly means: (window: readonly [number, number], shift: number) => { readonly phase: number; readonly ratio: number };
  /** φ_b(t+Δt) − φ_a(t) at a time, unwrapped continuously from another, and A_b/A_a there. */
  readonly between: (shift: number, anchor: number, t: number) => { readonly phase: number; readonly ratio: number };
  /** The same at many times of an interval, unwrapped from the anchor. */
  readonly along: (shift: number, anchor: number, from: number, to: number) => { readonly t: Float64Array; readonly phase: Float64Array; readonly ratio: Float64Array };
}

/** Where the shift changes the phase over the whole window by less than this, there is nothing to align by. */
export const FLAT_RAD = 1e-4;

/** Default window: from a tenth to four tenths of the way from the later start to a's peak. */
const SHARES = [0.1, 0.4] as const;

function windowOf(route: PairRoute, { window }: AlignmentSettings): readonly [number, number] | NotAligned {
  if (window !== null) return window;
  const start = Math.max(route.firstA, route.firstB);
  const end = Math.min(route.lastA, route.lastB);
  const peak = route.peakOfA(route.firstA, route.lastA) ?? end;
  if (peak > start) return [start + SHARES[0] * (peak - start), start + SHARES[1] * (peak - start)];
  return { because: `have no stretch in common before the peak of the first at t = ${peak} M`, fix: 'Declare the window of the alignment, on the times of the first record.' };
}

const outside = ([from, to]: readonly [number, number], { firstA, lastA, firstB, lastB }: PairRoute): NotAligned => ({
  because: `cannot be aligned over the window from ${from} to ${to} M: the first runs from ${firstA} to ${lastA} M, the second from ${firstB} to ${lastB} M`,
  fix: 'Declare a window inside the first record and no longer than the second.',
});

const wrapped = (phase: number): number => phase - 2 * Math.PI * Math.ceil(phase / (2 * Math.PI) - 0.5);

interface Shifted {
  readonly shift: number;
  readonly degenerate: boolean;
  /** Time on a's axis at which the constant phase is read; null for the mean over the window. */
  readonly anchor: number | null;
}

function shiftOf(route: PairRoute, { alignment }: AlignmentSettings, window: readonly [number, number]): Shifted | NotAligned {
  if (alignment === 'none') return { shift: 0, degenerate: false, anchor: null };
  if (alignment === 'peak') {
    const end = Math.min(route.lastA, route.lastB);
    const a = route.peakOfA(route.firstA, route.lastA) ?? end;
    return { shift: (route.peakOfB() ?? end) - a, degenerate: false, anchor: a };
  }
  if (alignment !== 'window') {
    const [a, b] = [route.reachedByA(alignment.frequencyM), route.reachedByB(alignment.frequencyM)];
    if (a !== null && b !== null) return { shift: b - a, degenerate: false, anchor: a };
    return { because: `do not both rise through the frequency ${alignment.frequencyM} rad/M`, fix: 'Declare a frequency that both records pass.' };
  }
  const [low, high] = [route.firstB - window[0], route.lastB - window[1]];
  if (window[0] < route.firstA || window[1] > route.lastA || low > high) return outside(window, route);
  return { ...route.bestShift(window, low, high), anchor: null };
}

/**
 * Lays b over a.
 * Shape:  see Aligned.
 * Units:  times in M, phases in rad.
 * Error:  that of the route.
 * Fails:  says why: a window outside the records, a frequency that is not reached, no time in common.
 * Source: Q19; settings.md section 6. For `none` the whole turns are chosen so that the difference lies in (−π, π] where the records begin to overlap.
 */
export function alignPair(route: PairRoute, settings: AlignmentSettings): Aligned | NotAligned {
  const found = windowOf(route, settings);
  if ('because' in found && (settings.alignment === 'window' || settings.at === 'window')) return found;
  const window = 'because' in found ? ([route.firstA, route.lastA] as const) : found;
  const shifted = shiftOf(route, settings, window);
  if ('because' in shifted) return shifted;
  const { shift, degenerate, anchor } = shifted;
  const from = Math.max(route.firstA, route.firstB - shift);
  const to = Math.min(route.lastA, route.lastB - shift);
  if (!(to > from)) return { because: 'have no time in common after the alignment', fix: 'Check the zero of time of both files.' };
  const anchorM = Math.min(Math.max(window[0], from), to);
  const base = { timeShiftM: shift, from, to, window, anchorM, degenerate };
  if (settings.alignment === 'none') {
    const start = route.between(shift, anchorM, from).phase;
    return { ...base, phaseShift: start - wrapped(start) };
  }
  if (anchor !== null) return { ...base, phaseShift: route.between(shift, anchorM, anchor).phase };
  return { ...base, phaseShift: route.means(window, shift).phase };
}

/** Δφ as it is told, in (−π, π]; whole turns without alignment are no shift. */
export const toldPhase = ({ phaseShift }: Aligned, { alignment }: AlignmentSettings): number => (alignment === 'none' ? 0 : wrapped(phaseShift));

/** Largest |value| of a sampled curve, with the vertex of the parabola through its neighbours. */
function largest(values: Float64Array): { readonly at: number; readonly value: number } {
  let top = 0;
  for (let i = 1; i < values.length; i++) if (Math.abs(values[i]!) > Math.abs(values[top]!)) top = i;
  if (top === 0 || top === values.length - 1) return { at: top, value: values[top]! };
  const [a, b, c] = [values[top - 1]!, values[top]!, values[top + 1]!];
  const bend = a - 2 * b + c;
  const move = bend === 0 ? 0 : Math.max(-1, Math.min(1, (a - c) / (2 * bend)));
  return { at: top + move, value: b + (move * (c - a)) / 4 };
}

function readMaximum(route: PairRoute, aligned: Aligned, peak: number, which: 'phase' | 'amplitude'): Residual {
  const { timeShiftM, anchorM, from, phaseShift } = aligned;
  const { t, phase, ratio } = route.along(timeShiftM, anchorM, from, peak);
  const curves = { phase: phase.map((x) => x - phaseShift), amplitude: ratio.map((x) => x - 1) };
  const { at, value } = largest(curves[which]);
  const near = Math.round(at);
  const other = which === 'phase' ? curves.amplitude[near]! : curves.phase[near]!;
  const atM = t[near]! + (at - near) * (t[Math.min(near + 1, t.length - 1)]! - t[Math.max(near - 1, 0)]!) * 0.5;
  return which === 'phase' ? { phase: value, amplitude: other, atM } : { phase: other, amplitude: value, atM };
}

function timeOf(route: PairRoute, aligned: Aligned, at: ReadAt): number | NotAligned {
  const { from, to } = aligned;
  if (at === 'end') return to;
  if (typeof at === 'string') return route.peakOfA(from, to) ?? to;
  const t = 'timeM' in at ? at.timeM : route.reachedByA(at.frequencyM);
  if (t === null) return { because: `cannot be read where the first reaches ${'frequencyM' in at ? at.frequencyM : 0} rad/M: it does not rise through that frequency`, fix: 'Declare a frequency that the first record passes, or a time.' };
  if (t >= from - 1e-9 * (to - from) && t <= to + 1e-9 * (to - from)) return Math.min(Math.max(t, from), to);
  return { because: `cannot be read at t = ${t} M: after the alignment both exist from ${from} to ${to} M`, fix: 'Declare a time inside that interval.' };
}

/**
 * Reads what the alignment leaves.
 * Shape:  see Residual.
 * Units:  rad; a ratio less one; M.
 * Error:  that of the route.
 * Fails:  says why a time or frequency lies outside the common interval.
 * Source: settings.md section 6 (`at`).
 */
export function readPair(route: PairRoute, aligned: Aligned, at: ReadAt, which: 'phase' | 'amplitude'): Residual | NotAligned {
  const { timeShiftM, window, anchorM, phaseShift } = aligned;
  if (at === 'window') {
    if (window[0] < aligned.from || window[1] > aligned.to) return outside(window, route);
    const { phase, ratio } = route.means(window, timeShiftM);
    return { phase: phase - phaseShift, amplitude: ratio - 1, atM: null };
  }
  const t = timeOf(route, aligned, at);
  if (typeof t !== 'number') return t;
  if (at === 'maximum') return readMaximum(route, aligned, t, which);
  const { phase, ratio } = route.between(timeShiftM, anchorM, t);
  return { phase: phase - phaseShift, amplitude: ratio - 1, atM: t };
}
