'use client';
import { createContext, useContext } from 'react';
import type { Range } from './zoom';

/** One cursor and one view for all plots of a claim that share a horizontal axis, by cursor group. */
export interface CursorLink {
  /** Where the cursor stands along x. */
  readonly places: Readonly<Record<string, number>>;
  /** The part that is looked at; absent where it is the whole axis. */
  readonly ranges: Readonly<Record<string, Range>>;
  /** Follows the pointer. */
  readonly moveTo: (group: string, x: number) => void;
  /** Chosen by a click or a key: kept in the address. */
  readonly settle: (group: string, x: number) => void;
  readonly zoomTo: (group: string, range: Range | null) => void;
}
const nothing = () => undefined;
export const CursorContext = createContext<CursorLink>({ places: {}, ranges: {}, moveTo: nothing, settle: nothing, zoomTo: nothing });
export const useCursorLink = (): CursorLink => useContext(CursorContext);

/** Index of the sample nearest to a place; the axis rises. */
export function nearestIndex(values: readonly number[], x: number): number {
  let low = 0;
  let high = values.length - 1;
  while (low < high) {
    const middle = (low + high) >> 1;
    if ((values[middle] ?? 0) < x) low = middle + 1;
    else high = middle;
  }
  const before = values[low - 1];
  return before !== undefined && x - before < (values[low] ?? x) - x ? low - 1 : low;
}
