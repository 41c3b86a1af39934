import type { TaperWindow } from '@/lib/engine/contract/route';
import type { Waveform } from '@/lib/engine/contract/waveform';
import { dominantMode, peakModulus } from './dominant-mode';
import { cyclesFrom, type CycleClock } from './cycle-clock';

/** An end is open when a mode in use there exceeds this fraction of the largest peak (rule 2.4). */
export const OPEN_FRACTION = 1e-3;
export const START_CYCLES = 2;
export const END_CYCLES = 1;

export interface TaperMeasure {
  readonly window: TaperWindow;
  readonly startIsOpen: boolean;
  readonly endIsOpen: boolean;
  /** The record does not hold the cycles that a ramp asks for. */
  readonly tooShort: boolean;
  /** Cycles per unit of the axis of the dominant mode where the start ramp ends (first cycle without a taper); null for a quiet start. */
  readonly frequencyAtRampEnd: number | null;
  /** Cycles per unit over the first cycle; null for a quiet start. */
  readonly frequencyAtStart: number | null;
}

export const NO_TAPER: TaperWindow = { start: null, end: null };

interface SeriesParts {
  readonly re: Float64Array;
  readonly im: Float64Array | null;
}

const allZero = (values: Float64Array): boolean => values.every((x) => x === 0);

function seriesInUse(waveform: Waveform): SeriesParts[] {
  const { content } = waveform;
  if (content.kind === 'modes') return [...content.modes];
  return [{ re: content.plus, im: content.cross }];
}

/** The series whose cycles are counted: the dominant mode of the whole file, or plus − i·cross. */
function clockSeries(whole: Waveform): SeriesParts | null {
  const { content } = whole;
  if (content.kind === 'modes') return dominantMode(content.modes) ?? null;
  const { plus, cross } = content;
  return cross === null || allZero(cross) ? { re: plus, im: null } : { re: plus, im: cross };
}

function openEnds(used: Waveform): { start: boolean; end: boolean } {
  const parts = seriesInUse(used);
  const top = Math.max(0, ...parts.map((part) => peakModulus(part.re, part.im)));
  const sizeAt = (part: SeriesParts, i: number): number => Math.hypot(part.re[i]!, part.im === null ? 0 : part.im[i]!);
  const last = used.axis.length - 1;
  const isOpen = (i: number): boolean => parts.some((part) => sizeAt(part, i) > OPEN_FRACTION * top);
  return { start: isOpen(0), end: isOpen(last) };
}

/**
 * Fixes the taper of rule 2.4 as times, once for all modes of a waveform.
 * Shape:  `used` are the modes in use (they decide which ends are open), `whole` the completed file (its dominant mode counts the cycles).
 * Units:  times in the waveform's own unit, before any stretching.
 * Error:  crossing times by linear interpolation of the unwrapped phase (part of the definition).
 * Fails:  never; frequency-domain content and quiet ends get no ramp. A record shorter than its ramp gets one over its whole length, and says so.
 * Source: settings.md rule 2.4 (house rule).
 */
export function measureTaper(used: Waveform, whole: Waveform, taper: 'auto' | 'none' | number): TaperMeasure {
  const quiet = {
    window: NO_TAPER,
    startIsOpen: false,
    endIsOpen: false,
    tooShort: false,
    frequencyAtRampEnd: null,
    frequencyAtStart: null,
  };
  const series = clockSeries(whole);
  if (used.domain === 'frequency' || series === null) return quiet;
  const open = openEnds(used);
  const length = taper === 'auto' ? 1 : taper === 'none' ? 0 : taper;
  const atStart = open.start ? cyclesFrom('start', used.axis, series) : null;
  const atEnd = open.end ? cyclesFrom('end', used.axis, series) : null;
  const startRamp = atStart === null || length === 0 ? null : ramp(atStart, START_CYCLES, length, used.axis, 'start');
  const endRamp = atEnd === null || length === 0 ? null : ramp(atEnd, END_CYCLES, length, used.axis, 'end');
  return {
    window: { start: startRamp?.between ?? null, end: endRamp?.between ?? null },
    startIsOpen: open.start,
    endIsOpen: open.end,
    tooShort: (startRamp?.tooShort ?? false) || (endRamp?.tooShort ?? false),
    frequencyAtRampEnd: atStart === null ? null : atStart.frequencyAt(startRamp?.between.to ?? used.axis[0]!),
    frequencyAtStart: atStart === null ? null : atStart.frequencyAt(used.axis[0]!),
  };
}

function ramp(clock: CycleClock, cycles: number, length: number, axis: Float64Array, end: 'start' | 'end') {
  const first = axis[0]!;
  const last = axis[axis.length - 1]!;
  const reached = clock.timeAfter(cycles);
  const tooShort = reached === null;
  if (end === 'start') return { between: { from: first, to: first + length * ((reached ?? last) - first) }, tooShort };
  return { between: { from: last - length * (last - (reached ?? first)), to: last }, tooShort };
}

const sineSquared = (fraction: number): number => {
  if (fraction <= 0) return 0;
  if (fraction >= 1) return 1;
  const s = Math.sin((Math.PI / 2) * fraction);
  return s * s;
};

/**
 * The taper at one time: sin² ramps at open ends, 1 between, 0 outside them.
 * Shape:  scalar in, scalar out.
 * Units:  t in the window's unit.
 * Error:  rounding only.
 * Fails:  never.
 * Source: settings.md rule 2.4 (house rule).
 */
export function taperWeightAt(window: TaperWindow, t: number): number {
  const rising = window.start === null ? 1 : sineSquared((t - window.start.from) / (window.start.to - window.start.from));
  const falling = window.end === null ? 1 : sineSquared((window.end.to - t) / (window.end.to - window.end.from));
  return rising * falling;
}
