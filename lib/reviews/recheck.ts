import type { ResultClaim, ResultPoint } from '@/lib/pipeline/result';
import type { Place } from '@/lib/kernel/place';

/**
 * What a newer engine makes of a published record. One point beside the other: a verdict that changed, or a number that
 * moved by more than its own uncertainty, puts the record under recheck; a smaller move is told and changes nothing.
 */
export const MOVES = ['same', 'within a tenth of U', 'within U', 'beyond U'] as const;
export type Move = (typeof MOVES)[number];

export interface MovedNumber {
  readonly claimId: string;
  readonly at: Place;
  readonly before: number | null;
  readonly now: number | null;
  readonly expandedUncertainty: number | null;
  readonly move: Move;
}

/** Relative difference that rounding in another order may leave. */
const SAME = 1e-9;

/** A claim of a record as well as of a result. */
type Numbered = Pick<ResultClaim, 'id' | 'points'>;

export function compareResults(published: readonly Numbered[], now: readonly Numbered[]): readonly MovedNumber[] {
  return published.flatMap((claim) => {
    const again = now.find(({ id }) => id === claim.id);
    return claim.points.map((point, i) => compare(claim.id, point, again?.points[i]));
  });
}

export const staysValid = (numbers: readonly MovedNumber[]): boolean => numbers.every(({ move }) => move !== 'beyond U');

function compare(claimId: string, point: ResultPoint, again: ResultPoint | undefined): MovedNumber {
  const expandedUncertainty = point.expandedUncertainty;
  const numbers = { claimId, at: point.at as Place, before: point.value, now: again?.value ?? null, expandedUncertainty };
  return { ...numbers, move: again?.verdict === point.verdict ? sizeOf(numbers) : 'beyond U' };
}

function sizeOf({ before, now, expandedUncertainty }: Omit<MovedNumber, 'move'>): Move {
  if (before === null && now === null) return 'same';
  if (before === null || now === null) return 'beyond U';
  const moved = Math.abs(now - before);
  if (moved <= SAME * Math.abs(before)) return 'same';
  if (expandedUncertainty === null || !(moved <= expandedUncertainty)) return 'beyond U';
  return moved <= expandedUncertainty / 10 ? 'within a tenth of U' : 'within U';
}
