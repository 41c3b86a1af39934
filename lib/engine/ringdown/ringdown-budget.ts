import { LEAST, ROOT3 } from '../budget/half-width';
import type { BudgetLine } from '../contract/measurement';
import { peakOnSamples, shorterPeak, type PeakBy } from '../tones/peak';
import { strainTones } from '../tones/strain-tone';
import { lineOnSamples, slopeScatter, type RingdownLine } from './line-on-samples';
import { fitWindow, type FitWindow, type RingdownPoint } from './ringdown-point';

/** E15: each edge of the window moved by a fifth, as far as the record goes. */
const MOVED = [0.8, 1, 1.2];

export type Read = (line: RingdownLine) => number;

/** E02: H from news or ψ4 on half the points, by interpolation of order 6. */
function integrationLine({ tones }: RingdownPoint, { from, to }: FitWindow, value: number, read: Read): BudgetLine[] {
  if (tones.floor === null) return [];
  const turned = read(lineOnSamples(tones.coarse, from, to));
  return [{ component: 'Integration in frequency', id: 'E02', group: 'computation', u: Math.max(Math.abs(turned - value) / ROOT3, LEAST * Math.abs(value)), turned: { values: [turned] }, note: 'Interpolation of order 8 against 6 and half the points.' }];
}

/** E08: the floor times 0.7 and 1.4. */
function floorLine({ tones, record, settings }: RingdownPoint, { from, to }: FitWindow, read: Read): BudgetLine[] {
  const { floor } = tones;
  if (floor === null) return [];
  const values = [0.7, 1, 1.4].map((by) => read(lineOnSamples(strainTones(record, settings.mode, floor * by)!.A, from, to)));
  const u = Math.max(Math.abs(values[0]! - values[1]!), Math.abs(values[2]! - values[1]!)) / ROOT3;
  return [{ component: 'Integration floor', id: 'E08', group: 'coverage', u, note: `ω₀ = ${Number(floor.toPrecision(4))} rad/M times 0.7 and 1.4; half-width over √3.` }];
}

/**
 * Lines that make U: the sum over the window by order 6 instead of 8, the peak by the five-sample
 * parabola instead of a polynomial of order 8, and the digits of the file.
 * Shape:  two lines; a third where H was integrated.
 * Units:  those of the value.
 * Error:  half-widths over √3; the scatter is propagated in closed form.
 * Fails:  never.
 * Source: settings.md rule 12.
 */
export function ringdownComputation(point: RingdownPoint, window: FitWindow, value: number, read: Read): BudgetLine[] {
  const { tones, peakTones, scale } = point;
  const tone = tones.A;
  const byPeakOf = (by: PeakBy): number => {
    const other = fitWindow(point, peakOnSamples(peakTones.A, by));
    return 'code' in other ? value : read(lineOnSamples(tone, other.from, other.to));
  };
  const byPeak = byPeakOf('parabola');
  const byOrder = read(lineOnSamples(tone, window.from, window.to, 6));
  const moved = Math.abs(byPeak - value) + Math.abs(byOrder - value);
  const digits = point.completed.waveform.significantDigits;
  const slip = digits === null ? 0 : (0.5 * 10 ** (1 - digits)) / ROOT3;
  return [
    { component: 'Sum over the window and time of the peak', id: 'E01', group: 'computation', u: Math.max(moved / ROOT3, LEAST * Math.abs(value)), turned: { values: [byPeakOf('shorter polynomial'), byOrder], note: shorterPeak }, note: 'End weights of order 8 against 6, peak by a polynomial against the five-sample parabola; changes added, half-width over √3.' },
    ...integrationLine(point, window, value, read),
    { component: 'Rounding of the input', id: 'rounding', group: 'computation', u: scale * slopeScatter(tone, window.from, window.to, slip), note: digits === null ? 'Binary doubles: nothing was printed.' : `${digits} significant digits in the file.` },
  ];
}

function windowLine(point: RingdownPoint, peakM: number, read: Read): BudgetLine {
  const tone = point.tones.A;
  const { axis } = tone;
  const [t1, t2] = point.settings.window;
  const values = MOVED.flatMap((a) => MOVED.map((b) => [peakM + a * t1, peakM + b * t2] as const))
    .filter(([from, to]) => from >= axis[0]! && to <= axis[axis.length - 1]! && from < to)
    .map(([from, to]) => read(lineOnSamples(tone, from, to)));
  const base = { component: 'Choice of the window', id: 'E15', group: 'coverage' } as const;
  if (values.length < 2) return { ...base, u: null, note: 'The record is too short to move the edges of the window.' };
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const spread = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
  return { ...base, u: spread, degreesOfFreedom: values.length - 1, note: `Edges ${t1} and ${t2} M times 0.8, 1 and 1.2: standard deviation of the ${values.length} windows inside the record. Early windows give low values.` };
}

/** Lines that are listed and decide coverage, never U. */
export const ringdownCoverage = (point: RingdownPoint, window: FitWindow, read: Read): BudgetLine[] => [
  { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution.' },
  { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius.' },
  ...floorLine(point, window, read),
  windowLine(point, window.peakM, read),
];
