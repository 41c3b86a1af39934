import type { AxisScale } from '../axis-scale';

export interface Tick {
  readonly at: number;
  readonly label: string;
}

/** 1, 2 or 5 times a power of ten, so that about `wanted` of them fit. */
export function niceStep(span: number, wanted: number): number {
  const rough = span / Math.max(1, wanted);
  const power = 10 ** Math.floor(Math.log10(rough));
  const lead = rough / power;
  return power * (lead <= 1 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10);
}

function linearPlaces(low: number, high: number, wanted: number): readonly number[] {
  const step = niceStep(high - low, wanted);
  const first = Math.ceil(low / step - 1e-9);
  const last = Math.floor(high / step + 1e-9);
  return Array.from({ length: Math.max(0, last - first + 1) }, (_, i) => Number(((first + i) * step).toPrecision(12)));
}

/** Ticks in plot units with what stands at them; a log axis without two of its own is ticked in between. */
export function axisTicks(scale: AxisScale, low: number, high: number, wanted: number): readonly Tick[] {
  const own = scale.ticks?.(low, high);
  const places = own && own.length >= 2 ? own : linearPlaces(low, high, wanted);
  const labels = scale.ticks && own !== places ? places.map((place) => scale.valueLabel(place)) : scale.labels(places);
  return places.map((at, i) => ({ at, label: labels[i] ?? '' }));
}
