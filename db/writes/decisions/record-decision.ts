import { sql } from 'drizzle-orm';
import type { Transaction } from '@/db/client';
import { decisions, type StoredLetter } from '@/db/schema/decisions';
import { userIdOf } from '@/lib/policy/actor';
import type { SubmissionGrant } from '@/lib/policy/grant';
import type { DecisionKind, DecisionRemark, Level } from '@/lib/reviews/decision';

export interface NewDecision {
  readonly round: number;
  readonly revision: number;
  readonly attempt: number;
  readonly kind: DecisionKind;
  readonly level: Level | null;
  readonly remarks: readonly DecisionRemark[];
  readonly covers: readonly string[];
  readonly runId: string | null;
  readonly letter: StoredLetter;
  readonly publicSentence: string;
}

type MayDecide = SubmissionGrant<'review.set-aside' | 'review.send-back' | 'review.enter'>;

/** The channel on which the signer listens; a notice without content, since it reads everything for itself. */
export const DECIDED_CHANNEL = 'counterfoil_decided';

/** Undefined when another editor's decision on this revision stands already. */
export async function recordDecision(tx: Transaction, grant: MayDecide, decision: NewDecision): Promise<string | undefined> {
  const decidedBy = userIdOf(grant.actor);
  if (decidedBy === null) throw new Error('a decision needs an editor');
  const [made] = await tx
    .insert(decisions)
    .values({ submissionId: grant.submissionId, decidedBy, ...decision })
    .onConflictDoNothing({ target: [decisions.submissionId, decisions.revision, decisions.attempt] })
    .returning({ id: decisions.id });
  if (made && decision.kind === 'enter') await tx.execute(sql`select pg_notify(${DECIDED_CHANNEL}, '')`);
  return made?.id;
}
