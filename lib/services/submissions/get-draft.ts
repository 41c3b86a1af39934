import { findLatestRun } from '@/db/reads/runs/run';
import { findRevision } from '@/db/reads/submissions/revision';
import { ok } from '@/lib/kernel/result';
import type { Actor } from '@/lib/policy/actor';
import { readSubmission } from '@/lib/services/act';
import { NOT_FOUND, type Outcome } from '@/lib/services/app-error';
import { viewRun } from '@/lib/services/runs/run-view';
import { beforeLodging, isCurrent } from './before-lodging';
import type { DraftView } from './submission-view';
import { viewCandidateAnswers, viewHead, viewRevision } from './view-parts';

/** The composer's view of the current revision, for its authors. */
export function getDraft(actor: Actor, submissionId: string): Promise<Outcome<DraftView>> {
  return readSubmission({ actor, action: 'submission.view-draft', submissionId }, async ({ reader, facts }) => {
    const { currentRevision, ...head } = await viewHead(reader, actor, facts);
    const row = await findRevision(reader, submissionId, currentRevision);
    if (!row) return { ok: false, error: NOT_FOUND };
    const revision = await viewRevision(reader, row);
    const found = await findLatestRun(reader, row.id, 'check');
    const check = found ? { run: viewRun(found), current: isCurrent(found.inputsDigest, revision.sheet, revision.files) } : null;
    return ok({ kind: 'draft', ...head, candidateAnswers: await viewCandidateAnswers(reader, submissionId), revision, check, beforeLodging: beforeLodging({ ...revision, authors: head.authors, check }) });
  });
}
