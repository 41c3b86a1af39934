import { areaBySegments } from '@/lib/engine/fraction/area-by-segments';
import { houseMatchThreshold } from '@/lib/engine/contract/house-values';
import type { BudgetLine } from '@/lib/engine/contract/measurement';
import { standardOf } from '@/lib/engine/budget/half-width';
import { numeral } from '@/lib/engine/budget/numeral';
import type { FractionProblem } from '@/lib/engine/fraction/fraction-found';
import { measureOf } from './fraction-sample';
import { startLines } from './later-starts';
import type { OwnBudget } from './recipe';

/** Fewer signals than this leave too few when every second is left out. */
const LEAST_TO_THIN = 9;
const LINEAR_PARTS = 8;

function thinned(problem: FractionProblem): FractionProblem {
  const kept = (_: number, i: number): boolean => i % 2 === 0 || i === problem.spins.length - 1;
  return { ...problem, spins: problem.spins.filter(kept), matches: problem.matches.filter(kept), rhos: problem.rhos.filter(kept) };
}

/** Straight lines between the signals, as splines through many points on them. */
function straight(problem: FractionProblem): FractionProblem {
  const between = (values: readonly number[]): number[] => values.flatMap((value, i) => (i === 0 ? [value] : Array.from({ length: LINEAR_PARTS }, (_, k) => values[i - 1]! + ((value - values[i - 1]!) * (k + 1)) / LINEAR_PARTS)));
  return { ...problem, spins: between(problem.spins), matches: between(problem.matches), rhos: between(problem.rhos) };
}

/**
 * What a fraction adds to the budget: how it hangs on the curve between the signals, and on where records begin.
 * Shape:  two lines of coverage.
 * Units:  a fraction.
 * Error:  estimates.
 * Fails:  never.
 * Source: domain reference, Q05 (the interpolation error of the contour is propagated).
 */
export function fractionBudget({ request, found, movedIn }: OwnBudget): BudgetLine[] {
  const { fraction, value } = found;
  if (fraction === undefined) return [];
  const { samples } = fraction;
  const threshold = request.declared.threshold ?? houseMatchThreshold;
  const problem: FractionProblem = { spins: samples.map(({ spin }) => spin), matches: samples.map(({ outcome }) => outcome.match), rhos: samples.map(({ rho }) => rho), threshold, measure: measureOf(request) };
  const others = [straight(problem), ...(samples.length >= LEAST_TO_THIN ? [thinned(problem)] : [])];
  const moves = others.map((other) => areaBySegments(other).fraction - value);
  const note = `Straight lines between the signals${moves.length > 1 ? ', and a spline through every second of them' : ''}: ${moves.map((x) => numeral(x)).join(', ')}; half-width over √3.`;
  return [{ component: 'Curve between the signals', id: 'interpolation', group: 'coverage', u: standardOf(Math.max(...moves.map(Math.abs))), note }, ...startLines({ request, movedIn })];
}
