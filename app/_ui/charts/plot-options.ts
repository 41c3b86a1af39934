import type uPlot from 'uplot';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import type { Palette } from '../tokens';
import { acrossScale, axisScale, type AxisScale } from './axis-scale';
import { dashOf, drawnAsPoints, drawnFull, panelsOf, type Panel } from './panels';

export interface PlotSpec {
  readonly options: Omit<uPlot.Options, 'width'>;
  readonly data: uPlot.AlignedData;
}

const roleColour: Record<FigureSeries['role'], keyof Palette> = {
  claimed: 'trace-claimed',
  recomputed: 'trace-recomputed',
  varied: 'ink',
  residual: 'ink-2',
  noise: 'ink-2',
  'band-low': 'trace-recomputed',
  'band-high': 'trace-recomputed',
};
export const colourOf = (series: FigureSeries): keyof Palette => roleColour[series.role];

/** Over words a band would join what is apart: an upright bar at each instead, from the lower edge to the upper. */
const bars = (lower: number): uPlot.Series.PathBuilder => (u, upper, from, to) => {
  const stroke = new Path2D();
  for (let i = from; i <= to; i++) {
    const [x, low, high] = [u.data[0][i], u.data[lower]?.[i], u.data[upper]?.[i]];
    if (x === undefined || typeof low !== 'number' || typeof high !== 'number') continue;
    const across = u.valToPos(x, 'x', true);
    stroke.moveTo(across, u.valToPos(low, 'y', true));
    stroke.lineTo(across, u.valToPos(high, 'y', true));
  }
  return { stroke };
};

function seriesOptions(figure: Figure, panel: Panel, series: FigureSeries, palette: Palette): uPlot.Series {
  const stroke = palette[colourOf(series)];
  const base = { label: series.label, scale: 'y', spanGaps: false };
  if (series.role === 'band-high' && figure.x.words) return { ...base, stroke, width: 1.6, points: { show: false }, paths: bars(panel.series.findIndex((s) => s.role === 'band-low') + 1) };
  if (series.role === 'band-low' || series.role === 'band-high') return { ...base, stroke: 'transparent', width: 0, points: { show: false } };
  if (drawnAsPoints(figure, series)) return { ...base, stroke, width: 0, points: { show: true, size: drawnFull(series) ? 7 : 9, width: 2.5, stroke, fill: drawnFull(series) ? stroke : palette.sheet } };
  return { ...base, stroke, width: 1.6, dash: dashOf(figure, series).length > 0 ? [...dashOf(figure, series)] : undefined, points: { show: false } };
}

function bandsOf(figure: Figure, panel: Panel, palette: Palette): uPlot.Band[] {
  if (figure.x.words) return [];
  const high = panel.series.findIndex((s) => s.role === 'band-high');
  const low = panel.series.findIndex((s) => s.role === 'band-low');
  return high >= 0 && low >= 0 ? [{ series: [high + 1, low + 1], fill: palette.band }] : [];
}

const splitsOf = (scale: AxisScale): uPlot.Axis['splits'] => (scale.ticks ? (_u, _axis, low, high) => [...(scale.ticks?.(low, high) ?? [])] : undefined);

const NARROW_PX = 64;
const WIDE_PX = 88;

/** Room for `−0.25 × 10⁻²¹` where any panel needs it: stacked panels keep their edges in line, and no sign is cut off. */
function labelRoom(figure: Figure): number {
  const scales = panelsOf(figure).map((panel) => axisScale(panel.scale, panel.series.flatMap((s) => s.values)));
  return scales.some((scale) => scale.labels([1]).some((label) => label.includes('×'))) ? WIDE_PX : NARROW_PX;
}

/** Options for one panel. Type is 12 px at any width; colours come from the tokens of the theme in use. */
export function plotSpec(figure: Figure, panel: Panel, palette: Palette): PlotSpec {
  const grid = { stroke: palette.hair, width: 1 };
  const axis = { stroke: palette['ink-2'], font: '12px sans-serif', grid, ticks: { show: false } };
  const x = acrossScale(figure);
  const y = axisScale(panel.scale, panel.series.flatMap((s) => s.values));
  const options: Omit<uPlot.Options, 'width'> = {
    height: panel.heightPx,
    legend: { show: false },
    padding: [8, 16, panel.showsX ? 0 : 8, 0],
    cursor: { drag: { x: true, y: false, setScale: false }, points: { size: 7 }, y: false },
    scales: { x: { time: false } },
    axes: [
      { ...axis, scale: 'x', size: panel.showsX ? 28 : 0, splits: splitsOf(x), values: (_, places) => (panel.showsX ? x.labels(places) : places.map(() => '')) },
      { ...axis, scale: 'y', size: labelRoom(figure), gap: 6, splits: splitsOf(y), values: (_, places) => y.labels(places) },
    ],
    series: [{ label: figure.x.label }, ...panel.series.map((s) => seriesOptions(figure, panel, s, palette))],
    bands: bandsOf(figure, panel, palette),
  };
  const column = (values: readonly (number | null)[], scale: AxisScale) => values.map((v) => (v === null ? null : scale.toPlot(v)));
  return { options, data: [column(figure.x.values, x), ...panel.series.map((s) => column(s.values, y))] as uPlot.AlignedData };
}
