import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { light } from '../../tokens';
import { drawnAsPoints, drawnFull, isBand } from '../panels';
import { colourOf } from '../plot-options';

export interface TraceStyle {
  readonly colour: string;
  readonly width: number;
  /** Stroke pattern; empty for a solid line. */
  readonly dash: string;
  readonly points: boolean;
  /** A point that is filled. */
  readonly full: boolean;
}

/** On paper the line tells traces apart, not the colour: two of one figure never share a pattern. */
const patterns = ['', '7 3', '2 2.5', '9 3 2 3', '12 3 2 3 2 3'] as const;

export function traceStyle(figure: Figure, series: FigureSeries): TraceStyle {
  const lines = figure.series.filter((s) => !isBand(s) && !drawnAsPoints(figure, s));
  const points = drawnAsPoints(figure, series);
  return { colour: light[colourOf(series)], width: 1.4, dash: points ? '' : (patterns[Math.max(0, lines.indexOf(series)) % patterns.length] ?? ''), points, full: points && drawnFull(series) };
}
