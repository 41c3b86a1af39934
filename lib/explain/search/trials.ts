import type { JudgedClaim, Node, TriedNode } from './node';
import { lnLikelihood, lnPrior, lnUnexplained } from './score';
import { misfitOf, rowOf, scaledClaim, type ScaledClaim } from './scaled-claim';

/** One claim under one reading; the row is null where the reading gives no number. */
export interface Held {
  readonly row: Float64Array | null;
  /** Does the reading move the number at all? */
  readonly moves: boolean;
  readonly misfit: number;
}

/** A reading with what it does to every claim of the sheet that it touches. */
export interface Trial {
  readonly node: Node;
  readonly predictions: TriedNode['predictions'];
  readonly changes: 1 | 2;
  readonly held: readonly (Held | null)[];
  /** ln of the odds against "unexplained", all claims that it explains together. */
  readonly lnOdds: number;
}

export interface Sheet {
  readonly claims: readonly ScaledClaim[];
  readonly trials: readonly Trial[];
}

/** Two numbers nearer than this are one: a tenth of what U and the printed digits resolve, where not rounding alone. */
const ALIKE = 0.1;
const ROUNDING = 1e-6;

export function alikeAt({ claim, uncertainty, halfDigit }: ScaledClaim, i: number, p: number, q: number): boolean {
  const rounding = claim.scale === 'ln' ? ROUNDING : ROUNDING * Math.abs(p);
  return Math.abs(p - q) <= Math.max(rounding, ALIKE * (uncertainty[i]! + halfDigit[i]!));
}

export function alike(scaled: ScaledClaim, p: Float64Array, q: Float64Array): boolean {
  for (let i = 0; i < p.length; i++) if (!alikeAt(scaled, i, p[i]!, q[i]!)) return false;
  return true;
}

export const explains = (held: Held | null | undefined): boolean => held !== null && held !== undefined && held.moves && held.misfit <= 1;

function heldBy(scaled: ScaledClaim, tried: TriedNode): Held | null {
  const prediction = tried.predictions.get(scaled.claim.id);
  if (prediction === undefined) return null;
  const row = rowOf(scaled, prediction);
  if (row === null) return { row, moves: false, misfit: Number.POSITIVE_INFINITY };
  return { row, moves: !alike(scaled, row, scaled.declared), misfit: misfitOf(scaled, row) };
}

/** Claims and readings in an order of their own, so that nothing hangs on the one they came in. */
export function sheetOf(claims: readonly JudgedClaim[], tried: readonly TriedNode[]): Sheet {
  const scaled = claims.map(scaledClaim);
  const unexplained = scaled.map(lnUnexplained);
  const sorted = [...tried].sort((p, q) => (p.node.id < q.node.id ? -1 : p.node.id > q.node.id ? 1 : 0));
  const trials = sorted.map((one): Trial => {
    const held = scaled.map((claim) => heldBy(claim, one));
    const gains = scaled.map((claim, c) => (claim.claim.wanting && explains(held[c]) ? lnLikelihood(claim, held[c]!.row!) - unexplained[c]! : 0));
    return { ...one, changes: one.node.flips.length, held, lnOdds: gains.reduce((sum, gain) => sum + gain, lnPrior(one.node)) };
  });
  return { claims: scaled, trials };
}
