import { database, type Reader } from '@/db/client';
import { findNewestRecord } from '@/db/reads/records/record';
import { findMeasuredRun, findRun, type RunRow } from '@/db/reads/runs/run';
import { findVariation, findVariedSubmission, type VariationRow } from '@/db/reads/variations/variations';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { findRevision } from '@/db/reads/submissions/revision';
import { ok } from '@/lib/kernel/result';
import { isUuid } from '@/lib/kernel/uuid';
import type { Actor } from '@/lib/policy/actor';
import { isPublic, type SubmissionFacts } from '@/lib/policy/facts';
import { may } from '@/lib/policy/grant';
import { readSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { viewRun } from '@/lib/services/runs/run-view';
import { isOfDraft, isOwn, seesVariation } from './sees-variation';
import { viewHead } from './view-head';
import type { VariationPage, VariedRun } from './variation-view';

/** A link to exactly one view holds no more than its id. */
export async function getVariation(actor: Actor, variationId: string): Promise<Outcome<VariationPage>> {
  const submissionId = isUuid(variationId) ? await findVariedSubmission(database(), variationId) : undefined;
  return submissionId === undefined ? { ok: false, error: NOT_FOUND } : getVariationOf(actor, submissionId, variationId);
}

/** One variation beside the number it varies, for whoever may see it. */
export function getVariationOf(actor: Actor, submissionId: string, variationId: string): Promise<Outcome<VariationPage>> {
  return readSubmission({ actor, action: 'submission.view-variation', submissionId }, async ({ reader, facts }) => {
    const row = isUuid(variationId) ? await findVariation(reader, submissionId, variationId) : undefined;
    if (!row || !(await seesVariation(reader, actor, facts, row))) return { ok: false, error: NOT_FOUND };
    const [run, base] = [await findRun(reader, row.runId), await baseRunOf(reader, row)];
    const official = base?.result?.claims.find((claim) => claim.id === row.claimId);
    if (!run || !base || !official) return { ok: false, error: NOT_FOUND };
    const yours = isOwn(actor, row);
    return ok({
      ...viewHead(row),
      submissionId,
      title: (await findRevision(reader, submissionId, row.revision))?.title ?? '',
      yours,
      mayShare: yours && !isOfDraft(row) && may('submission.share-variation', actor, facts).ok,
      from: await whereFrom(reader, actor, facts, row),
      officialRunId: base.id,
      officialEngine: base.engine,
      official,
      runId: run.id,
      engine: run.engine,
      run: variedRun(run, row.claimId),
    });
  });
}

/** Rows of earlier versions do not name it: they stood beside the official run. */
const baseRunOf = (reader: Reader, row: VariationRow): Promise<RunRow | undefined> =>
  row.baseRunId === null ? findMeasuredRun(reader, row.revisionId, 'official') : findRun(reader, row.baseRunId);

function variedRun(row: RunRow, claimId: string): VariedRun {
  const run = viewRun(row);
  switch (run.state) {
    case 'queued':
    case 'running': return { state: run.state, fraction: run.fraction, doing: run.doing };
    case 'stopped': return { state: 'stopped', because: run.because };
    case 'refused': return { state: 'refused', problems: run.problems };
    case 'measured': {
      const claim = run.result.claims.find((c) => c.id === claimId);
      return claim ? { state: 'measured', claim } : { state: 'stopped', because: 'The run gave no number of this claim.' };
    }
  }
}

async function whereFrom(reader: Reader, actor: Actor, facts: SubmissionFacts, row: VariationRow): Promise<VariationPage['from']> {
  const { submissionId } = facts;
  if (facts.authorship) {
    const open = !facts.currentLodged && (await getSubmissionHead(reader, submissionId)).currentRevision === row.revision;
    return { kind: open ? 'draft' : 'submission', id: submissionId };
  }
  const record = isPublic(facts) ? await findNewestRecord(reader, submissionId) : undefined;
  return record ? { kind: 'record', id: record.id } : { kind: may('review.read-threads', actor, facts).ok ? 'review' : 'submission', id: submissionId };
}
