import { desc, eq } from 'drizzle-orm';
import type { Reader } from '@/db/client';
import { users } from '@/db/schema/accounts';
import { decisions } from '@/db/schema/decisions';
import { records, signingRefusals } from '@/db/schema/records';

const select = (reader: Reader) =>
  reader
    .select({
      id: decisions.id,
      submissionId: decisions.submissionId,
      kind: decisions.kind,
      round: decisions.round,
      revision: decisions.revision,
      attempt: decisions.attempt,
      level: decisions.level,
      remarks: decisions.remarks,
      covers: decisions.covers,
      runId: decisions.runId,
      letter: decisions.letter,
      publicSentence: decisions.publicSentence,
      decidedBy: decisions.decidedBy,
      by: users.name,
      decidedAt: decisions.decidedAt,
      recordId: records.id,
      refusal: signingRefusals.reason,
    })
    .from(decisions)
    .innerJoin(users, eq(users.id, decisions.decidedBy))
    .leftJoin(records, eq(records.decisionId, decisions.id))
    .leftJoin(signingRefusals, eq(signingRefusals.decisionId, decisions.id));
export type DecisionRow = Awaited<ReturnType<typeof select>>[number];

/** The newest first. */
export const listDecisions = (reader: Reader, submissionId: string): Promise<DecisionRow[]> =>
  select(reader).where(eq(decisions.submissionId, submissionId)).orderBy(desc(decisions.decidedAt));

/** The one that stands for a revision: the latest attempt, unless the signer refused it. */
export async function findLiveDecision(reader: Reader, submissionId: string, revision: number): Promise<{ readonly live: DecisionRow | undefined; readonly attempts: number }> {
  const all = (await listDecisions(reader, submissionId)).filter((d) => d.revision === revision);
  const newest = all.sort((a, b) => b.attempt - a.attempt)[0];
  return { live: newest?.refusal === null ? newest : undefined, attempts: newest?.attempt ?? 0 };
}
