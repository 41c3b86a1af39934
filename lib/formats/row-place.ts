import type { NumberTable } from './text/table';

/** A table out of an array file: its rows have no lines but indices, counted from 0 as the file's own tools do. */
export interface ArrayTable extends NumberTable {
  readonly dataset: string;
}

const datasetOf = (table: NumberTable): string | null => ('dataset' in table ? (table as ArrayTable).dataset : null);
const nameOf = ({ file }: NumberTable, dataset: string): string => (dataset === '' ? file : `${file}:${dataset}`);

/** `a.txt:12`, or `a.h5:/l2_m2[11]`. */
export function whereRow(table: NumberTable, row: number): string {
  const dataset = datasetOf(table);
  return dataset === null ? `${table.file}:${table.lineOfRow(row)}` : `${nameOf(table, dataset)}[${row}]`;
}

/** `line 12 of a.txt`, or `row 11 (counted from 0) of /l2_m2 in a.h5`. */
export function sayRow(table: NumberTable, row: number): string {
  const dataset = datasetOf(table);
  if (dataset === null) return `line ${table.lineOfRow(row)} of ${table.file}`;
  return `row ${row} (counted from 0) of ${dataset === '' ? table.file : `${dataset} in ${table.file}`}`;
}

/** `line 12` or `row 11`, where the file was named before. */
export const shortRow = (table: NumberTable, row: number): string => (datasetOf(table) === null ? `line ${table.lineOfRow(row)}` : `row ${row}`);
