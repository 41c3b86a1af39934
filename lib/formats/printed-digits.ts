import type { Column } from '@/lib/engine/contract/layout';
import type { NumberTable } from './text/table';

/** Columns a tenth as large as the largest, or larger, decide how finely the file was printed. */
const countsFrom = 0.1;

interface PrintedColumn {
  readonly digits: number;
  readonly peak: number;
  readonly isPhase: boolean;
}

/**
 * Significant digits of the amplitude columns, for the rounding component of the budget.
 * A column printed to fixed decimals shows fewer digits where it is small, so only columns near
 * the largest count; numbers stored exactly have no end of digits; a phase of 1234.56 rad is rounded to 0.01 rad, which is what moves the wave.
 */
export function printedDigits(tables: readonly NumberTable[], columns: readonly Column[]): number | null {
  const printed = tables.flatMap((table) => columns.flatMap((column, k) => printedColumn(table, column, k)));
  const amplitudes = printed.filter((column) => !column.isPhase);
  const largest = Math.max(0, ...amplitudes.map((column) => column.peak));
  const telling = [...amplitudes.filter((column) => column.peak >= countsFrom * largest), ...printed.filter((column) => column.isPhase)];
  const digits = telling.filter((column) => column.peak > 0).map((column) => column.digits);
  const least = Math.min(...digits);
  return Number.isFinite(least) ? Math.max(1, least) : null;
}

function printedColumn(table: NumberTable, { role }: Column, k: number): PrintedColumn[] {
  const samples = table.columns[k];
  if (role.kind === 'axis' || role.kind === 'skip' || !samples) return [];
  let peak = 0;
  for (const x of samples) peak = Math.max(peak, Math.abs(x));
  const printed = table.significantDigits[k] ?? 0;
  const isPhase = role.kind === 'phase';
  return [{ digits: isPhase && peak > 0 ? printed - Math.floor(Math.log10(peak)) - 1 : printed, peak, isPhase }];
}
