'use client';
import { useState } from 'react';
import type { Figure, FigurePlane } from '@/lib/engine/contract/measurement';
import { formatNumber } from '../../math/format-number';
import { withUnit } from '../export/figure-words';
import { Icon } from '../../primitives/icon';

const MOST = 13;

/** Ends and some between: a table that can be read. */
export const thinnedPlaces = (n: number): number[] => (n <= MOST ? Array.from({ length: n }, (_, i) => i) : Array.from({ length: MOST }, (_, k) => Math.round((k * (n - 1)) / (MOST - 1))));

/** The map as a table, filled only when opened: rows downwards as the map has them upwards. */
export function PlaneTable({ figure, plane }: { readonly figure: Figure; readonly plane: FigurePlane }) {
  const [open, setOpen] = useState(false);
  const [columns, rows] = [thinnedPlaces(figure.x.values.length), thinnedPlaces(plane.y.values.length).reverse()];
  const levelAt = (i: number, j: number) => plane.level.values[j * figure.x.values.length + i] ?? null;
  const short = (value: number | null | undefined) => formatNumber(value ?? null, { significant: 4 });
  return (
    <details className="group/d" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="inline-flex min-h-8 cursor-pointer list-none items-center gap-2 rounded pr-2 text-small text-link hover:bg-hover [&::-webkit-details-marker]:hidden">
        <Icon name="open" className="size-2.5 transition-transform duration-quick group-open/d:rotate-90" />
        The same values as a table<span className="sr-only">: {figure.title}</span>
      </summary>
      {open && (
        <div className="max-h-96 overflow-auto" tabIndex={0} role="group" aria-label={`Values of ${figure.title}`}>
          <table className="tbl">
            <caption className="text-left text-micro text-ink-2">{withUnit(plane.level.label, plane.level.unit)}. Across: {withUnit(figure.x.label, figure.x.unit)}; down: {withUnit(plane.y.label, plane.y.unit)}. Saved as CSV it has every value of the map.</caption>
            <thead><tr><td />{columns.map((i) => <th key={i} scope="col" className="num">{short(figure.x.values[i])}</th>)}</tr></thead>
            <tbody>
              {rows.map((j) => (
                <tr key={j}>
                  <th scope="row" className="num font-normal!">{short(plane.y.values[j])}</th>
                  {columns.map((i) => <td key={i} className="num">{levelAt(i, j) === null ? 'no value' : short(levelAt(i, j))}</td>)}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </details>
  );
}
