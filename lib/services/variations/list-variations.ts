import { findRun, type RunRow } from '@/db/reads/runs/run';
import { countVariations, listVariations as readVariations, type VariationRow } from '@/db/reads/variations/variations';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { readSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import { viewRun } from '@/lib/services/runs/run-view';
import { dailyQuota } from './request-variation';
import { viewHead } from './view-head';
import { pageOf, type Page, type PageAsk } from '@/lib/services/paging';
import type { VariationList, VariationView } from './variation-view';

/** One's own variations of a submission, the newest first. */
export async function listVariations(actor: Actor, submissionId: string): Promise<Outcome<VariationList>> {
  const page = await pageVariations(actor, submissionId, { limit: Number.MAX_SAFE_INTEGER });
  return page.ok ? ok({ variations: page.value.items, left: page.value.left }) : page;
}

export function pageVariations(actor: Actor, submissionId: string, ask: PageAsk): Promise<Outcome<Page<VariationView> & Pick<VariationList, 'left'>>> {
  return readSubmission({ actor, action: 'submission.view-variations', submissionId }, async ({ reader, facts }) => {
    const userId = userIdOf(actor) ?? '';
    const page = pageOf(await readVariations(reader, submissionId, userId), ask, ({ id }) => id);
    if (!page.ok) return page;
    const counts = await countVariations(reader, submissionId, userId, 24);
    const items: VariationView[] = [];
    for (const row of page.value.items) {
      const run = await findRun(reader, row.runId);
      if (run) items.push(viewVariation(row, run));
    }
    const quota = dailyQuota(facts, 'accountRole' in actor ? actor.accountRole : 'member');
    return ok({ items, next: page.value.next, left: Math.max(0, quota - counts.lately) });
  });
}

const viewVariation = (row: VariationRow, run: RunRow): VariationView => ({
  ...viewHead(row),
  requestedAt: row.requestedAt.toISOString(),
  run: viewRun(run),
});
