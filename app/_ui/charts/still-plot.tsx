import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { drawnAsPoints, drawnDashed, type Panel } from './panels';
import { colourOf } from './plot-options';

const most = 400;

interface Span {
  readonly low: number;
  readonly high: number;
  readonly log: boolean;
}

function spanOf(values: readonly (number | null)[], log: boolean, margin: number): Span {
  const known = values.flatMap((v) => (v !== null && Number.isFinite(v) && (!log || v > 0) ? [log ? Math.log10(v) : v] : []));
  const low = known.reduce((a, b) => Math.min(a, b), Infinity);
  const high = known.reduce((a, b) => Math.max(a, b), -Infinity);
  const room = (high - low || Math.abs(high) || 1) * margin;
  return { low: low - room, high: high + room, log };
}

const place = (value: number, span: Span): number => (1000 * ((span.log ? Math.log10(value) : value) - span.low)) / (span.high - span.low || 1);

function pathOf(figure: Figure, values: readonly (number | null)[], x: Span, y: Span): string {
  const every = Math.max(1, Math.ceil(values.length / most));
  let pen = 'M';
  let path = '';
  for (let i = 0; i < values.length; i += every) {
    const value = values[i] ?? null;
    const at = figure.x.values[i];
    if (value === null || at === undefined || (y.log && value <= 0) || (x.log && at <= 0)) {
      pen = 'M';
      continue;
    }
    path += `${pen}${place(at, x).toFixed(1)} ${(1000 - place(value, y)).toFixed(1)}`;
    pen = 'L';
  }
  return path;
}

function Trace({ figure, series, x, y }: { readonly figure: Figure; readonly series: FigureSeries; readonly x: Span; readonly y: Span }) {
  const stroke = `var(--${colourOf(series)})`;
  if (drawnAsPoints(figure, series)) {
    const dots = series.values.flatMap((v, i) => (v === null ? [] : [`M${place(figure.x.values[i] ?? 0, x).toFixed(1)} ${(1000 - place(v, y)).toFixed(1)}h.01`]));
    return <path d={dots.join('')} stroke={stroke} strokeWidth="9" strokeLinecap="round" vectorEffect="non-scaling-stroke" />;
  }
  return <path d={pathOf(figure, series.values, x, y)} fill="none" stroke={stroke} strokeWidth="1.6" strokeDasharray={drawnDashed(figure, series) ? '5 3' : undefined} vectorEffect="non-scaling-stroke" />;
}

/** The same panel without script: paths in a stretched SVG, the scales told in words below. */
export function StillPlot({ figure, panel }: { readonly figure: Figure; readonly panel: Panel }) {
  const x = spanOf(figure.x.values, figure.x.scale === 'log', 0);
  const y = spanOf(panel.series.flatMap((s) => s.values), panel.scale === 'log', 0.05);
  return (
    <svg viewBox="0 0 1000 1000" preserveAspectRatio="none" aria-hidden="true" className="h-full w-full bg-sheet">
      {panel.series.filter((s) => s.role !== 'band-low' && s.role !== 'band-high').map((s) => <Trace key={s.label + s.role} figure={figure} series={s} x={x} y={y} />)}
      <path d="M0 0H1000V1000H0Z" fill="none" stroke="var(--hair-2)" vectorEffect="non-scaling-stroke" />
    </svg>
  );
}
