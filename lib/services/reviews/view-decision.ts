import type { DecisionRow } from '@/db/reads/decisions/decisions';
import type { DecisionView } from './decision-view';

/** Why the signer refused is between it and the editors; to others the record is still being signed. */
export function viewDecision(row: DecisionRow, forEditor: boolean): DecisionView {
  return {
    id: row.id,
    kind: row.kind,
    round: row.round,
    revision: row.revision,
    by: row.by,
    at: row.decidedAt.toISOString(),
    level: row.level,
    remarks: row.remarks,
    covers: row.covers,
    letter: row.letter,
    publicSentence: row.publicSentence,
    signing: signingOf(row, forEditor),
  };
}

function signingOf(row: DecisionRow, forEditor: boolean): DecisionView['signing'] {
  if (row.kind !== 'enter') return { state: 'not-needed' };
  if (row.recordId !== null) return { state: 'signed', recordId: row.recordId };
  return row.refusal !== null && forEditor ? { state: 'refused', reason: row.refusal } : { state: 'waiting' };
}
