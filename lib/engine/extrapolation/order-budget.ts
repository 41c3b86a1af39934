import { LEAST, ROOT3 } from '../budget/half-width';
import type { BudgetLine } from '../contract/measurement';
import { coarserCurves } from './curves-on-samples';
import { curvesByRouteA, differencesOf, noiseOf, orderOfCurve, slipOf, type Interval, type ThreeRuns } from './curve-orders';
import { logRatioSlope } from './order-by-newton';
import type { Spacings } from './richardson';
import type { Curve, RunCurves } from './run-curves';

/** E15: each edge of the interval moved by a fifth of its length. */
const MOVED = [-0.2, 0, 0.2];

/** Everything an order of curves rests on. */
export interface OrderOfCurves {
  readonly runs: ThreeRuns;
  readonly spacings: Spacings;
  readonly interval: Interval;
  readonly curve: Curve;
  readonly curves: RunCurves;
  readonly order: number;
}

/** Rounding shifts a mean square up by its own, and scatters it. */
function roundingLine({ runs, spacings: [h1, h2, h3], curve, curves, order }: OrderOfCurves): BudgetLine {
  const base = { component: 'Rounding of the input', id: 'rounding', group: 'computation' } as const;
  const digits = runs.flatMap(({ waveform: { significantDigits } }) => (significantDigits === null ? [] : [significantDigits]));
  if (digits.length === 0) return { ...base, u: 0, note: 'Binary doubles: nothing was printed.' };
  const noise = noiseOf(curves, curve, slipOf(runs));
  const relative = differencesOf(curves, curve).map((d) => (noise / d) ** 2 / 2 + noise / d / Math.sqrt(curves.t.length / 2));
  return { ...base, u: Math.hypot(...relative) / logRatioSlope(order, Math.log(h1 / h2), Math.log(h2 / h3)), note: `${Math.min(...digits)} significant digits in the files.` };
}

function moved(of: OrderOfCurves, which: 'A' | 'coarse'): number {
  const found = orderOfCurve(curvesByRouteA(of.runs, of.interval, which === 'A' ? coarserCurves : undefined, which), of.curve, of.spacings);
  return found.ok ? Math.max(Math.abs(found.value - of.order) / ROOT3, LEAST * of.order) : Number.NaN;
}

/**
 * Lines that make U of an order of curves: local polynomials of order 8 against 6 on half of the grid with the peak by the
 * five-sample parabola, the integration where H was integrated, and the digits of the files.
 * Shape:  two lines; a third where H was integrated.
 * Units:  those of an order.
 * Error:  half-widths over √3; rounding in closed form.
 * Fails:  NaN where a turned route finds no order.
 * Source: settings.md rule 12.
 */
export function orderComputation(of: OrderOfCurves): BudgetLine[] {
  const integrates = of.runs.some(({ tones }) => tones.floor !== null);
  return [
    { component: 'Interpolation, sums and end of the interval', id: 'E01', group: 'computation', u: moved(of, 'A'), note: 'Local polynomials of order 8 against 6, half of the grid, peak by a polynomial against the five-sample parabola; half-width over √3.' },
    ...(integrates ? [{ component: 'Integration in frequency', id: 'E02', group: 'computation', u: moved(of, 'coarse'), note: 'Interpolation of order 8 against 6 and half the points.' } as const] : []),
    roundingLine(of),
  ];
}

/** E15: nine intervals, their edges moved as far as the records go. */
export function intervalLine({ runs, spacings, interval, curve, curves }: OrderOfCurves): BudgetLine {
  const [from, to] = [curves.t[0]!, curves.t[curves.t.length - 1]!];
  const first = Math.max(...runs.map(({ tones }) => tones.A.axis[0]!));
  const values = MOVED.flatMap((x) => MOVED.map((y) => [from + x * (to - from), to + y * (to - from)] as const))
    .filter(([low, high]) => low >= first && high <= interval.last)
    .flatMap(([low, high]) => {
      const found = orderOfCurve(curvesByRouteA(runs, { ...interval, from: low, to: high }), curve, spacings);
      return found.ok ? [found.value] : [];
    });
  const base = { component: 'Choice of the interval', id: 'E15', group: 'coverage' } as const;
  if (values.length < 2) return { ...base, u: null, note: 'The records are too short to move the edges of the interval.' };
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const u = Math.sqrt(values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (values.length - 1));
  return { ...base, u, degreesOfFreedom: values.length - 1, note: `Each edge moved by a fifth of the interval's length: standard deviation of the ${values.length} intervals inside the records.` };
}

/** E05 of an order: what the next coarser three runs say, where there is a fourth. */
export function fourthRunLine(order: number, before: number | null | undefined): BudgetLine {
  const base = { component: 'Orders beyond the leading one', id: 'E05', group: 'coverage' } as const;
  if (before === undefined) return { ...base, u: null, note: 'Not available: three resolutions give one order. A fourth would show whether it holds.' };
  if (before === null) return { ...base, u: null, note: 'Not available: the next coarser three runs have no order.' };
  return { ...base, u: Math.abs(order - before), degreesOfFreedom: 1, note: `The next coarser three runs have order ${Number(before.toPrecision(3))}.` };
}
