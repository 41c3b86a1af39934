import { database } from '@/db/client';
import { findFigures, findRun, listRunHeads, listRuns as readRuns, type RunRow } from '@/db/reads/runs/run';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { findVariationByRun, listVariations } from '@/db/reads/variations/variations';
import { isUuid } from '@/lib/kernel/uuid';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { pageOf, type Page, type PageAsk } from '@/lib/services/paging';
import { fittingView } from '@/lib/services/submissions/get-submission';
import type { FiguresView, RunView } from '@/lib/services/submissions/submission-view';
import { seesVariation } from '@/lib/services/variations/sees-variation';
import { viewRun } from './run-view';

/** Which runs somebody may see: checks are the authors', official runs everybody's who sees the revision, variations the asker's. */
async function seenRuns<T extends Pick<RunRow, 'id' | 'kind'>>(actor: Actor, facts: SubmissionFacts, rows: readonly T[]): Promise<readonly T[]> {
  const userId = userIdOf(actor);
  const own = userId === null ? [] : await listVariations(database(), facts.submissionId, userId);
  const ownRuns = new Set(own.map((v) => v.runId));
  return rows.filter((row) => (row.kind === 'check' ? facts.authorship !== null : row.kind === 'official' || ownRuns.has(row.id)));
}

/** The newest first. */
export async function listRuns(actor: Actor, submissionId: string, ask: PageAsk = { limit: 100 }): Promise<Outcome<Page<RunView>>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  if (!facts || !fittingView(actor, facts)) return { ok: false, error: NOT_FOUND };
  const page = pageOf(await seenRuns(actor, facts, await listRunHeads(database(), submissionId)), ask, ({ id }) => id);
  if (!page.ok) return page;
  const ids = page.value.items.map(({ id }) => id);
  const rows = ids.length === 0 ? [] : await readRuns(database(), ids);
  return ok({ items: rows.map(viewRun), next: page.value.next });
}

/** The curves of a variation are seen with it; its run is not listed, since when it was asked for may tell by whom. */
async function seesFigures(actor: Actor, facts: SubmissionFacts, row: RunRow): Promise<boolean> {
  const variation = row.kind === 'variation' ? await findVariationByRun(database(), row.id) : undefined;
  return variation ? seesVariation(database(), actor, facts, variation) : (await seenRuns(actor, facts, [row])).length > 0;
}

/** The curves of one run, for eyes. */
export async function getFigures(actor: Actor, submissionId: string, runId: string): Promise<Outcome<FiguresView>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  if (!facts || !fittingView(actor, facts) || !isUuid(runId)) return { ok: false, error: NOT_FOUND };
  const row = await findRun(database(), runId);
  const figures = row?.submissionId === submissionId && (await seesFigures(actor, facts, row)) ? await findFigures(database(), row.id) : undefined;
  return figures ? ok({ runId, figures }) : { ok: false, error: NOT_FOUND };
}
