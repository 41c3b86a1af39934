'use client';
import { createContext, useContext } from 'react';

/** One cursor for all plots of a claim that share a horizontal axis: place along x, by cursor group. */
export interface CursorLink {
  readonly places: Readonly<Record<string, number>>;
  readonly moveTo: (group: string, x: number) => void;
}
export const CursorContext = createContext<CursorLink>({ places: {}, moveTo: () => undefined });
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
