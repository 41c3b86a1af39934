import { halfLastDigit, type Claimed } from '@/lib/claims/claimed';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import { isFiniteNumber } from '@/lib/kernel/finite';

export interface Coverage {
  readonly state: 'covered' | 'understated' | 'unknown';
  /** Budget components that the files cannot give. */
  readonly missing?: readonly string[];
  /** How many times too small the stated uncertainty is. */
  readonly factor?: number;
}

/** A stated uncertainty a fifth below what the data allow still covers it (domain reference 5.4). */
const coversFrom = 0.8;

/** What the data allow, as the workshop combined it: all lines of the budget together. */
export interface Allowed {
  /** k·u; null where nothing is known. */
  readonly expanded: number | null;
  /** 95 %, where the spread is not symmetric. */
  readonly interval?: { readonly low: number; readonly high: number };
}

/**
 * Does the stated uncertainty cover what the data allow? All lines together, expanded, against twice the
 * stated standard uncertainty (or the digits', when none is stated).
 * One line that cannot be estimated makes the whole unknown: unknown is never zero.
 */
export function coverageOf(claimed: Claimed, value: number | null, budget: readonly BudgetLine[], allowed: Allowed): Coverage {
  const missing = budget.filter((line) => !isFiniteNumber(line.u)).map((line) => line.component);
  if (!isFiniteNumber(value)) missing.push('the recomputed value');
  if (missing.length === 0 && !isFiniteNumber(allowed.expanded)) missing.push('the error budget');
  if (missing.length > 0 || !isFiniteNumber(value) || !isFiniteNumber(allowed.expanded)) return { state: 'unknown', missing: [...new Set(missing)] };
  const interval = allowed.interval ?? { low: value - allowed.expanded, high: value + allowed.expanded };
  if (claimed.kind !== 'value') return boundCoverage(claimed, interval);
  const stated = 2 * (claimed.uncertainty ?? halfLastDigit(claimed) / Math.sqrt(3));
  if (stated === 0) return { state: 'unknown', missing: ['stated uncertainty'] };
  const wider = Math.max(value - interval.low, interval.high - value);
  if (stated >= coversFrom * wider) return { state: 'covered' };
  return { state: 'understated', factor: Number((wider / stated).toPrecision(3)) };
}

function boundCoverage(claimed: Extract<Claimed, { bound: number }>, { low, high }: { readonly low: number; readonly high: number }): Coverage {
  const holds = claimed.kind === 'above' ? low >= claimed.bound : high <= claimed.bound;
  return { state: holds ? 'covered' : 'understated' };
}
