import type { AxisScale } from './axis-scale';

/** Ends of what is looked at, in the axis's own unit. */
export type Range = readonly [low: number, high: number];

/** A view narrower than this part of the axis shows nothing. */
const NARROWEST = 1e-5;

interface Axis {
  readonly scale: Pick<AxisScale, 'toPlot' | 'fromPlot'>;
  /** First and last value. */
  readonly whole: Range;
}

const plotted = ([low, high]: Range, { scale }: Axis): Range | null => {
  const [a, b] = [scale.toPlot(low), scale.toPlot(high)];
  return a === null || b === null || !(b > a) ? null : [a, b];
};

/** Kept inside the axis; null when it is all of it, or no view at all. */
function within(low: number, high: number, axis: Axis): Range | null {
  const whole = plotted(axis.whole, axis);
  if (!whole || !(high - low >= (whole[1] - whole[0]) * NARROWEST)) return null;
  const width = Math.min(high - low, whole[1] - whole[0]);
  const from = Math.min(Math.max(low, whole[0]), whole[1] - width);
  if (width >= (whole[1] - whole[0]) * (1 - 1e-9)) return null;
  return [axis.scale.fromPlot(from), axis.scale.fromPlot(from + width)];
}

/** A view that was asked for by hand or by an address, brought inside the axis. */
export function shownRange(range: Range | null | undefined, axis: Axis): Range | null {
  const asked = range ? plotted([Math.max(range[0], axis.whole[0]), Math.min(range[1], axis.whole[1])], axis) : null;
  return asked ? within(asked[0], asked[1], axis) : null;
}

/** Half or twice as wide about a place; on a log axis by powers. */
export function zoomedBy(factor: number, about: number, range: Range | null, axis: Axis): Range | null {
  const now = plotted(range ?? axis.whole, axis);
  const centre = axis.scale.toPlot(about);
  if (!now || centre === null) return range;
  const held = Math.min(Math.max(centre, now[0]), now[1]);
  const low = held - (held - now[0]) * factor;
  const high = held + (now[1] - held) * factor;
  const whole = plotted(axis.whole, axis);
  if (whole && high - low < (whole[1] - whole[0]) * NARROWEST) return range;
  return within(low, high, axis);
}

/** The view moved so far that a place is seen again. */
export function followed(place: number, range: Range | null, axis: Axis): Range | null {
  const now = range && plotted(range, axis);
  const at = axis.scale.toPlot(place);
  if (!now || at === null || (at >= now[0] && at <= now[1])) return range;
  const shift = at < now[0] ? at - now[0] : at - now[1];
  return within(now[0] + shift, now[1] + shift, axis);
}
