import type { JudgedClaim, Prediction } from './node';
import { misfitOf, rowOf, scaledClaim } from './scaled-claim';

/** Would the claim agree, within T + U at every point, if its numbers were these? */
export function fits(claim: JudgedClaim, prediction: Prediction | undefined): boolean {
  const scaled = scaledClaim(claim);
  const row = rowOf(scaled, prediction);
  return row !== null && misfitOf(scaled, row) <= 1;
}
