import type { Reader } from '@/db/client';
import { countReferees } from '@/db/reads/reviews/invitations';
import type { MoveFacts, MoveRefusal } from '@/lib/reviews/transitions';
import { fail } from '@/lib/services/app-error';

export async function loadMoveFacts(reader: Reader, submissionId: string, round: number): Promise<MoveFacts> {
  return { ...(await countReferees(reader, submissionId, round)), decision: null, hasSignedRecord: false };
}

export const refusedMove = (refusal: MoveRefusal) =>
  fail('precondition', refusal.text, [{ code: refusal.code, where: '', saw: refusal.text, expected: 'what the next state asks for' }]);

export const MOVED_ON = 'The submission has moved on meanwhile. Reload to see where it stands.';
