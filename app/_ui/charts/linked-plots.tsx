'use client';
import { debounce, useQueryState } from 'nuqs';
import { useCallback, useMemo, useState, type ReactNode } from 'react';
import { CursorContext } from './cursor-link';
import { FigureOriginContext } from './export/figure-origin';
import type { FigureOrigin } from './export/figure-words';
import { placesInAddress, rangesInAddress } from './view-address';
import type { Range } from './zoom';

const without = <T,>(all: Readonly<Record<string, T>> | null, group: string): Record<string, T> => Object.fromEntries(Object.entries(all ?? {}).filter(([name]) => name !== group));
const orNothing = <T,>(all: Readonly<Record<string, T>>) => (Object.keys(all).length > 0 ? all : null);

/** A cursor is settled many times a second by a held key; the address need not follow each step. */
const kept = placesInAddress.withOptions({ limitUrlUpdates: debounce(300) });

/**
 * Around everything of one claim: its figures with the same horizontal axis share one cursor and one
 * view. The view, and the place that was chosen, stand in the address, which replaces itself in place.
 */
export function LinkedPlots({ origin, children }: { readonly origin: FigureOrigin; readonly children: ReactNode }) {
  const [live, setLive] = useState<Readonly<Record<string, number>>>({});
  const [settled, setSettled] = useQueryState('at', kept);
  const [ranges, setRanges] = useQueryState('zoom', rangesInAddress);
  const moveTo = useCallback((group: string, x: number) => setLive((now) => (now[group] === x ? now : { ...now, [group]: x })), []);
  const settle = useCallback((group: string, x: number) => { moveTo(group, x); void setSettled((now) => ({ ...now, [group]: x })); }, [moveTo, setSettled]);
  const zoomTo = useCallback((group: string, range: Range | null) => void setRanges((now) => (range ? { ...now, [group]: range } : orNothing(without(now, group)))), [setRanges]);
  const link = useMemo(() => ({ places: { ...settled, ...live }, ranges: ranges ?? {}, moveTo, settle, zoomTo }), [settled, live, ranges, moveTo, settle, zoomTo]);
  return <FigureOriginContext value={origin}><CursorContext value={link}>{children}</CursorContext></FigureOriginContext>;
}
