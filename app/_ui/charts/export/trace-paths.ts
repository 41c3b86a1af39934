import type { FigureSeries } from '@/lib/engine/contract/measurement';
import { toX, toY, type Frame } from './frame';

const pair = (x: number, y: number): string => `${x.toFixed(2)} ${y.toFixed(2)}`;

/** A line that ends where a value is missing and begins anew behind it: a gap is never bridged, and never zero. */
export function linePath(xs: readonly number[], values: readonly (number | null)[], frame: Frame): string {
  let pen = 'M';
  let path = '';
  for (let i = 0; i < xs.length; i++) {
    const x = toX(xs[i], frame);
    const y = toY(values[i], frame);
    if (x === null || y === null) {
      pen = 'M';
      continue;
    }
    path += pen + pair(x, y);
    pen = 'L';
  }
  return path;
}

export function pointsOf(xs: readonly number[], series: FigureSeries, frame: Frame): readonly { readonly x: number; readonly y: number }[] {
  return xs.flatMap((value, i) => {
    const x = toX(value, frame);
    const y = toY(series.values[i], frame);
    return x === null || y === null ? [] : [{ x, y }];
  });
}

/** The band between its two edges, closed anew after each gap of either. */
export function bandPath(xs: readonly number[], low: readonly (number | null)[], high: readonly (number | null)[], frame: Frame): string {
  let path = '';
  let upper: string[] = [];
  let lower: string[] = [];
  const close = () => {
    if (upper.length > 1) path += `M${upper.join('L')}L${lower.reverse().join('L')}Z`;
    upper = [];
    lower = [];
  };
  for (let i = 0; i < xs.length; i++) {
    const [x, a, b] = [toX(xs[i], frame), toY(low[i], frame), toY(high[i], frame)];
    if (x === null || a === null || b === null) {
      close();
      continue;
    }
    upper.push(pair(x, b));
    lower.push(pair(x, a));
  }
  close();
  return path;
}

/** An upright bar at every place that has both edges. */
export function barsPath(xs: readonly number[], low: readonly (number | null)[], high: readonly (number | null)[], frame: Frame): string {
  return xs
    .map((value, i) => {
      const [x, a, b] = [toX(value, frame), toY(low[i], frame), toY(high[i], frame)];
      return x === null || a === null || b === null ? '' : `M${pair(x, a)}L${pair(x, b)}`;
    })
    .join('');
}
