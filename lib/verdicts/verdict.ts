import { halfLastDigit, type Claimed } from '@/lib/claims/claimed';
import type { MeasuredPoint } from '@/lib/engine/contract/measurement';
import type { ToleranceScale } from '@/lib/engine/contract/quantity';
import { allFinite } from '@/lib/kernel/finite';

/**
 * The weighing room: claim and measurement in, verdict out. It computes no physics and knows no
 * opinion. Guard bands as in JCGM 106, the rules in the order of the product's definition; any
 * comparison with something that is not a finite number ends as *not computable*.
 */
export type VerdictWord = 'agrees' | 'differs' | 'unsettled' | 'not-computable' | 'routes-disagree';

export interface Weighing {
  readonly claimed: Claimed;
  readonly measured: Pick<MeasuredPoint, 'value' | 'routes' | 'expandedUncertainty'>;
  /** Did route B run at this point? Where it should have and gave nothing, nothing is decided. */
  readonly routeBRan: boolean;
  readonly scale: ToleranceScale;
  /** In the quantity's unit, a fraction on the ln scale; null takes the natural one. */
  readonly declaredTolerance: number | null;
  readonly naturalTolerance: (value: number) => number;
  readonly stopped: boolean;
}

export interface PointVerdict {
  readonly word: VerdictWord;
  /** T, or null for a bound and where there is none. */
  readonly tolerance: number | null;
  /** recomputed − claimed, or the logarithm of their ratio on that scale. */
  readonly apart: number | null;
}

export function decideVerdict(weighing: Weighing): PointVerdict {
  return weighing.claimed.kind === 'value' ? weighValue(weighing, weighing.claimed) : weighBound(weighing, weighing.claimed);
}

const nothing = (tolerance: number | null): PointVerdict => ({ word: 'not-computable', tolerance, apart: null });

function weighValue(w: Weighing, claimed: Extract<Claimed, { kind: 'value' }>): PointVerdict {
  const tolerance = toleranceOf(w, claimed);
  const { value, expandedUncertainty } = onScale(w);
  const target = w.scale === 'ln' ? Math.log(claimed.value) : claimed.value;
  if (value === null || expandedUncertainty === null || !allFinite(value, expandedUncertainty, target, tolerance) || w.stopped || !routesFinite(w)) return nothing(finiteOrNull(tolerance));
  const apart = value - target;
  const d = Math.abs(apart);
  if (routesDisagree(w, tolerance, expandedUncertainty)) return { word: 'routes-disagree', tolerance, apart };
  if (d - expandedUncertainty > tolerance) return { word: 'differs', tolerance, apart };
  if (d + expandedUncertainty <= tolerance) return { word: 'agrees', tolerance, apart };
  return { word: 'unsettled', tolerance, apart };
}

const finiteOrNull = (x: number): number | null => (Number.isFinite(x) ? x : null);

/** Inequalities have no tolerance; only whether the routes agree is judged against the natural one at the recomputed value. */
function weighBound(w: Weighing, claimed: Extract<Claimed, { bound: number }>): PointVerdict {
  const { value, expandedUncertainty: uncertainty } = w.measured;
  if (value === null || uncertainty === null || !allFinite(value, uncertainty, claimed.bound) || w.stopped || !routesFinite(w)) return nothing(null);
  const apart = value - claimed.bound;
  const scaled = onScale(w);
  const natural = widened(w.naturalTolerance(value), w.scale);
  if (!allFinite(natural, scaled.expandedUncertainty)) return nothing(null);
  if (routesDisagree(w, natural, scaled.expandedUncertainty ?? Number.NaN)) return { word: 'routes-disagree', tolerance: null, apart };
  const low = value - uncertainty;
  const high = value + uncertainty;
  const above = claimed.kind === 'above';
  if (above ? low >= claimed.bound : high <= claimed.bound) return { word: 'agrees', tolerance: null, apart };
  if (above ? high < claimed.bound : low > claimed.bound) return { word: 'differs', tolerance: null, apart };
  return { word: 'unsettled', tolerance: null, apart };
}

/** T: the declared (or natural) tolerance plus half a unit of the last printed digit. */
function toleranceOf(w: Weighing, claimed: Extract<Claimed, { kind: 'value' }>): number {
  const declared = w.declaredTolerance ?? w.naturalTolerance(claimed.value);
  const half = halfLastDigit(claimed);
  return w.scale === 'ln' ? Math.log1p(declared + half / Math.abs(claimed.value)) : declared + half;
}

const widened = (tolerance: number, scale: ToleranceScale): number => (scale === 'ln' ? Math.log1p(tolerance) : tolerance);

function onScale({ measured, scale }: Weighing): { value: number | null; expandedUncertainty: number | null } {
  const { value, expandedUncertainty } = measured;
  if (scale === 'absolute' || value === null || expandedUncertainty === null) return { value, expandedUncertainty };
  return { value: Math.log(value), expandedUncertainty: Math.abs(expandedUncertainty / value) };
}

/** A route that did not run says nothing; a route that ran and gave nothing finite decides nothing. */
function routesFinite({ measured, routeBRan }: Weighing): boolean {
  return allFinite(measured.routes.A) && (!routeBRan || allFinite(measured.routes.B));
}

function routesDisagree({ measured: { routes }, routeBRan, scale }: Weighing, tolerance: number, uncertainty: number): boolean {
  if (!routeBRan || routes.A === null || routes.B === null) return false;
  const between = scale === 'ln' ? Math.abs(Math.log(routes.A / routes.B)) : Math.abs(routes.A - routes.B);
  return !(between <= Math.max(tolerance / 4, uncertainty));
}

/** Gravest first, in the order of the rules. */
const gravity: readonly VerdictWord[] = ['not-computable', 'routes-disagree', 'differs', 'unsettled', 'agrees'];

/** The worst point speaks for the claim; a claim without a point is not computable. */
export function claimVerdict(points: readonly VerdictWord[]): VerdictWord {
  return gravity.find((word) => points.includes(word)) ?? 'not-computable';
}

export type SubmissionVerdict = 'all-agree' | 'some-agree' | 'none-agrees' | 'unsettled';

export function submissionVerdict(claims: readonly VerdictWord[]): SubmissionVerdict {
  const agreeing = claims.filter((word) => word === 'agrees').length;
  if (agreeing > 0) return agreeing === claims.length ? 'all-agree' : 'some-agree';
  return claims.includes('differs') ? 'none-agrees' : 'unsettled';
}
