import type { BudgetLine } from '@/lib/engine/contract/measurement';

export interface BudgetGroup {
  readonly group: BudgetLine['group'];
  readonly lines: readonly (BudgetLine & { readonly share: number | null })[];
  /** k = 2 of the known lines; null when none is known. */
  readonly expanded: number | null;
  /** Components that cannot be estimated: their part is unknown, not zero. */
  readonly missing: readonly string[];
}

/** Shares of the variance within one group, since the two groups live on different scales. */
export function budgetGroup(budget: readonly BudgetLine[], group: BudgetLine['group']): BudgetGroup {
  const lines = budget.filter((line) => line.group === group);
  const known = lines.filter((line) => line.u !== null && Number.isFinite(line.u));
  const variance = known.reduce((sum, line) => sum + (line.u ?? 0) ** 2, 0);
  const isKnown = (line: BudgetLine) => line.u !== null && Number.isFinite(line.u);
  return {
    group,
    lines: lines.map((line) => ({ ...line, share: !isKnown(line) ? null : variance > 0 ? (line.u ?? 0) ** 2 / variance : 0 })),
    expanded: known.length > 0 ? 2 * Math.sqrt(variance) : null,
    missing: lines.filter((line) => !isKnown(line)).map((line) => line.component),
  };
}
