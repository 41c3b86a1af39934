import { halfLastDigit, type Claimed } from '@/lib/claims/claimed';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import { isFiniteNumber } from '@/lib/kernel/finite';

export interface Coverage {
  readonly state: 'covered' | 'understated' | 'unknown';
  /** Budget components that the files cannot give; beside *understated* the factor is then a least one. */
  readonly missing?: readonly string[];
  /** How many times too small the stated uncertainty is. */
  readonly factor?: number;
}

/** A stated uncertainty a fifth below what the data allow still covers it (domain reference 5.4). */
const coversFrom = 0.8;

interface Interval {
  readonly low: number;
  readonly high: number;
}

/** What the data allow, as the workshop combined it: all lines of the budget together. */
export interface Allowed {
  /** Standard uncertainty of the known lines; null where nothing is known. */
  readonly u: number | null;
  /** k·u; null where nothing is known. */
  readonly expanded: number | null;
  /** 95 %, where the spread is not symmetric. */
  readonly interval?: Interval;
}

/** The least factor by which any number of degrees of freedom expands. */
const LEAST_FACTOR = 2;

/**
 * Does the stated uncertainty cover what the data allow? All lines together, expanded, against twice the
 * stated standard uncertainty (or the digits', when none is stated).
 * One line that cannot be estimated makes the whole unknown: unknown is never zero. But what is known bounds the whole
 * from below, so a stated uncertainty or a bound that fails by it alone is understated, whatever is missing.
 */
export function coverageOf(claimed: Claimed, value: number | null, budget: readonly BudgetLine[], allowed: Allowed): Coverage {
  const missing = [...new Set(budget.filter((line) => !isFiniteNumber(line.u)).map((line) => line.component))];
  if (!isFiniteNumber(value)) return { state: 'unknown', missing: [...missing, 'the recomputed value'] };
  if (!isFiniteNumber(allowed.expanded)) return { state: 'unknown', missing: missing.length > 0 ? missing : ['the error budget'] };
  if (missing.length > 0) return partlyKnown(claimed, value, allowed, missing);
  return wholeCoverage(claimed, value, allowed.interval ?? around(value, allowed.expanded));
}

const around = (value: number, by: number): Interval => ({ low: value - by, high: value + by });

function wholeCoverage(claimed: Claimed, value: number, interval: Interval): Coverage {
  if (claimed.kind !== 'value') return boundCoverage(claimed, interval);
  const stated = 2 * (claimed.uncertainty ?? halfLastDigit(claimed) / Math.sqrt(3));
  if (stated === 0) return { state: 'unknown', missing: ['stated uncertainty'] };
  const wider = Math.max(value - interval.low, interval.high - value);
  if (stated >= coversFrom * wider) return { state: 'covered' };
  return { state: 'understated', factor: Number((wider / stated).toPrecision(3)) };
}

/**
 * The known lines as the least that the data allow: with k = 2, since a missing line may bring degrees of freedom, and no wider
 * than their own interval, since a physical bound may cut it. Digits alone state no uncertainty that could be found too small.
 */
function partlyKnown(claimed: Claimed, value: number, { u, interval }: Allowed, missing: readonly string[]): Coverage {
  const states = claimed.kind !== 'value' || (claimed.uncertainty !== null && claimed.uncertainty > 0);
  if (!states || !isFiniteNumber(u)) return { state: 'unknown', missing };
  const least = around(value, LEAST_FACTOR * u);
  const inside = interval ? { low: Math.max(least.low, interval.low), high: Math.min(least.high, interval.high) } : least;
  const found = wholeCoverage(claimed, value, inside);
  return found.state === 'understated' ? { ...found, missing } : { state: 'unknown', missing };
}

function boundCoverage(claimed: Extract<Claimed, { bound: number }>, { low, high }: Interval): Coverage {
  const holds = claimed.kind === 'above' ? low >= claimed.bound : high <= claimed.bound;
  return { state: holds ? 'covered' : 'understated' };
}
