import type { AxisScale } from '../axis-scale';

/** Where one panel's axes lie on the sheet, and how values become places on it. */
export interface Frame {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
  readonly x: Extent;
  readonly y: Extent;
}

/** In plot units of its scale. */
export interface Extent {
  readonly scale: AxisScale;
  readonly low: number;
  readonly high: number;
}

/** Ends of what is known; a lone or constant value gets room around it. Null when nothing is known. */
export function extentOf(values: readonly (number | null)[], scale: AxisScale, margin: number): Extent {
  let low = Infinity;
  let high = -Infinity;
  for (const value of values) {
    const at = value === null || !Number.isFinite(value) ? null : scale.toPlot(value);
    if (at === null || !Number.isFinite(at)) continue;
    low = Math.min(low, at);
    high = Math.max(high, at);
  }
  if (low > high) return { scale, low: 0, high: 1 };
  const room = high > low ? (high - low) * margin : Math.abs(high) * 0.1 || 1;
  return { scale, low: low - room, high: high + room };
}

const place = (value: number | null | undefined, { scale, low, high }: Extent): number | null => {
  const at = value === null || value === undefined || !Number.isFinite(value) ? null : scale.toPlot(value);
  return at === null || !Number.isFinite(at) ? null : (at - low) / (high - low);
};

export const toX = (value: number | null | undefined, frame: Frame): number | null => {
  const share = place(value, frame.x);
  return share === null ? null : frame.left + share * frame.width;
};
export const toY = (value: number | null | undefined, frame: Frame): number | null => {
  const share = place(value, frame.y);
  return share === null ? null : frame.top + (1 - share) * frame.height;
};
