'use client';
import { useMemo, type KeyboardEvent, type ReactNode } from 'react';
import type { Figure } from '@/lib/engine/contract/measurement';
import { UnitLabel } from '../math/unit-label';
import { acrossEnds, acrossScale } from './axis-scale';
import { nearestIndex, useCursorLink } from './cursor-link';
import { PanelMount } from './panel-mount';
import { bandWords, cursorGroup, dashOf, drawnAsPoints, drawnFull, panelsOf } from './panels';
import { colourOf } from './plot-options';
import { PlotTools } from './plot-tools';
import { readoutOf, steppedIndex } from './readout';
import { ValuesTable } from './values-table';
import { followed, shownRange, zoomedBy, type Range } from './zoom';

function Key({ figure }: { readonly figure: Figure }) {
  const hasBand = figure.series.some((s) => s.role === 'band-high');
  return (
    <span className="flex flex-wrap gap-x-4 gap-y-0.5 font-normal text-ink-2">
      {figure.series.filter((s) => s.role !== 'band-low' && s.role !== 'band-high').map((s) => (
        <span key={s.label + s.role} className="min-w-0">
          <svg viewBox="0 0 24 8" aria-hidden="true" className="mr-1.5 inline-block h-2 w-6">
            {drawnAsPoints(figure, s) ? (
              <circle cx="12" cy="4" r="3" fill={drawnFull(s) ? `var(--${colourOf(s)})` : 'none'} strokeWidth="2" stroke={`var(--${colourOf(s)})`} />
            ) : (
              <path d="M0 4H24" fill="none" strokeWidth="1.6" stroke={`var(--${colourOf(s)})`} strokeDasharray={dashOf(figure, s).join(' ') || undefined} />
            )}
          </svg>
          {s.label}{s.unit && <>, <UnitLabel unit={s.unit} /></>}
        </span>
      ))}
      {hasBand && <span className="whitespace-nowrap"><svg viewBox="0 0 24 8" aria-hidden="true" className="mr-1.5 inline-block h-2 w-6">{figure.x.words ? <path d="M12 0V8" stroke="var(--trace-recomputed)" strokeWidth="1.6" /> : <rect width="24" height="8" fill="var(--band)" />}</svg>{bandWords(figure)}</span>}
    </span>
  );
}

/** Cursor and view of one figure, shared with all of its claim that have the same horizontal axis. */
function useView(claimId: string, figure: Figure) {
  const group = cursorGroup(claimId, figure);
  const link = useCursorLink();
  const xs = figure.x.values;
  const axis = useMemo(() => ({ scale: acrossScale(figure), whole: acrossEnds(figure) as Range }), [figure]);
  const asked = link.ranges[group];
  const range = useMemo(() => shownRange(asked, axis), [asked, axis]);
  const place = link.places[group];
  const index = place === undefined ? Math.floor(xs.length / 2) : nearestIndex(xs, place);
  const at = (next: number) => xs[next] ?? 0;
  const zoomTo = (next: Range | null) => link.zoomTo(group, next);
  const settle = (next: number) => {
    link.settle(group, at(next));
    const moved = followed(at(next), range, axis);
    if (moved !== range) zoomTo(moved);
  };
  return { range, index, settle, zoomTo, moveTo: (next: number) => link.moveTo(group, at(next)), zoomBy: (factor: number) => zoomTo(zoomedBy(factor, at(index), range, axis)) };
}

const zoomKeys: Readonly<Record<string, number>> = { '+': 0.5, '=': 0.5, '-': 2, '−': 2 };

/** One figure: its panels, a cursor and a view for pointer and keyboard, a live readout with units, and the same values as a table or a file. */
export function Plot({ claimId, figure, stills }: { readonly claimId: string; readonly figure: Figure; readonly stills: readonly ReactNode[] }) {
  const panels = useMemo(() => panelsOf(figure), [figure]);
  const { range, index, settle, zoomTo, moveTo, zoomBy } = useView(claimId, figure);
  const count = figure.x.values.length;
  const readout = count > 0 ? readoutOf(figure, index) : 'no values';
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const factor = zoomKeys[event.key];
    const next = steppedIndex(event.key, index, count, event.shiftKey);
    if (factor !== undefined) zoomBy(factor);
    else if (event.key === '0') zoomTo(null);
    else if (next !== null) settle(next);
    else return;
    event.preventDefault();
  };
  return (
    <figure className="grid min-w-0 grid-cols-[minmax(0,1fr)] content-start gap-1.5 text-small">
      <figcaption className="flex flex-wrap items-baseline gap-x-4 gap-y-0.5 font-semibold"><span>{figure.title}</span><Key figure={figure} /></figcaption>
      <div
        role="slider"
        tabIndex={0}
        aria-label={`Cursor of “${figure.title}” along ${figure.x.label}`}
        aria-valuemin={0}
        aria-valuemax={Math.max(0, count - 1)}
        aria-valuenow={index}
        aria-valuetext={readout}
        aria-keyshortcuts="+ - 0"
        onKeyDown={onKeyDown}
      >
        {panels.map((panel, i) => <PanelMount key={i} figure={figure} panel={panel} index={index} range={range} onIndex={moveTo} onChoice={settle} onRange={zoomTo} still={stills[i]} />)}
      </div>
      <div className="flex flex-wrap justify-between gap-x-3 text-micro text-ink-2">
        <output className="text-ink">{readout}</output>
        <span className="ml-auto">{figure.x.label}{figure.x.unit && <>, <UnitLabel unit={figure.x.unit} /></>}</span>
      </div>
      <PlotTools figure={figure} range={range} onZoom={zoomBy} onReset={() => zoomTo(null)} />
      <ValuesTable figure={figure} />
    </figure>
  );
}
