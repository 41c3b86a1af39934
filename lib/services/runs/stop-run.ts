import { findRun, type RunRow } from '@/db/reads/runs/run';
import { findVariationByRun } from '@/db/reads/variations/variations';
import type { Transaction } from '@/db/client';
import { askStop } from '@/db/writes/runs/ask-stop';
import { ok } from '@/lib/kernel/result';
import { isUuid } from '@/lib/kernel/uuid';
import type { Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { isOwn } from '@/lib/services/variations/sees-variation';

/**
 * One's own check or variation is wanted no longer. Before there is a number nothing is kept of it; a
 * search for other readings ends with what it has, and the numbers stand. The worker acts on it within a second.
 */
export function stopRun(actor: Actor, submissionId: string, runId: string): Promise<Outcome<null>> {
  return actOnSubmission({ actor, action: 'submission.stop-run', submissionId }, async ({ tx, grant, facts, note }) => {
    const run = isUuid(runId) ? await findRun(tx, runId) : undefined;
    if (run?.submissionId !== submissionId || !(await isTheirs(tx, actor, facts, run))) return { ok: false, error: NOT_FOUND };
    if (run.kind === 'official') return fail('precondition', 'The official run of a lodged revision is not stopped: its numbers are owed to the review.');
    if (run.outcome !== null || run.state === 'finished' || run.state === 'stopped') return fail('conflict', 'This run has ended already. Reload to see what came of it.');
    await askStop(tx, grant, run.id);
    note({ runId: run.id });
    return ok(null);
  });
}

/** A check is its authors', a variation belongs to who asked; official runs are seen by all and refused by name. */
async function isTheirs(tx: Transaction, actor: Actor, { authorship }: SubmissionFacts, run: RunRow): Promise<boolean> {
  if (run.kind === 'check') return authorship !== null;
  if (run.kind === 'official') return true;
  const variation = await findVariationByRun(tx, run.id);
  return variation !== undefined && isOwn(actor, variation);
}
