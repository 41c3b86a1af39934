'use client';
import type { Figure, FigurePlane } from '@/lib/engine/contract/measurement';
import { Saves } from '../plot-tools';
import { PlaneMap } from './plane-map';
import { PlaneTable } from './plane-table';

/** A map of two settings: the picture, its key, the ways to take it home, and the same values as a table. */
export function PlanePlot({ figure, plane }: { readonly figure: Figure; readonly plane: FigurePlane }) {
  return (
    <figure className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-1.5 text-small">
      <figcaption className="font-semibold">{figure.title}</figcaption>
      <PlaneMap figure={figure} plane={plane} />
      <Saves figure={figure} range={null} />
      <PlaneTable figure={figure} plane={plane} />
    </figure>
  );
}
