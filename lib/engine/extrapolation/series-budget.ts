import type { BudgetLine } from '../contract/measurement';
import type { RunScalar } from './run-scalar';

interface Share {
  /** How much the result moves with this run's number. */
  readonly c: number;
  readonly scalar: RunScalar;
}

/** Relative size below which no computation in double precision is trusted (engine design). */
const LEAST = 1e-13;

/**
 * Lines that make U of a number that is a function of several runs' numbers. What one knob does to each run may go either way
 * in all of them, so sizes are added; printed digits of different files are independent.
 * Shape:  one line for each that any run has, in the order of the first.
 * Units:  those of the result.
 * Error:  errs on the large side.
 * Fails:  a size that is not known makes its line unknown.
 * Source: JCGM 100:2008, 5.2.
 */
export function propagatedLines(shares: readonly Share[], value: number, how: string): BudgetLine[] {
  const keys = new Map<string, BudgetLine>();
  for (const { scalar } of shares) for (const line of scalar.computation) if (!keys.has(line.id + line.component)) keys.set(line.id + line.component, line);
  return [...keys].map(([key, { component, id, group, note }]): BudgetLine => {
    const sizes = shares.map(({ c, scalar }) => {
      const own = scalar.computation.find((line) => line.id + line.component === key);
      return own === undefined ? 0 : Math.abs(c) * (own.u ?? Number.NaN);
    });
    const u = id === 'rounding' ? Math.hypot(...sizes) : Math.max(sizes.reduce((sum, size) => sum + size, 0), id === 'E01' ? LEAST * Math.abs(value) : 0);
    return { component, id, group, u, note: `${note} ${how}` };
  });
}

/** Step of a numerical derivative, as a share of the smaller difference. */
const SHARE = 1e-4;

/**
 * How a function of some numbers moves with each of them, by central differences.
 * Shape:  parallel to the values.
 * Units:  result over value.
 * Error:  second order in a ten-thousandth of the smallest difference of neighbours.
 * Fails:  NaN where the function gives none.
 * Source: definition.
 */
export function sensitivities(f: (values: readonly number[]) => number, values: readonly number[]): number[] {
  const gaps = values.slice(1).map((x, i) => Math.abs(x - values[i]!));
  const step = SHARE * Math.min(...gaps);
  const moved = (i: number, by: number): number => f(values.map((x, k) => (k === i ? x + by : x)));
  return values.map((_, i) => (moved(i, step) - moved(i, -step)) / (2 * step));
}

const OWN = new Set(['E05', 'E06']);

/** What was chosen for the leading run stands for all; truncation and radius have lines of the series' own. */
export const chosenLines = ({ coverage }: RunScalar): BudgetLine[] => coverage.filter(({ id }) => !OWN.has(id));
