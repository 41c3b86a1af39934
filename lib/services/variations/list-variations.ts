import { findReadings, findRun, type RunRow } from '@/db/reads/runs/run';
import { countVariations, listVariations as readVariations, type VariationRow } from '@/db/reads/variations/variations';
import type { OfferedReading } from '@/lib/explain/read-otherwise';
import { ok } from '@/lib/kernel/result';
import { readingsOfClaim, type ReadingsByClaim } from '@/lib/pipeline/explain/offered-readings';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import { readSubmission } from '@/lib/services/act';
import type { Outcome } from '@/lib/services/app-error';
import { viewRun } from '@/lib/services/runs/run-view';
import { findBase } from './find-base';
import { dailyQuota } from './request-variation';
import { viewHead } from './view-head';
import { pageOf, type Page, type PageAsk } from '@/lib/services/paging';
import type { VariationList, VariationView } from './variation-view';

/** One's own variations of a submission, the newest first; with how the claims of the revision named may be read otherwise. */
export async function listVariations(actor: Actor, submissionId: string, revision?: number): Promise<Outcome<VariationList>> {
  const page = await pageVariations(actor, submissionId, { limit: Number.MAX_SAFE_INTEGER });
  if (!page.ok) return page;
  const readings = revision === undefined ? ok({}) : await readingsFor(actor, submissionId, revision);
  return readings.ok ? ok({ variations: page.value.items, left: page.value.left, readings: readings.value }) : readings;
}

/** None where the revision has no number to vary; null where it was measured before readings were kept. */
function readingsFor(actor: Actor, submissionId: string, revision: number | undefined): Promise<Outcome<ReadingsByClaim | null>> {
  return readSubmission({ actor, action: 'submission.view-variations', submissionId }, async ({ reader, facts }) => {
    const base = await findBase(reader, facts, revision);
    return ok(base.ok ? await findReadings(reader, base.value.run.id) : {});
  });
}

/** A page of them; where a claim is named, how the newest revision's may be read otherwise. */
export async function pageWithReadings(actor: Actor, submissionId: string, { claimId, ...ask }: PageAsk & { readonly claimId?: string }): Promise<Outcome<Page<VariationView> & { readonly left: number; readonly readings: readonly OfferedReading[] }>> {
  const page = await pageVariations(actor, submissionId, ask);
  if (!page.ok) return page;
  const readings = claimId === undefined ? ok<ReadingsByClaim | null>({}) : await readingsFor(actor, submissionId, undefined);
  return readings.ok ? ok({ ...page.value, readings: readingsOfClaim(readings.value ?? {}, claimId ?? '') }) : readings;
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
