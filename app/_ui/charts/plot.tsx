'use client';
import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';
import type uPlot from 'uplot';
import type { Figure } from '@/lib/engine/contract/measurement';
import { UnitLabel } from '../math/unit-label';
import { nearestIndex, useCursorLink } from './cursor-link';
import { usePalette } from './palette-in-use';
import { cursorGroup, drawnAsPoints, drawnDashed, panelsOf, type Panel } from './panels';
import { colourOf, plotSpec } from './plot-options';
import { readoutOf, steppedIndex } from './readout';
import { ValuesTable } from './values-table';

interface PanelMountProps {
  readonly figure: Figure;
  readonly panel: Panel;
  readonly index: number;
  readonly onIndex: (index: number) => void;
  /** Drawn on the server; stands until the live plot does. */
  readonly still: ReactNode;
}

/** The one place where the plotting library is mounted. It waits until its box has a width, so a closed claim costs nothing. */
function PanelMount({ figure, panel, index, onIndex, still }: PanelMountProps) {
  const box = useRef<HTMLDivElement>(null);
  const plot = useRef<uPlot | null>(null);
  const report = useRef(onIndex);
  const at = useRef(index);
  const [live, setLive] = useState(false);
  const palette = usePalette();
  const spec = useMemo(() => plotSpec(figure, panel, palette), [figure, panel, palette]);
  useEffect(() => {
    report.current = onIndex;
    at.current = index;
  });
  useEffect(() => {
    const element = box.current;
    if (!element) return;
    let gone = false;
    let loading = false;
    const mount = async (width: number) => {
      loading = true;
      const { default: UPlot } = await import('uplot');
      if (gone) return;
      const restore = (u: uPlot) => showAt(u, spec.data, at.current);
      const follow = (u: uPlot) => {
        if (typeof u.cursor.idx === 'number') report.current(u.cursor.idx);
      };
      plot.current = new UPlot({ ...spec.options, axes: inTypeOf(element, spec.options.axes), width, hooks: { ready: [restore], setSize: [restore], setCursor: [follow] } }, spec.data, element);
      setLive(true);
    };
    const observer = new ResizeObserver(([entry]) => {
      const width = Math.floor(entry?.contentRect.width ?? 0);
      if (width === 0) return;
      if (plot.current) plot.current.setSize({ width, height: panel.heightPx });
      else if (!loading) void mount(width);
    });
    observer.observe(element);
    return () => {
      gone = true;
      observer.disconnect();
      plot.current?.destroy();
      plot.current = null;
    };
  }, [spec, panel.heightPx]);
  useEffect(() => {
    if (plot.current) showAt(plot.current, spec.data, index);
  }, [index, spec]);
  return (
    <div className="relative min-w-0" style={{ height: panel.heightPx }}>
      <div ref={box} className="absolute inset-0" />
      {!live && <div className="absolute inset-0 ml-16">{still}</div>}
    </div>
  );
}

/** A canvas does not inherit the page's typeface: it is told. */
const inTypeOf = (element: HTMLElement, axes: uPlot.Axis[] = []): uPlot.Axis[] => {
  const font = `12px ${getComputedStyle(element).fontFamily}`;
  return axes.map((axis) => ({ ...axis, font }));
};

function showAt(plot: uPlot, data: uPlot.AlignedData, index: number) {
  const x = data[0][index];
  if (x === undefined || x === null) return;
  plot.setCursor({ left: plot.valToPos(x, 'x'), top: plot.over.clientHeight / 2 }, false);
}

function Key({ figure }: { readonly figure: Figure }) {
  const hasBand = figure.series.some((s) => s.role === 'band-high');
  return (
    <span className="flex flex-wrap gap-x-4 gap-y-0.5 font-normal text-ink-2">
      {figure.series.filter((s) => s.role !== 'band-low' && s.role !== 'band-high').map((s) => (
        <span key={s.label + s.role} className="min-w-0">
          <svg viewBox="0 0 24 8" aria-hidden="true" className="mr-1.5 inline-block h-2 w-6">
            {drawnAsPoints(figure, s) ? (
              <circle cx="12" cy="4" r="3" fill="none" strokeWidth="2" stroke={`var(--${colourOf(s)})`} />
            ) : (
              <path d="M0 4H24" fill="none" strokeWidth="1.6" stroke={`var(--${colourOf(s)})`} strokeDasharray={drawnDashed(figure, s) ? '5 3' : undefined} />
            )}
          </svg>
          {s.label}{s.unit && <>, <UnitLabel unit={s.unit} /></>}
        </span>
      ))}
      {hasBand && <span className="whitespace-nowrap"><svg viewBox="0 0 24 8" aria-hidden="true" className="mr-1.5 inline-block h-2 w-6"><rect width="24" height="8" fill="var(--band)" /></svg>error band</span>}
    </span>
  );
}

/** One figure: its panels, a cursor for pointer and keyboard, a live readout with units, and the same values as a table. */
export function Plot({ claimId, figure, stills }: { readonly claimId: string; readonly figure: Figure; readonly stills: readonly ReactNode[] }) {
  const panels = useMemo(() => panelsOf(figure), [figure]);
  const group = cursorGroup(claimId, figure);
  const link = useCursorLink();
  const count = figure.x.values.length;
  const place = link.places[group];
  const index = place === undefined ? Math.floor(count / 2) : nearestIndex(figure.x.values, place);
  const readout = count > 0 ? readoutOf(figure, index) : 'no values';
  const moveTo = (next: number) => link.moveTo(group, figure.x.values[next] ?? 0);
  const onKeyDown = (event: KeyboardEvent) => {
    const next = steppedIndex(event.key, index, count, event.shiftKey);
    if (next === null) return;
    event.preventDefault();
    moveTo(next);
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
        onKeyDown={onKeyDown}
      >
        {panels.map((panel, i) => <PanelMount key={i} figure={figure} panel={panel} index={index} onIndex={moveTo} still={stills[i]} />)}
      </div>
      <div className="flex flex-wrap justify-between gap-x-3 text-micro text-ink-2">
        <output className="text-ink">{readout}</output>
        <span className="ml-auto">{figure.x.label}{figure.x.unit && <>, <UnitLabel unit={figure.x.unit} /></>}</span>
      </div>
      <ValuesTable figure={figure} />
    </figure>
  );
}
