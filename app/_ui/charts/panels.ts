/**
 * Plots: a Figure becomes panels (pure), a panel becomes options for the plotting library (pure),
 * and one component mounts it. Every panel of a claim with the same horizontal axis shares a cursor.
 */
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';

export interface Panel {
  readonly title: string;
  readonly heightPx: number;
  readonly series: readonly FigureSeries[];
  readonly scale: 'linear' | 'log';
  readonly unit: string;
  /** Only the last panel of a figure prints the horizontal axis. */
  readonly showsX: boolean;
}

export const isBand = (series: FigureSeries) => series.role === 'band-low' || series.role === 'band-high';

/** Errors are of a sweep alone; a band of any other figure says between what it lies. */
export function bandWords(figure: Figure): string {
  if (figure.kind === 'sweep') return figure.x.words ? 'error bar' : 'error band';
  return (['band-low', 'band-high'] as const).map((role) => figure.series.find((s) => s.role === role)?.label ?? '').join(' – ');
}

/** What must not share an axis: two units on one plot would invite a wrong reading. */
const groupKey = (series: FigureSeries) => (series.role === 'residual' ? 'residual' : `${series.axis} ${series.scale} ${series.unit}`);

/** Stacked panels instead of two vertical axes: main traces first, then residual or the other unit. */
export function panelsOf(figure: Figure): readonly Panel[] {
  const keys = [...new Set(figure.series.map(groupKey))];
  const main = keys.find((key) => figure.series.some((s) => groupKey(s) === key && (s.role === 'recomputed' || s.role === 'claimed'))) ?? keys[0];
  const ordered = [...keys].sort((a, b) => Number(b === main) - Number(a === main));
  return ordered.map((key, i) => {
    const series = figure.series.filter((s) => groupKey(s) === key);
    const lines = series.filter((s) => !isBand(s));
    return {
      title: lines.map((s) => s.label).join(', '),
      heightPx: key === 'residual' ? 104 : i === 0 ? 210 : 150,
      series: [...lines, ...series.filter(isBand)],
      scale: series.every((x) => x.scale === 'log') ? 'log' : 'linear',
      unit: series[0]?.unit ?? '',
      showsX: i === ordered.length - 1,
    };
  });
}

/** The claimed values of a sweep are points, and all of them over words, between which nothing lies; claimed traces of waveforms are lines. */
export const drawnAsPoints = (figure: Figure, series: FigureSeries): boolean =>
  series.points === true || (figure.kind === 'sweep' && (figure.x.words !== undefined || series.role === 'claimed' || (series.role === 'varied' && isLonely(series))));

/** Where both are points, the recomputed one is full: told apart without colour. */
export const drawnFull = (series: FigureSeries): boolean => series.role === 'recomputed';

/** One value of a sweep makes no line. */
const isLonely = (series: FigureSeries): boolean => series.values.filter((value) => value !== null).length < 2;

/** Two traces run together in a waveform plot and under a variation: there, and only there, the recomputed one is dashed. */
export const drawnDashed = (figure: Figure, series: FigureSeries): boolean =>
  series.role === 'recomputed' && (figure.kind === 'waveforms' || figure.series.some(({ role }) => role === 'varied'));

const patterns: readonly (readonly number[])[] = [[], [7, 3], [2, 2.5], [9, 3, 2, 3], [12, 3, 2, 3, 2, 3]];

/** Strokes and gaps of a line; empty for a solid one. Lines of one colour and one unit never share a pattern. */
export function dashOf(figure: Figure, series: FigureSeries): readonly number[] {
  if (drawnDashed(figure, series)) return [5, 3];
  const alike = figure.series.filter((s) => s.role === series.role && s.unit === series.unit && s.axis === series.axis && !drawnAsPoints(figure, s));
  return patterns[Math.max(0, alike.indexOf(series)) % patterns.length] ?? [];
}

/** Plots of one claim move their cursors together when their horizontal axes mean the same. */
export const cursorGroup = (claimId: string, figure: Figure): string => [claimId, figure.x.label, figure.x.unit].map(word).join('.');

/** A name that an address can hold. */
const word = (text: string): string => text.normalize('NFKD').replace(/[^A-Za-z0-9_]+/g, '-').slice(0, 40);
