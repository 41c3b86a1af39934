import type { BudgetLine } from '../contract/measurement';
import { combine } from './combine';
import { monteCarloInterval, type Interval, type PhysicalRange } from './monte-carlo';

/** U of the computation: k = 2, since none of its sizes is itself estimated from a few numbers. */
export const expandedOf = (standard: readonly number[]): number => combine(standard.map((u) => ({ u }))).expanded;

/** Components found as a scatter, or as a size with a normal spread; all others are half-widths of rectangles, and a line may say otherwise. */
const NORMAL = new Set(['E05', 'E15', 'E17']);

/** From here on, or with a bound this near, the linear law is not enough (domain reference 5.2). */
const LARGE = 0.3;
const NEAR = 3;

export interface Total {
  /** Standard uncertainty of what is known; null where nothing is. */
  readonly u: number | null;
  /** Null where they are not limited. */
  readonly degreesOfFreedom: number | null;
  readonly coverageFactor: number;
  /** k·u. */
  readonly expanded: number | null;
  /** 95 %, by draws; present where the linear law is not enough. */
  readonly interval?: Interval;
  /** Components that could not be estimated: they are not zero, and the sizes above bound the whole from below. */
  readonly missing: readonly string[];
}

const isKnown = (line: BudgetLine): line is BudgetLine & { readonly u: number } => line.u !== null && Number.isFinite(line.u);

function needsDraws(value: number, u: number, { low, high }: PhysicalRange): boolean {
  if (u === 0) return false;
  return u > LARGE * Math.abs(value) || (low !== null && value - low < NEAR * u) || (high !== null && high - value < NEAR * u);
}

/**
 * All lines of a group, or of a whole budget, as one uncertainty.
 * Shape:  one total; lines that are not known are named.
 * Units:  those of the lines.
 * Error:  none of its own.
 * Fails:  never; a value that is not finite has no interval.
 * Source: JCGM 100:2008; JCGM 101:2008 where a bound is near or the spread is wide.
 */
export function totalOf(value: number | null, lines: readonly BudgetLine[], range: PhysicalRange): Total {
  const known = lines.filter(isKnown);
  const missing = [...new Set(lines.filter((line) => !isKnown(line)).map(({ component }) => component))];
  if (known.length === 0) return { u: null, degreesOfFreedom: null, coverageFactor: 2, expanded: null, missing };
  const { u, degreesOfFreedom, coverageFactor, expanded } = combine(known);
  const spreads = known.map((line) => ({ u: line.u, degreesOfFreedom: line.degreesOfFreedom, shape: line.shape ?? (NORMAL.has(line.id) ? ('normal' as const) : ('rectangular' as const)) }));
  const interval = value !== null && Number.isFinite(value) && needsDraws(value, u, range) ? monteCarloInterval(value, spreads, range) : null;
  return { u, degreesOfFreedom: Number.isFinite(degreesOfFreedom) ? degreesOfFreedom : null, coverageFactor, expanded, ...(interval ? { interval } : {}), missing };
}

/** Every line with its part of the variance of all that is known; null where the line is not. */
export function withShares(lines: readonly BudgetLine[]): BudgetLine[] {
  const { shares } = combine(lines.filter(isKnown));
  let next = 0;
  return lines.map((line) => ({ ...line, share: isKnown(line) ? shares[next++]! : null }));
}
