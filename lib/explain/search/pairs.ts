import type { Flip } from '../flip';
import type { JudgedClaim, Node, Prediction } from './node';

/** The reading behind a pair has to be one that people meet, that nobody excluded, or that something speaks for. */
const isLikely = ({ common, assumed, evidence }: Flip): boolean => common || assumed || evidence === 'supports';

const mayMeet = (a: Flip, b: Flip): boolean => a.group !== b.group && a.convention !== b.convention && (isLikely(a) || isLikely(b));

const byId = (a: { readonly id: string }, b: { readonly id: string }): number => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0);

const idOf = (flips: Node['flips']): string => flips.map(({ id }) => id).join(' + ');

/** One reading a flip. */
export const singlesOf = (flips: readonly Flip[]): Node[] => [...flips].sort(byId).map((flip) => ({ id: flip.id, flips: [flip] }));

/**
 * Two flips at once, wherever they are of different groups and at least one is likely. Whether a pair is but another
 * name for a single flip is seen once its numbers are known; then it is dropped.
 */
export function pairsOf(flips: readonly Flip[]): Node[] {
  const sorted = [...flips].sort(byId);
  return sorted.flatMap((a, i) => sorted.slice(i + 1).filter((b) => mayMeet(a, b)).map((b): Node => ({ id: idOf([a, b]), flips: [a, b] })));
}

/**
 * What two flips give together where at least one of them is a factor: the other's numbers times it. Taken as the ratio
 * to the recomputed number, so that a factor which hangs on the point stands beside its own.
 */
export function pairPrediction({ points }: JudgedClaim, a: Prediction, b: Prediction): Prediction {
  if ('because' in a) return a;
  if ('because' in b) return b;
  return { values: points.map(({ value }, i) => together(a.values[i] ?? null, b.values[i] ?? null, value)) };
}

function together(a: number | null, b: number | null, declared: number): number | null {
  const product = a === null || b === null ? Number.NaN : (a / declared) * b;
  return Number.isFinite(product) ? product : null;
}
