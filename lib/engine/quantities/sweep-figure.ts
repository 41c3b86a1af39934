import type { SweptValue } from '@/lib/kernel/place';
import type { Figure, FigureSeries, MeasuredPoint } from '../contract/measurement';
import { unitOf, type MeasureRequest, type Quantity } from '../contract/quantity';
import { settingsTable } from './settings-table';

const MOST_POINTS = 1500;
/** From this ratio of its ends on an axis is drawn by powers of ten. */
const WIDE_ACROSS = 20;
const WIDE_UP = 200;

/** Thinned evenly, ends kept. */
const thinned = (n: number): number[] =>
  n <= MOST_POINTS ? Array.from({ length: n }, (_, i) => i) : Array.from({ length: MOST_POINTS }, (_, k) => Math.round((k * (n - 1)) / (MOST_POINTS - 1)));

const isNumeric = (values: readonly SweptValue[]): values is readonly number[] => values.every((value) => typeof value === 'number');

const scaleOf = (values: readonly number[], wide: number): 'linear' | 'log' => {
  const [low, high] = [Math.min(...values), Math.max(...values)];
  return low > 0 && high / low > wide ? 'log' : 'linear';
};

/** Numbers rise along their axis; words stand side by side in the order of the sheet, since nothing lies between them. */
function axisOf({ setting, values }: NonNullable<MeasureRequest['over']>): { readonly kept: readonly number[]; readonly x: Figure['x'] } {
  const kept = thinned(values.length);
  const unit = settingsTable.get(setting)?.unit ?? '';
  if (!isNumeric(values)) return { kept, x: { label: setting, unit: '', scale: 'linear', values: kept.map((_, k) => k), words: kept.map((i) => String(values[i])) } };
  kept.sort((p, q) => values[p]! - values[q]!);
  const xs = kept.map((i) => values[i]!);
  return { kept, x: { label: setting, unit, scale: scaleOf(xs, WIDE_ACROSS), values: xs } };
}

const MOST_NAMED = 4;

/** A gap in a curve does not say that it is one. */
function without(places: readonly SweptValue[], all: number): string {
  if (places.length === 0 || places.length === all) return '';
  return places.length > MOST_NAMED ? `; no number at ${places.length} of ${all} points` : `; no number at ${places.join(', ')}`;
}

/**
 * A sweep as one figure: the recomputed number with its U over the swept setting, and what was claimed.
 * Shape:  none for a single number; at most 1 500 points.
 * Units:  the setting's across, the quantity's upwards.
 * Error:  for the eye only; never used for a verdict.
 * Fails:  never; a point without a number is null.
 * Source: product.md, the record's linked plots.
 */
export function sweepFigure(quantity: Pick<Quantity, 'unit' | 'follows'>, { over, claimed, settings }: MeasureRequest, points: readonly MeasuredPoint[]): Figure[] {
  if (over === null || points.length < 2) return [];
  const { kept, x } = axisOf(over);
  const known = kept.flatMap((i) => points[i]!.value ?? []);
  const scale = known.length === 0 ? 'linear' : scaleOf(known, WIDE_UP);
  const line = (label: string, role: FigureSeries['role'], value: (point: MeasuredPoint, i: number) => number | null): FigureSeries => ({ label, unit: unitOf(quantity, settings), role, axis: 'left', scale, values: kept.map((i) => value(points[i]!, i)) });
  const edge = (sign: number) => ({ value, expandedUncertainty: u }: MeasuredPoint): number | null => (value === null || u === null ? null : value + sign * u);
  return [
    {
      kind: 'sweep',
      title: `Value over ${over.setting}${without(kept.filter((i) => points[i]!.value === null).map((i) => over.values[i]!), points.length)}`,
      x,
      series: [line('recomputed', 'recomputed', ({ value }) => value), line('recomputed − U', 'band-low', edge(-1)), line('recomputed + U', 'band-high', edge(1)), line('claimed', 'claimed', (_, i) => claimed[i] ?? null)],
    },
  ];
}
