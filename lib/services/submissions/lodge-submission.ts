import type { Transaction } from '@/db/client';
import { findRevision, type RevisionRow } from '@/db/reads/submissions/revision';
import { getSubmissionHead, listAuthors } from '@/db/reads/submissions/submission-head';
import { freezeRevision } from '@/db/writes/submissions/freeze-revision';
import { moveSubmission } from '@/db/writes/submissions/move-submission';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { actOnSubmission } from '@/lib/services/act';
import { fail, NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { beforeLodging } from './before-lodging';
import { findCheck } from './find-check';
import { runRevision } from './run-draft';
import { namesContent, versionMoved } from './submission-tag';
import type { RevisionView } from './submission-view';
import { LODGED_ALREADY } from './update-draft';
import { viewRevision } from './view-parts';

/** Freezes the revision and asks for its official run, all or nothing. When that is done the submission is in Triage. */
export function lodgeSubmission(actor: Actor, submissionId: string, ifMatch: readonly string[] | null = null): Promise<Outcome<{ readonly revision: number; readonly runId: string }>> {
  return actOnSubmission({ actor, action: 'submission.lodge', submissionId }, async ({ tx, grant, facts, note }) => {
    if (facts.currentLodged) return fail('conflict', LODGED_ALREADY);
    const { currentRevision } = await getSubmissionHead(tx, submissionId);
    const row = await findRevision(tx, submissionId, currentRevision);
    if (!row) return { ok: false, error: NOT_FOUND };
    const revision = await viewRevision(tx, row);
    if (ifMatch && !namesContent(ifMatch, revision)) return fail('precondition', versionMoved(row));
    const obstacles = await obstaclesOf(tx, row, revision);
    if (obstacles.length > 0) return fail('precondition', `Not lodged. ${obstacles.join(' ')}`, obstacles.map(asProblem));
    const runId = await runRevision(tx, grant, row, 'official');
    const moved = (await freezeRevision(tx, grant, row.id)) && (await moveSubmission(tx, grant, { to: 'lodged' }));
    if (!moved) return fail('conflict', 'The submission has moved on meanwhile. Reload to see where it stands.');
    note({ revision: row.number, runId });
    return ok({ revision: row.number, runId });
  });
}

async function obstaclesOf(tx: Transaction, row: RevisionRow, revision: RevisionView): Promise<readonly string[]> {
  const authors = await listAuthors(tx, row.submissionId);
  return beforeLodging({
    ...revision,
    authors: authors.map((a) => ({ name: a.name, affiliation: a.affiliation, role: a.role, confirmed: a.confirmedAt !== null })),
    check: await findCheck(tx, revision),
  });
}

const asProblem = (sentence: string) => ({ code: 'submissions/before-lodging', where: '', saw: sentence, expected: 'nothing in the way' });
