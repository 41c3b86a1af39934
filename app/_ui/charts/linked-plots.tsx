'use client';
import { useCallback, useMemo, useState, type ReactNode } from 'react';
import { CursorContext } from './cursor-link';

/** Around everything of one claim: its figures with the same horizontal axis share one cursor. */
export function LinkedPlots({ children }: { readonly children: ReactNode }) {
  const [places, setPlaces] = useState<Readonly<Record<string, number>>>({});
  const moveTo = useCallback((group: string, x: number) => setPlaces((now) => (now[group] === x ? now : { ...now, [group]: x })), []);
  const link = useMemo(() => ({ places, moveTo }), [places, moveTo]);
  return <CursorContext value={link}>{children}</CursorContext>;
}
