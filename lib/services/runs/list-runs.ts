import { database } from '@/db/client';
import { findFigures, findRun, listRuns as readRuns, type RunRow } from '@/db/reads/runs/run';
import { findSubmissionFacts } from '@/db/reads/submissions/submission-facts';
import { listVariations } from '@/db/reads/variations/variations';
import { isUuid } from '@/lib/kernel/uuid';
import { ok } from '@/lib/kernel/result';
import { userIdOf, type Actor } from '@/lib/policy/actor';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { fittingView } from '@/lib/services/submissions/get-submission';
import type { FiguresView, RunView } from '@/lib/services/submissions/submission-view';
import { viewRun } from './run-view';

/** Which runs somebody may see: checks are the authors', official runs everybody's who sees the revision, variations the asker's. */
async function seenRuns(actor: Actor, facts: SubmissionFacts, rows: readonly RunRow[]): Promise<readonly RunRow[]> {
  const userId = userIdOf(actor);
  const own = userId === null ? [] : await listVariations(database(), facts.submissionId, userId);
  const ownRuns = new Set(own.map((v) => v.runId));
  return rows.filter((row) => (row.kind === 'check' ? facts.authorship !== null : row.kind === 'official' || ownRuns.has(row.id)));
}

export async function listRuns(actor: Actor, submissionId: string): Promise<Outcome<readonly RunView[]>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  if (!facts || !fittingView(actor, facts)) return { ok: false, error: NOT_FOUND };
  const rows = await seenRuns(actor, facts, await readRuns(database(), submissionId));
  return ok(rows.map(viewRun));
}

/** The curves of one run, for eyes. */
export async function getFigures(actor: Actor, submissionId: string, runId: string): Promise<Outcome<FiguresView>> {
  const facts = await findSubmissionFacts(database(), actor, submissionId);
  if (!facts || !fittingView(actor, facts) || !isUuid(runId)) return { ok: false, error: NOT_FOUND };
  const row = await findRun(database(), runId);
  const [seen] = row?.submissionId === submissionId ? await seenRuns(actor, facts, [row]) : [];
  const figures = seen && (await findFigures(database(), seen.id));
  return figures ? ok({ runId, figures }) : { ok: false, error: NOT_FOUND };
}
