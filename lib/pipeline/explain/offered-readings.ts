import type { ClaimSheet } from '@/lib/claims/claim';
import { flipsOf } from '@/lib/explain/flips/flips-of';
import { offeredReading, type OfferedReading } from '@/lib/explain/read-otherwise';
import type { Inputs } from '../read-inputs';
import { contextOf, type Weighed } from './subject';

/** What a person may read otherwise of each claim, by its id: beside the result, never part of it. */
export type ReadingsByClaim = Readonly<Record<string, readonly OfferedReading[]>>;

/** Ids come from outside: `constructor` is no claim. */
export const readingsOfClaim = (all: ReadingsByClaim, claimId: string): readonly OfferedReading[] => (Object.hasOwn(all, claimId) ? (all[claimId] ?? []) : []);

/** Of each claim that has a number, whatever its verdict. What hangs on another claim of the sheet is not there: a variation is of one claim alone. */
export function offeredReadings(sheet: ClaimSheet, inputs: Inputs, weighed: readonly Omit<Weighed, 'result'>[]): ReadingsByClaim {
  const numbered = weighed.filter(({ measurement }) => measurement.points.some(({ value }) => value !== null));
  return Object.fromEntries(numbered.map((one) => [one.claim.id, flipsOf(contextOf(one, sheet, inputs, [])).map(offeredReading)]));
}
