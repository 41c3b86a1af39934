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

/**
 * Does the stated uncertainty cover what the data allow? Standard uncertainties of all lines, in
 * quadrature and doubled, against twice the stated one (or the digits', when none is stated).
 * One line that cannot be estimated makes the whole unknown: unknown is never zero.
 */
export function coverageOf(claimed: Claimed, value: number | null, budget: readonly BudgetLine[]): Coverage {
  const missing = budget.filter((line) => !isFiniteNumber(line.u)).map((line) => line.component);
  if (value === null) missing.push('the recomputed value');
  else if (budget.length === 0) missing.push('the error budget');
  if (missing.length > 0) return { state: 'unknown', missing: [...new Set(missing)] };
  const allowed = expandedOf(budget);
  if (claimed.kind !== 'value') return boundCoverage(claimed, value ?? Number.NaN, allowed);
  const stated = 2 * (claimed.uncertainty ?? halfLastDigit(claimed) / Math.sqrt(3));
  if (stated === 0) return { state: 'unknown', missing: ['stated uncertainty'] };
  if (stated >= coversFrom * allowed) return { state: 'covered' };
  return { state: 'understated', factor: Number((allowed / stated).toPrecision(3)) };
}

/** 2u of all lines together, or NaN when one is not known. */
export function expandedOf(budget: readonly BudgetLine[]): number {
  return 2 * Math.sqrt(budget.reduce((sum, { u }) => sum + (u === null ? Number.NaN : u * u), 0));
}

function boundCoverage(claimed: Extract<Claimed, { bound: number }>, value: number, allowed: number): Coverage {
  const holds = claimed.kind === 'above' ? value - allowed >= claimed.bound : value + allowed <= claimed.bound;
  return { state: holds ? 'covered' : 'understated' };
}
