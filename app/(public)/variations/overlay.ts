import type { ComparedPoint } from './compare';
import type { Figure, FigureSeries } from '@/lib/engine/contract/measurement';

type Values = readonly (number | null)[];

/** Read between two points as the line between them is drawn; nothing outside, nothing across a gap. */
function readAt(xs: readonly number[], values: Values, x: number, log: boolean): number | null {
  const i = xs.findIndex((own) => own >= x);
  if (i < 0) return null;
  if (xs[i] === x) return values[i] ?? null;
  const [x0, x1, y0, y1] = [xs[i - 1], xs[i], values[i - 1], values[i]];
  if (x0 === undefined || x1 === undefined || y0 === undefined || y0 === null || y1 === undefined || y1 === null) return null;
  const share = (x - x0) / (x1 - x0);
  return log && y0 > 0 && y1 > 0 ? y0 * (y1 / y0) ** share : y0 + share * (y1 - y0);
}

const same = (a: Values, b: Values): boolean => a.length === b.length && a.every((value, i) => value === b[i]);

/** All places of both, in order, each once. */
function union(a: readonly number[], b: readonly number[]): readonly number[] {
  return same(a, b) ? a : [...new Set([...a, ...b])].sort((x, y) => x - y);
}

const isLine = ({ role }: FigureSeries): boolean => role === 'claimed' || role === 'recomputed' || role === 'noise';

function moved(series: FigureSeries, from: readonly number[], to: readonly number[]): FigureSeries {
  return from === to ? series : { ...series, values: to.map((x) => readAt(from, series.values, x, series.scale === 'log')) };
}

/** The varied lines over the official ones; a line that did not move is drawn once. */
function overlaid(official: Figure, varied: Figure): Figure {
  const xs = union(official.x.values, varied.x.values);
  const own = official.series.filter((s) => s.role !== 'residual').map((s) => moved(s, official.x.values, xs));
  const others = varied.series.filter(isLine).filter((s) => {
    const there = official.series.find((o) => o.role === s.role && o.label === s.label);
    return !(there && same(there.values, s.values) && same(official.x.values, varied.x.values));
  });
  const notClaimed = others.filter((s) => !(official.kind === 'sweep' && s.role === 'claimed'));
  return { ...official, x: { ...official.x, values: xs }, series: [...own, ...notClaimed.map((s) => ({ ...moved(s, varied.x.values, xs), label: `${s.label}, varied`, role: 'varied' as const }))] };
}

/** Curves of two points of a sweep differ by more than what was varied. */
const atOnePlace = ({ at: a = {} }: Figure, { at: b = {} }: Figure): boolean => Object.keys(a).length === Object.keys(b).length && Object.entries(a).every(([name, value]) => b[name] === value);

/** One value in the place of a sweep, as a point on the axes of the sweep; nothing where it has no place of its own there. */
export function pointOnSweep(official: readonly Figure[], [only, ...others]: readonly ComparedPoint[]): readonly Figure[] {
  const sweep = official.find(({ kind }) => kind === 'sweep');
  const line = sweep?.series.find(({ role }) => role === 'recomputed');
  const place = only?.at[sweep?.x.label ?? ''];
  if (!sweep || !line || sweep.x.words || typeof place !== 'number' || !only?.varied || others.some(({ varied }) => varied !== null)) return [];
  return [{ ...sweep, x: { ...sweep.x, values: [place] }, series: [{ ...line, values: [only.varied.value] }] }];
}

/** Figures of the official run with those of the variation laid over, by kind, in their order; what only one has stands alone. */
export function overlayFigures(official: readonly Figure[], varied: readonly Figure[]): readonly Figure[] {
  const left = [...varied];
  const both = official.map((figure) => {
    const i = left.findIndex((other) => !figure.plane && other.kind === figure.kind && other.x.label === figure.x.label && other.x.unit === figure.x.unit && atOnePlace(figure, other));
    const [other] = i < 0 ? [] : left.splice(i, 1);
    return other ? overlaid(figure, other) : figure;
  });
  return [...both, ...left.map((figure) => ({ ...figure, title: `${figure.title}, varied`, series: figure.series.map((s) => (s.role === 'recomputed' ? { ...s, role: 'varied' as const } : s)) }))];
}
