import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { acrossEnds, acrossScale, axisScale, type AxisScale } from './axis-scale';
import { dashOf, drawnAsPoints, drawnFull, type Panel } from './panels';
import { colourOf } from './plot-options';

const most = 400;

interface Span {
  readonly low: number;
  readonly high: number;
  readonly scale: AxisScale;
}

function spanOf(values: readonly (number | null)[], scale: AxisScale, margin: number): Span {
  const known = values.flatMap((v) => (v === null ? [] : [scale.toPlot(v)])).filter((v): v is number => v !== null && Number.isFinite(v));
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  const room = (high - low || Math.abs(high) || 1) * margin;
  return { low: low - room, high: high + room, scale };
}

/** Thousandths of the frame, or null where a value has no place on the axis. */
function place(value: number | null | undefined, span: Span): number | null {
  const at = value === null || value === undefined ? null : span.scale.toPlot(value);
  return at === null || !Number.isFinite(at) ? null : (1000 * (at - span.low)) / (span.high - span.low || 1);
}

function pathOf(figure: Figure, values: readonly (number | null)[], x: Span, y: Span): string {
  const every = Math.max(1, Math.ceil(values.length / most));
  let pen = 'M';
  let path = '';
  for (let i = 0; i < values.length; i += every) {
    const across = place(figure.x.values[i], x);
    const up = place(values[i], y);
    if (across === null || up === null) {
      pen = 'M';
      continue;
    }
    path += `${pen}${across.toFixed(1)} ${(1000 - up).toFixed(1)}`;
    pen = 'L';
  }
  return path;
}

function dotsOf(figure: Figure, series: FigureSeries, x: Span, y: Span): string {
  const dots = series.values.map((v, i) => [place(figure.x.values[i], x), place(v, y)] as const);
  return dots.map(([across, up]) => (across === null || up === null ? '' : `M${across.toFixed(1)} ${(1000 - up).toFixed(1)}h.01`)).join('');
}

function Trace({ figure, series, x, y }: { readonly figure: Figure; readonly series: FigureSeries; readonly x: Span; readonly y: Span }) {
  const stroke = `var(--${colourOf(series)})`;
  if (drawnAsPoints(figure, series)) return <path d={dotsOf(figure, series, x, y)} stroke={stroke} strokeWidth={drawnFull(series) ? 6 : 9} strokeLinecap="round" vectorEffect="non-scaling-stroke" />;
  return <path d={pathOf(figure, series.values, x, y)} fill="none" stroke={stroke} strokeWidth="1.6" strokeDasharray={dashOf(figure, series).join(' ') || undefined} vectorEffect="non-scaling-stroke" />;
}

/** The same panel without script: paths in a stretched SVG, the scales told in words below. */
export function StillPlot({ figure, panel }: { readonly figure: Figure; readonly panel: Panel }) {
  const x = spanOf(figure.x.values.length > 0 ? acrossEnds(figure) : [], acrossScale(figure), 0);
  const heights = panel.series.flatMap((s) => s.values);
  const y = spanOf(heights, axisScale(panel.scale, heights), 0.05);
  return (
    <svg viewBox="0 0 1000 1000" preserveAspectRatio="none" aria-hidden="true" className="h-full w-full bg-sheet">
      {panel.series.filter((s) => s.role !== 'band-low' && s.role !== 'band-high').map((s) => <Trace key={s.label + s.role} figure={figure} series={s} x={x} y={y} />)}
      <path d="M0 0H1000V1000H0Z" fill="none" stroke="var(--hair-2)" vectorEffect="non-scaling-stroke" />
    </svg>
  );
}
