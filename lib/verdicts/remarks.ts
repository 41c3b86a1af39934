import type { Claimed } from '@/lib/claims/claimed';
import type { BudgetLine, MeasuredPoint } from '@/lib/engine/contract/measurement';
import { isFiniteNumber } from '@/lib/kernel/finite';
import type { Allowed } from './coverage';
import type { VerdictWord } from './verdict';

/** A point with what was claimed of it and what the weighing said. */
export interface WeighedPoint {
  readonly claimed: Claimed;
  readonly measured: MeasuredPoint;
  readonly word: VerdictWord;
}

/** Qualifiers beside the verdict: digits overstated, narrower scope, and those the measurement brings (lower bound only). */
export function remarksOf(points: readonly WeighedPoint[], budget: readonly BudgetLine[], allowed: Allowed): string[] {
  const measured = points.flatMap((point) => point.measured.remarks ?? []);
  const remarks = [digitsOverstated(points, budget, allowed), narrowerScope(points), withoutNumber(points), ...new Set(measured)];
  return remarks.filter((remark) => remark !== null);
}

/**
 * One guard digit is allowed: a claim overstates when it prints more than d + 1 decimals with
 * d = ⌈−log₁₀ U⌉. U is the whole budget's when all of it is known; otherwise what is known of it
 * bounds U from below, since a component that is not available can only add.
 */
function digitsOverstated(points: readonly WeighedPoint[], budget: readonly BudgetLine[], { expanded }: Allowed): string | null {
  const unknown = budget.length === 0 || budget.some((line) => !isFiniteNumber(line.u));
  for (const { claimed, measured, word } of points) {
    if (word !== 'agrees' || claimed.kind !== 'value' || claimed.digits === null) continue;
    const uncertainty = Math.max(expanded ?? 0, measured.expandedUncertainty ?? 0);
    if (!(uncertainty > 0)) continue;
    const supported = Math.ceil(-Math.log10(uncertainty)) + 1;
    if (claimed.digits <= supported) continue;
    const size = `${unknown ? 'at least ' : ''}${Number(uncertainty.toPrecision(2))}`;
    return `digits overstated: ${claimed.printed} carries ${decimals(claimed.digits)}; an uncertainty of ${size} supports ${unknown ? 'at most ' : ''}${decimals(Math.max(0, supported))}`;
  }
  return null;
}

const decimals = (n: number): string => `${n} decimal${n === 1 ? '' : 's'}`;

/** Some points of a sweep hold: says which, by the swept setting. */
function narrowerScope(points: readonly WeighedPoint[]): string | null {
  const holding = points.filter((point) => point.word === 'agrees');
  if (points.length < 2 || holding.length === 0 || holding.length === points.length) return null;
  const [setting] = Object.keys(points[0]?.measured.at ?? {});
  if (setting === undefined) return null;
  return `narrower scope: holds at ${holding.length} of ${points.length} points (${setting} ${runs(points, setting)})`;
}

/** Some points of a sweep have no number, which says nothing of the others: says which. */
function withoutNumber(points: readonly WeighedPoint[]): string | null {
  const without = points.filter(({ word }) => word === 'not-computable');
  const [setting] = Object.keys(points[0]?.measured.at ?? {});
  if (setting === undefined || without.length === 0 || without.length === points.length) return null;
  return `not settled at ${without.length} of ${points.length} points (${setting} ${runs(points, setting, 'not-computable')})`;
}

/** Neighbouring points of one word are told as a range; words of a setting, between which nothing lies, each by itself. */
function runs(points: readonly WeighedPoint[], setting: string, word: VerdictWord = 'agrees'): string {
  const told: string[] = [];
  for (let i = 0; i < points.length; i++) {
    if (points[i]?.word !== word) continue;
    let last = i;
    const from = points[i]?.measured.at[setting];
    while (typeof from === 'number' && points[last + 1]?.word === word && typeof points[last + 1]?.measured.at[setting] === 'number') last++;
    const to = points[last]?.measured.at[setting];
    told.push(last === i ? `${from}` : last === i + 1 ? `${from}, ${to}` : `${from} to ${to}`);
    i = last;
  }
  return told.join(', ');
}
