import type uPlot from 'uplot';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import type { Palette } from '../tokens';
import { formatNumber } from '../math/format-number';
import { drawnAsPoints, drawnDashed, type Panel } from './panels';

export interface PlotSpec {
  readonly options: Omit<uPlot.Options, 'width'>;
  readonly data: uPlot.AlignedData;
}

const roleColour: Record<FigureSeries['role'], keyof Palette> = {
  claimed: 'trace-claimed',
  recomputed: 'trace-recomputed',
  residual: 'ink-2',
  noise: 'ink-2',
  'band-low': 'trace-recomputed',
  'band-high': 'trace-recomputed',
};
export const colourOf = (series: FigureSeries): keyof Palette => roleColour[series.role];

const tickText = (value: number): string => formatNumber(value, Math.abs(value) >= 1e-3 || value === 0 ? {} : { significant: 1 });

/** Ticks keep the digits that tell them apart, and no noise of binary fractions. */
export function tickLabels(values: readonly (number | null)[]): string[] {
  const known = values.filter((v): v is number => v !== null);
  const step = known.length > 1 ? Math.abs((known[1] ?? 0) - (known[0] ?? 0)) : 0;
  return values.map((value) => {
    if (value === null) return '';
    const rounded = step > 0 ? Number((Math.round(value / step) * step).toPrecision(12)) : value;
    return tickText(Math.abs(rounded - value) < 1e-9 * Math.abs(step) ? rounded : Number(value.toPrecision(12)));
  });
}

/** On a log axis only powers of ten speak; between them the grid stays mute. */
export const decadeLabels = (values: readonly (number | null)[]): string[] =>
  values.map((value) => (value !== null && value > 0 && Math.abs(Math.log10(value) - Math.round(Math.log10(value))) < 1e-9 ? tickText(value) : ''));

/** A frequency axis spans few decades, so 2 and 5 speak there as well. */
export const frequencyLabels = (values: readonly (number | null)[]): string[] =>
  values.map((value) => {
    if (value === null || !(value > 0)) return '';
    const lead = value / 10 ** Math.floor(Math.log10(value) + 1e-9);
    return [1, 2, 5].some((d) => Math.abs(lead - d) < 1e-6) ? tickText(value) : '';
  });

function seriesOptions(figure: Figure, series: FigureSeries, palette: Palette, showPoint: (series: FigureSeries) => boolean): uPlot.Series {
  const stroke = palette[colourOf(series)];
  const base = { label: series.label, scale: 'y', spanGaps: false };
  if (series.role === 'band-low' || series.role === 'band-high') return { ...base, stroke: 'transparent', width: 0, points: { show: false } };
  if (showPoint(series)) return { ...base, stroke, width: 0, points: { show: true, size: 9, width: 2.5, stroke, fill: palette.sheet } };
  return { ...base, stroke, width: 1.6, dash: drawnDashed(figure, series) ? [5, 3] : undefined, points: { show: false } };
}

function bandsOf(panel: Panel, palette: Palette): uPlot.Band[] {
  const high = panel.series.findIndex((s) => s.role === 'band-high');
  const low = panel.series.findIndex((s) => s.role === 'band-low');
  return high >= 0 && low >= 0 ? [{ series: [high + 1, low + 1], fill: palette.band }] : [];
}

/** Options for one panel. Type is 12 px at any width; colours come from the tokens of the theme in use. */
export function plotSpec(figure: Figure, panel: Panel, palette: Palette): PlotSpec {
  const font = '12px var(--font-sans), sans-serif';
  const grid = { stroke: palette.hair, width: 1 };
  const axis = { stroke: palette['ink-2'], font, grid, ticks: { show: false } };
  const logX = figure.x.scale === 'log' && figure.x.values.every((x) => x > 0);
  const options: Omit<uPlot.Options, 'width'> = {
    height: panel.heightPx,
    legend: { show: false },
    padding: [8, 12, panel.showsX ? 0 : 8, 0],
    cursor: { drag: { x: false, y: false }, points: { size: 7 }, y: false },
    scales: { x: { time: false, distr: logX ? 3 : 1 }, y: { distr: panel.scale === 'log' ? 3 : 1 } },
    axes: [
      { ...axis, scale: 'x', show: true, size: panel.showsX ? 28 : 0, values: panel.showsX ? (_, ticks) => (logX ? frequencyLabels(ticks) : tickLabels(ticks)) : () => [] },
      { ...axis, scale: 'y', size: 56, gap: 6, values: (_, ticks) => (panel.scale === 'log' ? decadeLabels(ticks) : tickLabels(ticks)) },
    ],
    series: [{ label: figure.x.label }, ...panel.series.map((s) => seriesOptions(figure, s, palette, (x) => drawnAsPoints(figure, x)))],
    bands: bandsOf(panel, palette),
  };
  return { options, data: [figure.x.values, ...panel.series.map((s) => s.values)] as uPlot.AlignedData };
}
