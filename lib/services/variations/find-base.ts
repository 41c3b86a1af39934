import type { Reader } from '@/db/client';
import { findMeasuredRun, type RunRow } from '@/db/reads/runs/run';
import { findLatestLodged, findRevision, listRevisionFiles, type RevisionRow } from '@/db/reads/submissions/revision';
import { getSubmissionHead } from '@/db/reads/submissions/submission-head';
import { ok } from '@/lib/kernel/result';
import type { SubmissionFacts } from '@/lib/policy/facts';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { isCurrent } from '@/lib/services/submissions/before-lodging';
import { asDraftSheet } from '@/lib/services/submissions/draft-sheet';

/** What a variation varies, and the run whose numbers stand beside it. */
export interface Base {
  readonly row: RevisionRow;
  readonly run: RunRow;
}

/**
 * The revision asked for, else the newest lodged one, else the authors' draft. A draft is its authors'
 * alone, and stands beside the latest check that has numbers: with another sheet meanwhile, two things would differ.
 */
export async function findBase(tx: Reader, facts: SubmissionFacts, revision: number | undefined): Promise<Outcome<Base>> {
  const row = await revisionOf(tx, facts, revision);
  if (!row || (row.lodgedAt === null && facts.authorship === null)) return { ok: false, error: NOT_FOUND };
  const run = await findMeasuredRun(tx, row.id, row.lodgedAt === null ? 'check' : 'official');
  if (!run) return fail('precondition', row.lodgedAt === null ? 'There is no number of this draft to vary yet. Check it first.' : 'There are no recomputed numbers of this revision to vary.');
  if (row.lodgedAt === null && !isCurrent(run.inputsDigest, asDraftSheet(row.sheet, row), await listRevisionFiles(tx, row.id)))
    return fail('precondition', 'The draft has changed since the last check that has numbers, so the number beside would be another’s. Check it again, then vary it.');
  return ok({ row, run });
}

async function revisionOf(tx: Reader, facts: SubmissionFacts, revision: number | undefined): Promise<RevisionRow | undefined> {
  if (revision !== undefined) return findRevision(tx, facts.submissionId, revision);
  const lodged = await findLatestLodged(tx, facts.submissionId);
  return lodged ?? findRevision(tx, facts.submissionId, (await getSubmissionHead(tx, facts.submissionId)).currentRevision);
}
