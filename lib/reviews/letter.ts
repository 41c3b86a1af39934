import type { ResultClaim, ResultDocument } from '@/lib/pipeline/result';
import type { Anchor } from './anchors';
import { isOpen, type ThreadKind, type ThreadState, type ThreadVisibility } from './threads';
import type { Place } from '@/lib/kernel/place';

/** The part of a letter that the machine drafts: the numbers and the points. The prose is the editor's. */
export interface LetterNumber {
  readonly claim: string;
  readonly quantity: string;
  readonly unit: string;
  readonly at: Place;
  /** As the authors printed it. */
  readonly claimed: string;
  readonly recomputed: number | null;
  readonly expandedUncertainty: number | null;
  readonly tolerance: number | null;
  readonly verdict: string;
}

export interface LetterPoint {
  readonly threadId: string;
  readonly kind: 'must-change' | 'should-change';
  readonly anchor: Anchor;
  readonly state: ThreadState;
  /** The opening words of the thread, as a start for the editor. */
  readonly text: string;
}

export interface LetterThread {
  readonly id: string;
  readonly kind: ThreadKind;
  readonly state: ThreadState;
  readonly visibility: ThreadVisibility;
  readonly anchor: Anchor;
  readonly opening: string;
}

const claimNumbers = (claim: ResultClaim): LetterNumber[] =>
  claim.points.map((point) => ({
    claim: claim.id,
    quantity: claim.quantity,
    unit: claim.unit,
    at: point.at,
    claimed: point.printed,
    recomputed: point.value,
    expandedUncertainty: point.expandedUncertainty,
    tolerance: point.tolerance,
    verdict: point.verdict,
  }));

export const draftNumbers = (result: ResultDocument): LetterNumber[] => result.claims.flatMap(claimNumbers);

const RANK = { 'must-change': 0, 'should-change': 1 } as const;
const isPoint = (thread: LetterThread): thread is LetterThread & { kind: LetterPoint['kind'] } => thread.kind in RANK;

/** Points still to be answered or changed, must before should. Only what the authors can read: a letter leaks nothing. */
export function draftPoints(threads: readonly LetterThread[]): LetterPoint[] {
  const readable = threads.filter(isPoint).filter((t) => t.visibility === 'authors' && isOpen(t.state));
  return readable
    .map((t) => ({ threadId: t.id, kind: t.kind, anchor: t.anchor, state: t.state, text: t.opening }))
    .sort((a, b) => RANK[a.kind] - RANK[b.kind]);
}
