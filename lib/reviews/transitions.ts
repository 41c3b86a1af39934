import { err, ok, type Result } from '@/lib/kernel/result';
import type { SubmissionState } from '@/lib/policy/submission-state';
import type { DecisionKind } from './decision';

/**
 * The state machine as data: every move of a submission from lodging on, who makes it, and what has
 * to hold. Who may act at all is the policy's question; whether the move is lawful is this table's.
 */
export type Mover = 'author' | 'editor' | 'referee' | 'machine' | 'signer' | 'administrator';

export interface MoveFacts {
  /** Referees who accepted and were not relieved. */
  readonly accepted: number;
  /** Of those, how many have handed in a report in this round. */
  readonly reported: number;
  readonly decision: DecisionKind | null;
  readonly hasSignedRecord: boolean;
}

export interface MoveRefusal {
  readonly code: 'reviews/no-such-move' | 'reviews/no-referee' | 'reviews/no-report' | 'reviews/reports-out' | 'reviews/no-decision' | 'reviews/not-signed';
  readonly text: string;
}

type Guard = (facts: MoveFacts) => MoveRefusal | null;

const hasReferee: Guard = (f) => (f.accepted > 0 ? null : { code: 'reviews/no-referee', text: 'No referee has accepted yet; invite one, or wait for an answer.' });
const hasReport: Guard = (f) => (f.reported > 0 ? null : { code: 'reviews/no-report', text: 'No report of this round is in; a decision rests on at least one.' });
const allReported: Guard = (f) =>
  f.accepted > 0 && f.reported >= f.accepted ? null : { code: 'reviews/reports-out', text: `${f.reported} of ${f.accepted} reports are in.` };
const decided =
  (kind: DecisionKind): Guard =>
  (f) =>
    f.decision === kind ? null : { code: 'reviews/no-decision', text: `There is no decision of the kind “${kind}”.` };
const signed: Guard = (f) => (f.hasSignedRecord ? null : { code: 'reviews/not-signed', text: 'The signer has not signed a record.' });

export interface Move {
  readonly name: string;
  readonly from: SubmissionState;
  readonly to: SubmissionState;
  readonly by: Mover;
  readonly guards: readonly Guard[];
}

export const MOVES = [
  { name: 'run-finished', from: 'lodged', to: 'triage', by: 'machine', guards: [] },
  { name: 'send-to-review', from: 'triage', to: 'in-review', by: 'editor', guards: [hasReferee] },
  { name: 'first-acceptance', from: 'triage', to: 'in-review', by: 'machine', guards: [hasReferee] },
  { name: 'all-reports-in', from: 'in-review', to: 'deciding', by: 'machine', guards: [allReported] },
  { name: 'begin-deciding', from: 'in-review', to: 'deciding', by: 'editor', guards: [hasReport] },
  { name: 'set-aside-in-triage', from: 'triage', to: 'set-aside', by: 'editor', guards: [decided('set-aside')] },
  { name: 'set-aside', from: 'deciding', to: 'set-aside', by: 'editor', guards: [decided('set-aside')] },
  { name: 'send-back', from: 'deciding', to: 'back-with-author', by: 'editor', guards: [decided('back-with-author')] },
  { name: 'enter', from: 'deciding', to: 'entered', by: 'signer', guards: [decided('enter'), signed] },
] as const satisfies readonly Move[];
export type MoveName = (typeof MOVES)[number]['name'];

/** The state a move leads to from here, or why it may not be made. */
export function follow(name: MoveName, from: SubmissionState, facts: MoveFacts): Result<SubmissionState, MoveRefusal> {
  const move: Move | undefined = MOVES.find((m) => m.name === name && m.from === from);
  if (!move) return err({ code: 'reviews/no-such-move', text: `“${name}” is no move from “${from}”.` });
  for (const guard of move.guards) {
    const refusal = guard(facts);
    if (refusal) return err(refusal);
  }
  return ok(move.to);
}
