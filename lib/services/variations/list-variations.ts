import { findRun } from '@/db/reads/runs/run';
import { countVariations, listVariations as readVariations } from '@/db/reads/variations/variations';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { readSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import { viewRun } from '@/lib/services/runs/run-view';
import { dailyQuota } from './request-variation';
import type { VariationList, VariationView } from './variation-view';

/** One's own variations of a submission, the newest first. */
export function listVariations(actor: Actor, submissionId: string): Promise<Outcome<VariationList>> {
  return readSubmission({ actor, action: 'submission.view-variations', submissionId }, async ({ reader, facts }) => {
    const userId = userIdOf(actor) ?? '';
    const rows = await readVariations(reader, submissionId, userId);
    const counts = await countVariations(reader, submissionId, userId, 24);
    const variations: VariationView[] = [];
    for (const row of rows) {
      const run = await findRun(reader, row.runId);
      if (run) variations.push({ id: row.id, claimId: row.claimId, changes: row.changes, note: row.note, requestedAt: row.requestedAt.toISOString(), run: viewRun(run) });
    }
    const quota = dailyQuota(facts, 'accountRole' in actor ? actor.accountRole : 'member');
    return ok({ variations, left: Math.max(0, quota - counts.lately) });
  });
}
