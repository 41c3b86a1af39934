import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';
import { decimalsFor, formatNumber } from '../math/format-number';
import { unitText } from '../math/units';

const withUnit = (text: string, unit: string) => (unitText(unit) ? `${text} ${unitText(unit)}` : text);

/** Steps of the axis decide how finely a place is told. */
function placeText(figure: Figure, index: number): string {
  const word = figure.x.words?.[index];
  if (word !== undefined) return `“${word}”`;
  const x = figure.x.values[index] ?? 0;
  const span = Math.abs((figure.x.values.at(-1) ?? 0) - (figure.x.values[0] ?? 0)) || 1;
  return withUnit(formatNumber(x, { decimals: decimalsFor(figure.x.scale === 'log' ? Math.abs(x) / 1000 || 1 : span / 1000, 1) }), figure.x.unit);
}

const valueText = (value: number | null | undefined, unit: string): string =>
  value === null || value === undefined ? 'no value' : withUnit(formatNumber(value, { significant: 5 }), unit);

/** Band edges are read as one range after the value they belong to. */
export function readoutOf(figure: Figure, index: number): string {
  const at = (role: FigureSeries['role']) => figure.series.find((s) => s.role === role);
  const low = at('band-low')?.values[index];
  const high = at('band-high')?.values[index];
  const parts = figure.series
    .filter((s) => s.role !== 'band-low' && s.role !== 'band-high' && (s.values[index] ?? null) !== null)
    .map((s) => {
      const bar = s.role === 'recomputed' && typeof low === 'number' && typeof high === 'number' ? `, band ${valueText(low, '')} to ${valueText(high, s.unit)}` : '';
      return `${s.label} = ${valueText(s.values[index], s.unit)}${bar}`;
    });
  return `at ${placeText(figure, index)}: ${parts.length > 0 ? parts.join('; ') : 'no value'}`;
}

/** Where a key press moves the cursor; null when the key is none of ours. */
export function steppedIndex(key: string, index: number, count: number, shift: boolean): number | null {
  const step = Math.max(1, Math.round(count / 200)) * (shift ? 5 : 1);
  const page = Math.max(1, Math.round(count / 10));
  const moves: Record<string, number> = { ArrowLeft: index - step, ArrowRight: index + step, PageDown: index - page, PageUp: index + page, Home: 0, End: count - 1 };
  const next = moves[key];
  return next === undefined ? null : Math.max(0, Math.min(count - 1, next));
}
