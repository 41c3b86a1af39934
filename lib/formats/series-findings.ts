import type { Column } from '@/lib/engine/contract/layout';
import type { Finding } from '@/lib/engine/contract/finding';
import { sayRow, shortRow, whereRow } from './row-place';
import type { NumberTable } from './text/table';

const reportedSteps = 5;

/** V01. A value that is not a number stops the claim: nothing is patched over. */
export function notFiniteFindings(table: NumberTable, columns: readonly Column[], unit: string): Finding[] {
  const axisAt = columns.findIndex((column) => column.role.kind === 'axis');
  const more = table.notFiniteCount - table.notFinite.length;
  return table.notFinite.map(({ column, printed, row }, i) => {
    const at = table.columns[axisAt]?.[row] ?? Number.NaN;
    const place = Number.isFinite(at) && column !== axisAt ? `, at ${axisWord(unit)} = ${at} ${unit}` : '';
    const others = i === 0 && more > 0 ? ` ${more} more such value${more === 1 ? '' : 's'} follow${more === 1 ? 's' : ''} in the file.` : '';
    return {
      code: 'formats/not-finite',
      level: 'stops-lodging',
      where: whereRow(table, row),
      text: `${capital(sayRow(table, row))}: column ${columns[column]?.name ?? column + 1} is ${printed}${place}.${others}`,
      fix: 'If the run was continued from a checkpoint, cut the record before it or supply the missing piece.',
    };
  });
}

const capital = (words: string): string => words[0]!.toUpperCase() + words.slice(1);
const axisWord = (unit: string): string => (unit === 'Hz' || unit === '1/M' ? 'f' : 't');

/** V02. Line numbers and both times of every step that does not go forward. */
export function monotoneFindings(table: NumberTable, axis: Float64Array, unit: string): Finding[] {
  const found: Finding[] = [];
  let count = 0;
  for (let i = 1; i < axis.length; i++) {
    if (axis[i]! > axis[i - 1]! || Number.isNaN(axis[i]! - axis[i - 1]!)) continue;
    count++;
    if (found.length < reportedSteps) found.push(backwards(table, axis, i, unit));
  }
  const first = found[0];
  if (first && count > found.length) found[0] = { ...first, text: `${first.text} ${count} such steps in all.` };
  return found;
}

function backwards(table: NumberTable, axis: Float64Array, i: number, unit: string): Finding {
  const word = axisWord(unit);
  const same = axis[i] === axis[i - 1];
  const what = word === 't' ? 'Time' : 'Frequency';
  return {
    code: 'formats/time-not-monotone',
    level: 'stops-lodging',
    where: whereRow(table, i),
    text: `${what} ${same ? 'stands still' : 'goes backwards'} at ${sayRow(table, i)} (${shortRow(table, i - 1)}: ${word} = ${axis[i - 1]} ${unit}; ${shortRow(table, i)}: ${word} = ${axis[i]} ${unit}).`,
    fix: same ? 'Remove the repeated row.' : 'This looks like two overlapping segments of a restarted run: keep one of them.',
  };
}
