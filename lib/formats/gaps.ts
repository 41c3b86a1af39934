import type { Finding } from '@/lib/engine/contract/finding';
import { medianStep } from './axis';
import { sayRow, whereRow } from './row-place';
import type { NumberTable } from './text/table';

/** The curve whose cycles a gap is measured in; `im` is null for a lone real column. */
export interface WaveTrace {
  readonly re: Float64Array;
  readonly im: Float64Array | null;
}

const wideSteps = 1.5;
const interpolatedCycles = 0.1;
const quiet = 1e-3;
const reportedGaps = 5;

/** V03: steps above one and a half medians, widest first, in the record's unit and in cycles of the wave there. */
export function gapFindings(table: NumberTable, axis: Float64Array, unit: string, trace: WaveTrace): Finding[] {
  const median = medianStep(axis);
  const wide: number[] = [];
  for (let i = 1; i < axis.length; i++) if (axis[i]! - axis[i - 1]! > wideSteps * median) wide.push(i);
  if (wide.length === 0) return [];
  const peak = peakOf(trace);
  const gaps = wide.map((row) => ({ row, width: axis[row]! - axis[row - 1]!, cycles: cyclesAcross(axis, trace, row, peak) }));
  gaps.sort((a, b) => (b.cycles ?? Infinity) - (a.cycles ?? Infinity) || b.width - a.width || a.row - b.row);
  return gaps.slice(0, reportedGaps).map((gap, i) => {
    const needsAnswer = gap.cycles === null || gap.cycles > interpolatedCycles;
    return {
      code: 'formats/gap',
      level: needsAnswer ? 'needs-answer' : 'worth-a-look',
      where: whereRow(table, gap.row),
      text: `There is a gap of ${short(gap.width)} ${unit} at t = ${axis[gap.row - 1]} ${unit} (${sayRow(table, gap.row)}; the usual step is ${short(median)} ${unit}), ${inCycles(gap.cycles)}.${i === 0 && gaps.length > 1 ? ` ${gaps.length} steps in all are wider than 1.5 usual steps.` : ''}`,
      fix: needsAnswer ? 'Gaps up to 0.1 cycle are interpolated; supply the missing samples, or say why this one does no harm.' : 'It is interpolated.',
    };
  });
}

const short = (x: number): string => String(Number(x.toPrecision(4)));
const inCycles = (cycles: number | null): string =>
  cycles === null ? 'where the length of a cycle cannot be told' : `i.e. ${short(Number(cycles.toPrecision(2)))} of a wave cycle`;

function peakOf({ re, im }: WaveTrace): number {
  let peak = 0;
  for (let i = 0; i < re.length; i++) peak = Math.max(peak, Math.hypot(re[i]!, im ? im[i]! : 0));
  return peak;
}

/** Cycles of the wave between two samples; 0 where there is no wave to speak of, null when unknown. */
function cyclesAcross(axis: Float64Array, trace: WaveTrace, row: number, peak: number): number | null {
  const size = (i: number) => Math.hypot(trace.re[i]!, trace.im ? trace.im[i]! : 0);
  if (size(row) < quiet * peak && size(row - 1) < quiet * peak && trace.im) return 0;
  const width = axis[row]! - axis[row - 1]!;
  const rate = trace.im ? Math.max(turnRate(axis, trace.re, trace.im, row - 1), turnRate(axis, trace.re, trace.im, row + 1)) : crossingRate(axis, trace.re, row);
  return Number.isFinite(rate) && rate > 0 ? rate * width : null;
}

/** Cycles per unit of the axis between samples i − 1 and i, from the turn of the phase; 0 outside the record. */
function turnRate(axis: Float64Array, re: Float64Array, im: Float64Array, i: number): number {
  if (i < 1 || i >= axis.length) return 0;
  const real = re[i]! * re[i - 1]! + im[i]! * im[i - 1]!;
  const imaginary = im[i]! * re[i - 1]! - re[i]! * im[i - 1]!;
  return Math.abs(Math.atan2(imaginary, real)) / (2 * Math.PI) / (axis[i]! - axis[i - 1]!);
}

/** For a real record: the shorter of the two half cycles that end before and begin after the gap. */
function crossingRate(axis: Float64Array, x: Float64Array, row: number): number {
  const before = crossings(axis, x, row - 1, -1);
  const after = crossings(axis, x, row, 1);
  const half = Math.min(before ?? Infinity, after ?? Infinity);
  return Number.isFinite(half) ? 1 / (2 * half) : Number.NaN;
}

function crossings(axis: Float64Array, x: Float64Array, from: number, direction: 1 | -1): number | null {
  let first: number | null = null;
  for (let i = from; i + direction >= 0 && i + direction < x.length; i += direction) {
    if (x[i]! * x[i + direction]! >= 0) continue;
    if (first !== null) return Math.abs(axis[i]! - first);
    first = axis[i]!;
  }
  return null;
}
