import type { JudgedClaim, JudgedPoint, Prediction } from './node';

/** A claim on the scale of its tolerance, one entry a point. */
export interface ScaledClaim {
  readonly claim: JudgedClaim;
  readonly claimed: Float64Array;
  /** The recomputed numbers under the declared settings. */
  readonly declared: Float64Array;
  /** T, U and half a digit. */
  readonly tolerance: Float64Array;
  readonly uncertainty: Float64Array;
  readonly halfDigit: Float64Array;
}

export const onScale = (scale: JudgedClaim['scale'], x: number): number => (scale === 'ln' ? Math.log(x) : x);

/** A width beside a number, as lib/verdicts carries it over: relative on the ln scale. */
export const widthOnScale = (scale: JudgedClaim['scale'], width: number, beside: number): number => (scale === 'ln' ? Math.abs(width / beside) : width);

export function scaledClaim(claim: JudgedClaim): ScaledClaim {
  const { scale, points } = claim;
  const column = (of: (point: JudgedPoint) => number): Float64Array => Float64Array.from(points, of);
  return {
    claim,
    claimed: column(({ claimed }) => onScale(scale, claimed)),
    declared: column(({ value }) => onScale(scale, value)),
    tolerance: column(({ tolerance }) => tolerance),
    uncertainty: column(({ expandedUncertainty, value }) => widthOnScale(scale, expandedUncertainty, value)),
    halfDigit: column(({ halfDigit, claimed }) => widthOnScale(scale, halfDigit, claimed)),
  };
}

/** Numbers of a prediction on the scale; null unless there is one, finite, at every point. */
export function rowOf({ claim }: ScaledClaim, prediction: Prediction | undefined): Float64Array | null {
  if (prediction === undefined || 'because' in prediction || prediction.values.length !== claim.points.length) return null;
  const row = Float64Array.from(prediction.values, (value) => (value === null ? Number.NaN : onScale(claim.scale, value)));
  return row.every(Number.isFinite) ? row : null;
}

/** Never zero: two doubles that are equal are zero apart of it. */
const LEAST = 1e-12;

/** U beside a predicted number: what stands on the absolute scale grows with a number that grew. */
export function uncertaintyBeside({ claim, declared, uncertainty }: ScaledClaim, i: number, y: number): number {
  const u = uncertainty[i]!;
  return claim.scale === 'ln' || declared[i] === 0 ? u : u * Math.max(1, Math.abs(y / declared[i]!));
}

/** T + U at a point: the largest distance that counts as a fit. */
export const reach = (scaled: ScaledClaim, i: number, y: number): number =>
  Math.max(scaled.tolerance[i]! + uncertaintyBeside(scaled, i, y), LEAST * Math.max(1, Math.abs(y)));

/** |claimed − predicted| in units of T + U, at the point furthest off. Not finite where something is not. */
export function misfitOf(scaled: ScaledClaim, row: Float64Array): number {
  let worst = 0;
  for (let i = 0; i < row.length; i++) {
    const apart = Math.abs(scaled.claimed[i]! - row[i]!) / reach(scaled, i, row[i]!);
    if (!(apart <= worst)) worst = apart;
    if (Number.isNaN(worst)) return Number.POSITIVE_INFINITY;
  }
  return worst;
}

/** The misfit below which printed digits and U can tell nothing more, at the coarsest point. */
export function resolutionOf(scaled: ScaledClaim): number {
  let coarsest = 0;
  for (let i = 0; i < scaled.declared.length; i++) {
    const y = scaled.declared[i]!;
    coarsest = Math.max(coarsest, (scaled.halfDigit[i]! + scaled.uncertainty[i]!) / reach(scaled, i, y));
  }
  return Math.min(1, coarsest);
}
