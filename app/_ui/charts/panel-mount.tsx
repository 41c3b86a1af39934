'use client';
import { useEffect, useMemo, useRef, useState, type ReactNode } from 'react';
import type uPlot from 'uplot';
import type { Figure } from '@/lib/engine/contract/measurement';
import { acrossEnds, acrossScale } from './axis-scale';
import { usePalette } from './palette-in-use';
import type { Panel } from './panels';
import { plotSpec } from './plot-options';
import type { Range } from './zoom';

interface PanelMountProps {
  readonly figure: Figure;
  readonly panel: Panel;
  readonly index: number;
  readonly range: Range | null;
  readonly onIndex: (index: number) => void;
  readonly onChoice: (index: number) => void;
  readonly onRange: (range: Range) => void;
  /** Drawn on the server; stands until the live plot does. */
  readonly still: ReactNode;
}

/** What the plotting library is told to call back, always as of the latest drawing. */
type Reports = Pick<PanelMountProps, 'onIndex' | 'onChoice' | 'onRange'>;

/** A shorter stroke of the pointer is a click. */
const SHORTEST_DRAG_PX = 6;

/** Where values lie on the library's own axis. */
const viewIn = (figure: Figure, range: Range | null): { min: number; max: number } | null => {
  const scale = acrossScale(figure);
  const [low, high] = (range ?? acrossEnds(figure)).map((end) => scale.toPlot(end));
  return low === null || high === null || low === undefined || high === undefined || !(high > low) ? null : { min: low, max: high };
};

function showAt(plot: uPlot, data: uPlot.AlignedData, index: number) {
  const x = data[0][index];
  if (x === undefined || x === null) return;
  plot.setCursor({ left: plot.valToPos(x, 'x'), top: plot.over.clientHeight / 2 }, false);
}

/** Pointer: what it passes over, a click that chooses, a stroke that becomes the view. */
function hooksFor(figure: Figure, reports: { readonly current: Reports }, restore: (u: uPlot) => void): uPlot.Hooks.Arrays {
  const scale = acrossScale(figure);
  return {
    ready: [restore],
    setSize: [restore],
    setCursor: [(u) => { if (typeof u.cursor.idx === 'number') reports.current.onIndex(u.cursor.idx); }],
    setSelect: [(u) => {
      const { left, width } = u.select;
      if (width >= SHORTEST_DRAG_PX) reports.current.onRange([scale.fromPlot(u.posToVal(left, 'x')), scale.fromPlot(u.posToVal(left + width, 'x'))]);
      else if (typeof u.cursor.idx === 'number') reports.current.onChoice(u.cursor.idx);
      if (width > 0) u.setSelect({ left: 0, top: 0, width: 0, height: 0 }, false);
    }],
  };
}

/** A canvas does not inherit the page's typeface: it is told. */
const inTypeOf = (element: HTMLElement, axes: uPlot.Axis[] = []): uPlot.Axis[] => {
  const font = `12px ${getComputedStyle(element).fontFamily}`;
  return axes.map((axis) => ({ ...axis, font }));
};

/** The one place where the plotting library is mounted. It waits until its box has a width, so a closed claim costs nothing. */
export function PanelMount({ figure, panel, index, range, onIndex, onChoice, onRange, still }: PanelMountProps) {
  const box = useRef<HTMLDivElement>(null);
  const plot = useRef<uPlot | null>(null);
  const reports = useRef<Reports>({ onIndex, onChoice, onRange });
  const at = useRef({ index, range });
  const [live, setLive] = useState(false);
  const palette = usePalette();
  const spec = useMemo(() => plotSpec(figure, panel, palette), [figure, panel, palette]);
  useEffect(() => {
    reports.current = { onIndex, onChoice, onRange };
    at.current = { index, range };
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
      const restore = (u: uPlot) => {
        const view = viewIn(figure, at.current.range);
        if (view) u.setScale('x', view);
        showAt(u, spec.data, at.current.index);
      };
      plot.current = new UPlot({ ...spec.options, axes: inTypeOf(element, spec.options.axes), width, hooks: hooksFor(figure, reports, restore) }, spec.data, element);
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
  }, [figure, spec, panel.heightPx]);
  useEffect(() => {
    const view = plot.current && viewIn(figure, range);
    if (plot.current && view) plot.current.setScale('x', view);
  }, [figure, range, spec]);
  useEffect(() => {
    if (plot.current) showAt(plot.current, spec.data, index);
  }, [index, range, spec]);
  return (
    <div className="relative min-w-0" style={{ height: panel.heightPx }}>
      <div ref={box} className="absolute inset-0" />
      {!live && <div className="absolute inset-0 ml-16">{still}</div>}
    </div>
  );
}
