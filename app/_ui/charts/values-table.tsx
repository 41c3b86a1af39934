'use client';
import { useState } from 'react';
import type { Figure } from '@/lib/engine/contract/measurement';
import { formatNumber } from '../math/format-number';
import { UnitLabel } from '../math/unit-label';
import { Icon } from '../primitives/icon';

/** The plot's values as a table, filled only when opened: for those who cannot see the plot, and for those who copy. */
export function ValuesTable({ figure }: { readonly figure: Figure }) {
  const [open, setOpen] = useState(false);
  return (
    <details className="group/d" onToggle={(event) => setOpen(event.currentTarget.open)}>
      <summary className="inline-flex min-h-8 cursor-pointer list-none items-center gap-2 rounded pr-2 text-small text-link hover:bg-hover [&::-webkit-details-marker]:hidden">
        <Icon name="open" className="size-2.5 transition-transform duration-quick group-open/d:rotate-90" />
        The same values as a table<span className="sr-only">: {figure.title}</span>
      </summary>
      {open && (
        <div className="max-h-80 overflow-auto" tabIndex={0} role="group" aria-label={`Values of ${figure.title}`}>
          <table className="tbl">
            <caption className="sr-only">{figure.title}</caption>
            <thead>
              <tr>
                <th scope="col" className="num">{figure.x.label}{figure.x.unit && <>, <UnitLabel unit={figure.x.unit} /></>}</th>
                {figure.series.map((s) => <th key={s.label + s.role} scope="col" className="num">{s.label}{s.unit && <>, <UnitLabel unit={s.unit} /></>}</th>)}
              </tr>
            </thead>
            <tbody>
              {figure.x.values.map((x, i) => (
                <tr key={i}>
                  <th scope="row" className="num font-normal!">{figure.x.words?.[i] ?? formatNumber(x, { significant: 8 })}</th>
                  {figure.series.map((s) => <td key={s.label + s.role} className="num">{(s.values[i] ?? null) === null ? 'no value' : formatNumber(s.values[i] ?? null, { significant: 8 })}</td>)}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      )}
    </details>
  );
}
