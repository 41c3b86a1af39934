import { LEAST, ROOT3 } from '../budget/half-width';
import type { BudgetLine } from '../contract/measurement';
import { pairOnSamples, housePair } from './pair-on-samples';
import { pairBy, type PairPoint, type PairResult, type Which } from './pair-point';

/** E15: each edge of the window moved by a fifth of its length. */
const MOVED = [-0.2, 0, 0.2];

export const valueOf = ({ residual }: PairResult, which: Which): number => residual[which];

const fewerDigits = ({ a, b }: PairPoint): number | null => {
  const digits = [a, b].map(({ waveform }) => waveform.significantDigits).filter((n) => n !== null);
  return digits.length === 0 ? null : Math.min(...digits);
};

/** Scatter of the shift from samples that are each off by a relative slip, times how far the frequency at the reading lies from the window's mean. */
function shiftScatter(point: PairPoint, { aligned, residual }: PairResult, slip: number): number {
  const route = point.routes.A();
  const { window, timeShiftM } = aligned;
  const samples = point.b.tones.A.axis.length / (route.lastB - route.firstB);
  const rate = (at: number): number => route.frequencyOfB(at + timeShiftM);
  const grid = Array.from({ length: 33 }, (_, i) => rate(window[0] + ((window[1] - window[0]) * i) / 32));
  const mean = grid.reduce((sum, x) => sum + x, 0) / grid.length;
  const spread = grid.reduce((sum, x) => sum + (x - mean) ** 2, 0) / grid.length;
  const count = Math.max(1, samples * (window[1] - window[0]));
  if (!(spread > 0) || residual.atM === null) return 0;
  return (slip * Math.abs(rate(residual.atM) - mean)) / Math.sqrt(spread * count);
}

function roundingLine(point: PairPoint, result: PairResult, which: Which): BudgetLine {
  const digits = fewerDigits(point);
  const base = { component: 'Rounding of the input', id: 'rounding', group: 'computation' } as const;
  if (digits === null) return { ...base, u: 0, note: 'Binary doubles: nothing was printed.' };
  const slip = (Math.SQRT2 * 0.5 * 10 ** (1 - digits)) / ROOT3;
  const u = which === 'phase' ? Math.hypot(slip, point.settings.alignment === 'window' && !result.aligned.degenerate ? shiftScatter(point, result, slip) : slip) : slip * Math.abs(1 + result.residual.amplitude);
  return { ...base, u, note: `${digits} significant digits in the files.` };
}

function integrationLine(point: PairPoint, value: number, which: Which): BudgetLine[] {
  const { a, b, settings } = point;
  if (a.tones.floor === null && b.tones.floor === null) return [];
  const coarse = pairBy(pairOnSamples(a.tones.coarse, b.tones.coarse, housePair), settings, which);
  const u = 'because' in coarse ? Number.NaN : Math.max(Math.abs(valueOf(coarse, which) - value) / ROOT3, LEAST);
  return [{ component: 'Integration in frequency', id: 'E02', group: 'computation', u, note: 'Interpolation of order 8 against 6 and half the points.' }];
}

/**
 * Lines that make U: local polynomials of order 8 against 6 with half of the grid and the peak by the
 * five-sample parabola, and the digits of the files.
 * Shape:  two lines; a third where H was integrated.
 * Units:  those of the value.
 * Error:  half-width over √3.
 * Fails:  never.
 * Source: settings.md rule 12.
 */
export function pairComputation(point: PairPoint, result: PairResult, which: Which): BudgetLine[] {
  const value = valueOf(result, which);
  const other = pairBy(point.routes.coarse(), point.settings, which);
  const moved = 'because' in other ? Number.NaN : Math.abs(valueOf(other, which) - value);
  const size = which === 'phase' ? Math.max(1, Math.abs(result.aligned.phaseShift)) : 1;
  return [
    { component: 'Interpolation, sums and time of the peak', id: 'E01', group: 'computation', u: Math.max(moved / ROOT3, LEAST * size), note: 'Local polynomials of order 8 against 6, half of the grid, peak by a polynomial against the five-sample parabola; half-width over √3.' },
    ...integrationLine(point, value, which),
    roundingLine(point, result, which),
  ];
}

function windowLine(point: PairPoint, { aligned }: PairResult, which: Which): BudgetLine[] {
  const { settings, routes } = point;
  if (settings.alignment !== 'window' && settings.at !== 'window') return [];
  const [from, to] = aligned.window;
  const values = MOVED.flatMap((x) => MOVED.map((y) => [from + x * (to - from), to + y * (to - from)] as const))
    .map((window) => pairBy(routes.A(), { ...settings, window }, which))
    .flatMap((found) => ('because' in found ? [] : [valueOf(found, which)]));
  const base = { component: 'Choice of the window', id: 'E15', group: 'coverage' } as const;
  if (values.length < 2) return [{ ...base, u: null, note: 'The records are too short to move the edges of the window.' }];
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const u = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
  return [{ ...base, u, degreesOfFreedom: values.length - 1, note: `Each edge moved by a fifth of the window's length: standard deviation of the ${values.length} windows inside the records.` }];
}

/** Lines that are listed and decide coverage, never U. */
export const pairCoverage = (point: PairPoint, result: PairResult, which: Which): BudgetLine[] => [
  { component: 'Simulation truncation error', id: 'E05', group: 'coverage', u: null, note: 'Not available: one resolution of each record.' },
  { component: 'Extraction radius', id: 'E06', group: 'coverage', u: null, note: 'Not available: one radius of each record.' },
  ...windowLine(point, result, which),
];
